import { routes } from '#src/contracts/routes.ts';
import { mayReadTrail } from '#src/server/access/oversight.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { trailCsv } from '#src/server/oversight/export-trail.ts';

export const GET = endpoint(routes.exportTrailCsv, {
  sight: ({ asker }) => mayReadTrail(asker),
  act: ({ access, query }) => trailCsv(access, query),
});
