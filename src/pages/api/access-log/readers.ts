import { routes } from '#src/contracts/routes.ts';
import { mayReadAccessLog } from '#src/server/access/oversight.ts';
import { mayInviteToFolio } from '#src/server/access/sharing.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { folioReaders } from '#src/server/oversight/folio-readers.ts';

export const GET = endpoint(routes.listFolioReaders, {
  sight: ({ asker }) => mayReadAccessLog(asker),
  // The folio hangs on the query, so that it is asked after that was read.
  act: async ({ asker, query }) => folioReaders(await mayInviteToFolio(asker, query.folio)),
});
