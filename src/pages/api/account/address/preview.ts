import { routes } from '#src/contracts/routes.ts';
import { previewAddressChange } from '#src/server/accounts/change-address.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.previewAddressChange, {
  act: ({ body, context }) => previewAddressChange(body.token, context.clientAddress),
});
