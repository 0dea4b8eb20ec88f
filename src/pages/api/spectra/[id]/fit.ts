import { routes } from '#src/contracts/routes.ts';
import { mayProposeBands, seeSpectrum } from '#src/server/access/records.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { describeBands } from '#src/server/spectra/band-record.ts';
import { replaceBands } from '#src/server/spectra/bands.ts';
import { describeSpectrum } from '#src/server/spectra/record.ts';
import { requireSame } from '#src/server/spectra/require-same.ts';

export const PUT = endpoint(routes.replaceFittedBands, {
  sight: ({ asker, params }) => mayProposeBands(asker, params.id!),
  act: async ({ asker, access, body, context }) => {
    // As for the bands alone: If-Match is kept where it is sent.
    await requireSame(context.request, [() => describeBands(access), () => describeSpectrum(access)]);
    await replaceBands(access, body.bands, body.fit);
    return describeBands(await seeSpectrum(asker, access.spectrum.id));
  },
});
