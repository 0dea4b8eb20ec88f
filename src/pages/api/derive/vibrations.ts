import { vibrations, vibrationsOfAtoms } from '#src/chem/symmetry/index.ts';
import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.deriveVibrations, {
  act: ({ body: { coordinates, tolerance, geometry = '', sites = [], links = [] } }) =>
    coordinates ? vibrationsOfAtoms(coordinates, tolerance) : vibrations({ geometry, sites, links }),
});
