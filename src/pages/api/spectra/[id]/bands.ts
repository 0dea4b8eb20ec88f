import { routes } from '#src/contracts/routes.ts';
import { mayProposeBands, seeSpectrum } from '#src/server/access/records.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { describeBands } from '#src/server/spectra/band-record.ts';
import { replaceBands } from '#src/server/spectra/bands.ts';
import { describeSpectrum } from '#src/server/spectra/record.ts';
import { requireSame } from '#src/server/spectra/require-same.ts';

export const GET = endpoint(routes.readBands, {
  sight: ({ asker, params }) => seeSpectrum(asker, params.id!),
  act: ({ access }) => describeBands(access),
});

export const PUT = endpoint(routes.replaceBands, {
  sight: ({ asker, params }) => mayProposeBands(asker, params.id!),
  act: async ({ asker, access, body, context }) => {
    // If-Match is not demanded here, but kept where it is sent: with the tag of the bands or of the whole spectrum.
    await requireSame(context.request, [() => describeBands(access), () => describeSpectrum(access)]);
    await replaceBands(access, body);
    return describeBands(await seeSpectrum(asker, access.spectrum.id));
  },
});
