import { geometries } from '#src/chem/geometry/index.ts';
import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const GET = endpoint(routes.listGeometries, {
  act: () => ({ items: geometries }),
});
