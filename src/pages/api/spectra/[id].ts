import { routes } from '#src/contracts/routes.ts';
import { mayChangeSpectrum, seeSpectrum } from '#src/server/access/records.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { changeSpectrum, deleteDraft } from '#src/server/spectra/change.ts';
import { describeSpectrum } from '#src/server/spectra/record.ts';

export const GET = endpoint(routes.readSpectrum, {
  sight: ({ asker, params }) => seeSpectrum(asker, params.id!),
  act: ({ access }) => describeSpectrum(access),
});

export const PATCH = endpoint(routes.changeSpectrum, {
  sight: ({ asker, params }) => mayChangeSpectrum(asker, params.id!),
  represent: describeSpectrum,
  act: async ({ asker, access, body }) => {
    await changeSpectrum(access, body);
    return describeSpectrum(await seeSpectrum(asker, access.spectrum.id));
  },
});

export const DELETE = endpoint(routes.deleteSpectrum, {
  sight: ({ asker, params }) => mayChangeSpectrum(asker, params.id!),
  represent: describeSpectrum,
  act: ({ access }) => deleteDraft(access),
});
