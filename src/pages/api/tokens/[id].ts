import { routes } from '#src/contracts/routes.ts';
import { mayRevokeToken } from '#src/server/access/sharing.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { revokeToken } from '#src/server/tokens/tokens.ts';

export const DELETE = endpoint(routes.revokeToken, {
  sight: ({ asker, params }) => mayRevokeToken(asker, params.id!),
  act: ({ access }) => revokeToken(access),
});
