import { routes } from '#src/contracts/routes.ts';
import { mayInviteToFolio } from '#src/server/access/sharing.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { listGrants } from '#src/server/grants/record.ts';

export const GET = endpoint(routes.listGrants, {
  sight: ({ asker, params }) => mayInviteToFolio(asker, params.id!),
  act: ({ access }) => listGrants(access),
});
