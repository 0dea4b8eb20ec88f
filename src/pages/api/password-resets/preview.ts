import { routes } from '#src/contracts/routes.ts';
import { previewReset } from '#src/server/accounts/reset-password.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.previewPasswordReset, {
  act: ({ body, context }) => previewReset(body.token, context.clientAddress),
});
