import { routes } from '#src/contracts/routes.ts';
import { confirmAddressChange } from '#src/server/accounts/change-address.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.confirmAddressChange, {
  act: ({ body, context }) => confirmAddressChange(body.token, context.clientAddress),
});
