import { routes } from '#src/contracts/routes.ts';
import { mayChangeFactor } from '#src/server/access/second-factor.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { removeFactor } from '#src/server/second-factor/factors.ts';

export const POST = endpoint(routes.removeFactor, {
  sight: ({ asker, params }) => mayChangeFactor(asker, params.id!),
  act: ({ access, body }) => removeFactor(access, body),
});
