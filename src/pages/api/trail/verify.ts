import { routes } from '#src/contracts/routes.ts';
import { mayReadTrail } from '#src/server/access/oversight.ts';
import { database } from '#src/server/database.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { verifyTrail } from '#src/server/oversight/verify-trail.ts';

export const GET = endpoint(routes.verifyTrail, {
  sight: ({ asker }) => mayReadTrail(asker),
  act: async ({ context }) => verifyTrail((await database()).db, context.request.signal),
});
