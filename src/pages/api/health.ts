import { routes } from '#src/contracts/routes.ts';
import { Answer, endpoint } from '#src/server/endpoint.ts';
import { healthParts } from '#src/server/health.ts';

export const GET = endpoint(routes.health, {
  act: async ({ asker }) => {
    const parts = await healthParts();
    // Mail that waits is no reason to send people away.
    const ok = parts.database === 'ok' && parts.store === 'ok';
    const body = { status: ok ? 'ok' : 'unavailable', ...(asker?.steward ? { parts } : {}) };
    return new Answer(body, ok ? {} : { status: 503, headers: { 'retry-after': '10' } });
  },
});
