import { routes } from '#src/contracts/routes.ts';
import { seeBundle } from '#src/server/access/sharing.ts';
import { cancelBundle, readBundle } from '#src/server/bundles/order.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const GET = endpoint(routes.readBundle, {
  sight: ({ asker, params }) => seeBundle(asker, params.id!),
  act: ({ access }) => readBundle(access),
});

export const DELETE = endpoint(routes.cancelBundle, {
  sight: ({ asker, params }) => seeBundle(asker, params.id!),
  act: ({ access }) => cancelBundle(access),
});
