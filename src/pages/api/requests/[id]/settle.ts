import { routes } from '#src/contracts/routes.ts';
import { maySettleRequest } from '#src/server/access/grants.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { settleRequest } from '#src/server/grants/settle.ts';

export const POST = endpoint(routes.settleAccessRequest, {
  sight: ({ asker, params }) => maySettleRequest(asker, params.id!),
  act: ({ access, body }) => settleRequest(access, body),
});
