import { routes } from '#src/contracts/routes.ts';
import { mayChangeInvitation } from '#src/server/access/grants.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { readInvitation, revokeInvitation } from '#src/server/invitations/change.ts';

export const GET = endpoint(routes.readInvitation, {
  sight: ({ asker, params }) => mayChangeInvitation(asker, params.id!),
  act: ({ access }) => readInvitation(access),
});

export const DELETE = endpoint(routes.revokeInvitation, {
  sight: ({ asker, params }) => mayChangeInvitation(asker, params.id!),
  act: ({ access }) => revokeInvitation(access),
});
