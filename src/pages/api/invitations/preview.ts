import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { previewInvitation } from '#src/server/invitations/accept.ts';

export const POST = endpoint(routes.previewInvitation, {
  act: ({ body, context }) => previewInvitation(body.token, context.clientAddress),
});
