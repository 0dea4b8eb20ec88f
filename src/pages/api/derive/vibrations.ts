import { vibrations } from '#src/chem/symmetry/index.ts';
import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.deriveVibrations, {
  act: ({ body }) => vibrations(body),
});
