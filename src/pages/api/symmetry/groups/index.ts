import { groups } from '#src/chem/symmetry/index.ts';
import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const GET = endpoint(routes.listGroups, {
  act: () => ({ items: groups }),
});
