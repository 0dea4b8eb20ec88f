import { powerPart, productOf } from '#src/chem/symmetry/index.ts';
import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.deriveProduct, {
  act: ({ body: { group, irreps, part } }) => ({
    terms: part ? powerPart(group, irreps, part) : productOf(group, irreps),
  }),
});
