import { routes } from '#src/contracts/routes.ts';
import { completeReset } from '#src/server/accounts/reset-password.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.completePasswordReset, {
  act: ({ body, context }) => completeReset(body, context.clientAddress),
});
