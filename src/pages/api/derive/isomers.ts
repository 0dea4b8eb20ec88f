import { enumerateIsomers } from '#src/chem/geometry/index.ts';
import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.deriveIsomers, {
  act: ({ body }) => enumerateIsomers(body),
});
