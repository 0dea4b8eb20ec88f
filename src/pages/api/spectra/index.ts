import { routes } from '#src/contracts/routes.ts';
import { SpectrumMetadata } from '#src/contracts/spectra.ts';
import { Answer, endpoint, respond } from '#src/server/endpoint.ts';
import { replayOrRun } from '#src/server/idempotency.ts';
import { linkHeader } from '#src/server/paging.ts';
import { listSpectra } from '#src/server/spectra/list.ts';
import { readUpload } from '#src/server/spectra/multipart.ts';
import { resolveTarget } from '#src/server/spectra/target.ts';
import { createSpectrum } from '#src/server/spectra/upload.ts';

export const GET = endpoint(routes.listSpectra, {
  act: async ({ asker, query, context }) => {
    const page = await listSpectra(asker, query);
    return new Answer(page, { headers: linkHeader(context.url, page) });
  },
});

export const POST = endpoint(routes.createSpectrum, {
  act: async ({ asker, context }) => {
    const { request } = context;
    const upload = await readUpload(request, 'metadata');
    const metadata = SpectrumMetadata.parse(upload.told ?? {});
    const target = await resolveTarget(asker, metadata);
    // The form itself differs from try to try by its boundary: what counts is the bytes and what is told of them.
    const body = { sha256: upload.sha256, metadata };
    return replayOrRun(routes.createSpectrum, request, asker, body, async () => {
      const spectrum = await createSpectrum(target, upload, metadata);
      return respond(
        routes.createSpectrum,
        request,
        new Answer(spectrum, { headers: { location: `/api/spectra/${spectrum.id}` } }),
      );
    });
  },
});
