import { routes } from '#src/contracts/routes.ts';
import { askPasswordReset } from '#src/server/accounts/reset-password.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.askPasswordReset, {
  act: ({ body, context }) => askPasswordReset(body.email, context.clientAddress),
});
