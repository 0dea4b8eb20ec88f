import { routes } from '#src/contracts/routes.ts';
import { mayReadTrail } from '#src/server/access/oversight.ts';
import { Answer, endpoint } from '#src/server/endpoint.ts';
import { listTrail } from '#src/server/oversight/list-trail.ts';
import { linkHeader } from '#src/server/paging.ts';

export const GET = endpoint(routes.listTrail, {
  sight: ({ asker }) => mayReadTrail(asker),
  act: async ({ access, query, context }) => {
    const page = await listTrail(access, query);
    return new Answer(page, { headers: linkHeader(context.url, page) });
  },
});
