import { routes } from '#src/contracts/routes.ts';
import { mayChangeInvitation } from '#src/server/access/grants.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { resendInvitation } from '#src/server/invitations/change.ts';

export const POST = endpoint(routes.resendInvitation, {
  sight: ({ asker, params }) => mayChangeInvitation(asker, params.id!),
  act: ({ access }) => resendInvitation(access),
});
