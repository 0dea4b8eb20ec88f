import { readFormula } from '#src/chem/formula/index.ts';
import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.deriveFormula, {
  act: ({ body }) => readFormula(body.formula, body.answers ?? {}),
});
