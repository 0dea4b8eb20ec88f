import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { runInWorker } from '#src/server/worker-pool.ts';

export const POST = endpoint(routes.deriveFormula, {
  act: ({ body, context }) =>
    runInWorker(
      'formula',
      { text: body.formula, answers: body.answers ?? {} },
      { field: 'formula', signal: context.request.signal },
    ),
});
