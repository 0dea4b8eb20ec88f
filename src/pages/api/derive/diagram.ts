import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { runInWorker } from '#src/server/worker-pool.ts';

export const POST = endpoint(routes.deriveDiagram, {
  act: ({ body, context }) => runInWorker('diagram', body, { field: 'n', signal: context.request.signal }),
});
