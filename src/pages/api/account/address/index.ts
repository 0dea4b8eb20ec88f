import { routes } from '#src/contracts/routes.ts';
import { askAddressChange, cancelAddressChange } from '#src/server/accounts/change-address.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.askAddressChange, { act: ({ asker, body }) => askAddressChange(asker, body) });

export const DELETE = endpoint(routes.cancelAddressChange, { act: ({ asker }) => cancelAddressChange(asker) });
