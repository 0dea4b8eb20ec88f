import { routes } from '#src/contracts/routes.ts';
import { seeLab } from '#src/server/access/sharing.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { listMembers } from '#src/server/labs/list.ts';

export const GET = endpoint(routes.listMembers, {
  sight: ({ asker, params }) => seeLab(asker, params.id!),
  act: ({ access }) => listMembers(access),
});
