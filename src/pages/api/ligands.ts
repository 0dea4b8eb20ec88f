import { ligands } from '#src/chem/ligands/index.ts';
import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const GET = endpoint(routes.listLigands, {
  act: () => ({ items: ligands, total: ligands.length, next: null }),
});
