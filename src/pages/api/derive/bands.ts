import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { runInWorker } from '#src/server/worker-pool.ts';

const orNull = (value: number) => (Number.isNaN(value) ? null : value);

export const POST = endpoint(routes.deriveBands, {
  act: async ({ body: { x, y, ...options }, context }) => {
    const points = y.map((value) => value ?? Number.NaN);
    const fit = await runInWorker('bands', { x, y: points, options }, { field: 'x', signal: context.request.signal });
    return { ...fit, residual: Array.from(fit.residual, orNull) };
  },
});
