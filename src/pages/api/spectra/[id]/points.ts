import { routes } from '#src/contracts/routes.ts';
import { seeSpectrum } from '#src/server/access/records.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { readPoints } from '#src/server/spectra/points.ts';

export const GET = endpoint(routes.readPoints, {
  sight: ({ asker, params }) => seeSpectrum(asker, params.id!),
  act: ({ access, query }) => readPoints(access, query),
});
