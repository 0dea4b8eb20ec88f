import { routes } from '#src/contracts/routes.ts';
import { mayAskForMore } from '#src/server/access/grants.ts';
import { mayInviteToFolio } from '#src/server/access/sharing.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { askForMore, listRequests } from '#src/server/grants/requests.ts';

export const GET = endpoint(routes.listAccessRequests, {
  sight: ({ asker, params }) => mayInviteToFolio(asker, params.id!),
  act: ({ access }) => listRequests(access),
});

export const POST = endpoint(routes.askForMore, {
  sight: ({ asker, params }) => mayAskForMore(asker, params.id!),
  act: ({ access, body }) => askForMore(access, body),
});
