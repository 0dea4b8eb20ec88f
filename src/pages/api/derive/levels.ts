import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { runInWorker } from '#src/server/worker-pool.ts';

export const POST = endpoint(routes.deriveLevels, {
  act: ({ body, context }) => runInWorker('levels', body, { field: 'n', signal: context.request.signal }),
});
