import { routes } from '#src/contracts/routes.ts';
import { mayRevokeInvitation } from '#src/server/access/sharing.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { revokeInvitation } from '#src/server/invitations/send.ts';

export const DELETE = endpoint(routes.revokeInvitation, {
  sight: ({ asker, params }) => mayRevokeInvitation(asker, params.id!),
  act: ({ access }) => revokeInvitation(access),
});
