import { dOrbitals, splitTerm } from '#src/chem/symmetry/index.ts';
import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.deriveSplitting, {
  act: ({ body: { group, term } }) => ({ terms: splitTerm(group, term), orbitals: dOrbitals(group) }),
});
