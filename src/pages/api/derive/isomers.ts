import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { runInWorker } from '#src/server/worker-pool.ts';

export const POST = endpoint(routes.deriveIsomers, {
  act: ({ body, context }) => runInWorker('isomers', body, { field: 'ligands', signal: context.request.signal }),
});
