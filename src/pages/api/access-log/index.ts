import { routes } from '#src/contracts/routes.ts';
import { mayReadAccessLog } from '#src/server/access/oversight.ts';
import { Answer, endpoint } from '#src/server/endpoint.ts';
import { listAccess } from '#src/server/oversight/list-access.ts';
import { linkHeader } from '#src/server/paging.ts';

export const GET = endpoint(routes.listAccessLog, {
  sight: ({ asker }) => mayReadAccessLog(asker),
  act: async ({ access, query, context }) => {
    const page = await listAccess(access, query);
    return new Answer(page, { headers: linkHeader(context.url, page) });
  },
});
