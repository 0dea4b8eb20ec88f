import { routes } from '#src/contracts/routes.ts';
import { endOwnSession } from '#src/server/accounts/sessions.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const DELETE = endpoint(routes.endSession, { act: ({ asker, params }) => endOwnSession(asker, params.id!) });
