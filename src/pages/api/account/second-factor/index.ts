import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { listFactors } from '#src/server/second-factor/factors.ts';

export const GET = endpoint(routes.readSecondFactors, { act: ({ asker }) => listFactors(asker) });
