import { routes } from '#src/contracts/routes.ts';
import { mayChangeRole, mayEndMembership, seeMember } from '#src/server/access/people.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { memberRecord } from '#src/server/people/member-record.ts';
import { changeRole, endMembership } from '#src/server/people/memberships.ts';

export const GET = endpoint(routes.readMember, {
  sight: ({ asker, params }) => seeMember(asker, params.id!, params.account!),
  act: ({ access }) => memberRecord(access),
});

export const PATCH = endpoint(routes.changeMember, {
  sight: ({ asker, params }) => mayChangeRole(asker, params.id!, params.account!),
  represent: (access) => memberRecord(access),
  act: ({ access, body }) => changeRole(access, body),
});

export const DELETE = endpoint(routes.removeMember, {
  sight: ({ asker, params }) => mayEndMembership(asker, params.id!, params.account!),
  represent: (access) => memberRecord(access),
  act: ({ access, query }) => endMembership(access, query),
});
