import { routes } from '#src/contracts/routes.ts';
import { mayReadTrail } from '#src/server/access/oversight.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { readTrailRow } from '#src/server/oversight/list-trail.ts';

export const GET = endpoint(routes.readTrailRow, {
  sight: ({ asker }) => mayReadTrail(asker),
  act: ({ access, params }) => readTrailRow(access, params.seq!),
});
