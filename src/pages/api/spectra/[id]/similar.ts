import { routes } from '#src/contracts/routes.ts';
import { seeSpectrum } from '#src/server/access/records.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { listSimilar } from '#src/server/spectra/similar.ts';

export const GET = endpoint(routes.listSimilar, {
  sight: ({ asker, params }) => seeSpectrum(asker, params.id!),
  act: ({ access, query }) => listSimilar(access, query.limit),
});
