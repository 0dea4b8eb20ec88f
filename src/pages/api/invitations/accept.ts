import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { acceptInvitation } from '#src/server/invitations/accept.ts';

export const POST = endpoint(routes.acceptInvitation, {
  act: ({ asker, body, context }) => acceptInvitation(asker, body, context.clientAddress),
});
