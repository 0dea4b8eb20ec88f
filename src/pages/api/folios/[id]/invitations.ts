import { routes } from '#src/contracts/routes.ts';
import { mayInviteToFolio } from '#src/server/access/sharing.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { listFolioInvitations } from '#src/server/invitations/record.ts';
import { inviteGuest } from '#src/server/invitations/send.ts';

export const GET = endpoint(routes.listFolioInvitations, {
  sight: ({ asker, params }) => mayInviteToFolio(asker, params.id!),
  act: ({ access }) => listFolioInvitations(access),
});

export const POST = endpoint(routes.inviteGuest, {
  sight: ({ asker, params }) => mayInviteToFolio(asker, params.id!),
  act: ({ access, body }) => inviteGuest(access, body),
});
