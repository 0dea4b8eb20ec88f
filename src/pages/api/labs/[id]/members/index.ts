import { routes } from '#src/contracts/routes.ts';
import { mayAddMember } from '#src/server/access/people.ts';
import { seeLab } from '#src/server/access/sharing.ts';
import { Answer, endpoint } from '#src/server/endpoint.ts';
import { listMembers } from '#src/server/labs/list.ts';
import { addMember } from '#src/server/people/memberships.ts';

export const GET = endpoint(routes.listMembers, {
  sight: ({ asker, params }) => seeLab(asker, params.id!),
  act: ({ access }) => listMembers(access),
});

export const POST = endpoint(routes.addMember, {
  sight: ({ asker, params }) => mayAddMember(asker, params.id!),
  act: async ({ access, body }) => {
    const member = await addMember(access, body);
    return new Answer(member, { headers: { location: `/api/labs/${access.lab.id}/members/${member.id}` } });
  },
});
