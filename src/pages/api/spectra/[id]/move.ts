import { routes } from '#src/contracts/routes.ts';
import { mayMoveSpectrum } from '#src/server/access/merges.ts';
import { seeSpectrum } from '#src/server/access/records.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { moveSpectrum } from '#src/server/merges/move-spectrum.ts';
import { describeSpectrum } from '#src/server/spectra/record.ts';

export const POST = endpoint(routes.moveSpectrum, {
  sight: ({ asker, params }) => mayMoveSpectrum(asker, params.id!),
  represent: (access) => describeSpectrum(access),
  act: async ({ asker, access, body }) => {
    await moveSpectrum(access, body);
    return describeSpectrum(await seeSpectrum(asker, access.spectrum.id));
  },
});
