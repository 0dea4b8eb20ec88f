import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { runInWorker } from '#src/server/worker-pool.ts';

export const POST = endpoint(routes.deriveFit, {
  act: ({ body, context }) => runInWorker('fit', body, { field: 'bands', signal: context.request.signal }),
});
