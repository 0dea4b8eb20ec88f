import { routes } from '#src/contracts/routes.ts';
import { mayRevokeGrant } from '#src/server/access/sharing.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { revokeGrant } from '#src/server/folios/change.ts';

export const DELETE = endpoint(routes.revokeGrant, {
  sight: ({ asker, params }) => mayRevokeGrant(asker, params.id!, params.grant!),
  act: ({ access }) => revokeGrant(access),
});
