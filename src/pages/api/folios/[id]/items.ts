import { routes } from '#src/contracts/routes.ts';
import { mayChangeFolio } from '#src/server/access/sharing.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { replaceFolioItems } from '#src/server/folios/change.ts';

export const PUT = endpoint(routes.replaceFolioItems, {
  sight: ({ asker, params }) => mayChangeFolio(asker, params.id!),
  act: ({ access, body }) => replaceFolioItems(access, body),
});
