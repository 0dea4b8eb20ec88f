import { routes } from '#src/contracts/routes.ts';
import { endOwnSessions, listSessions } from '#src/server/accounts/sessions.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const GET = endpoint(routes.listSessions, { act: ({ asker }) => listSessions(asker) });

export const DELETE = endpoint(routes.endSessions, { act: ({ asker, query }) => endOwnSessions(asker, query) });
