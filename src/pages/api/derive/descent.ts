import { descend } from '#src/chem/symmetry/index.ts';
import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.deriveDescent, {
  act: ({ body }) => descend(body.from, body.to, body.irreps, body.along),
});
