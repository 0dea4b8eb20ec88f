import { routes } from '#src/contracts/routes.ts';
import { Answer, endpoint } from '#src/server/endpoint.ts';
import { listMergeTasks } from '#src/server/merges/tasks.ts';
import { linkHeader } from '#src/server/paging.ts';

export const GET = endpoint(routes.listMergeTasks, {
  act: async ({ asker, query, context }) => {
    const page = await listMergeTasks(asker, query);
    return new Answer(page, { headers: linkHeader(context.url, page) });
  },
});
