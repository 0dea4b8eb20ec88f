import { routes } from '#src/contracts/routes.ts';
import { changePassword } from '#src/server/accounts/change-password.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.changePassword, { act: ({ asker, body }) => changePassword(asker, body) });
