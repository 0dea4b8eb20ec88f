import { routes } from '#src/contracts/routes.ts';
import { mayInviteToLab } from '#src/server/access/sharing.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { listLabInvitations } from '#src/server/invitations/record.ts';
import { inviteMember } from '#src/server/invitations/send.ts';

export const GET = endpoint(routes.listLabInvitations, {
  sight: ({ asker, params }) => mayInviteToLab(asker, params.id!),
  act: ({ access }) => listLabInvitations(access),
});

export const POST = endpoint(routes.inviteMember, {
  sight: ({ asker, params }) => mayInviteToLab(asker, params.id!),
  act: ({ access, body }) => inviteMember(access, body),
});
