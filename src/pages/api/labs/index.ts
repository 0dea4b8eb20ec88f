import { routes } from '#src/contracts/routes.ts';
import { Answer, endpoint } from '#src/server/endpoint.ts';
import { createLab } from '#src/server/labs/change.ts';
import { listLabs } from '#src/server/labs/list.ts';
import { linkHeader } from '#src/server/paging.ts';

export const GET = endpoint(routes.listLabs, {
  act: async ({ asker, query, context }) => {
    const page = await listLabs(asker, query);
    return new Answer(page, { headers: linkHeader(context.url, page) });
  },
});

export const POST = endpoint(routes.createLab, {
  act: async ({ asker, body }) => {
    const lab = await createLab(asker, body);
    return new Answer(lab, { headers: { location: `/api/labs/${lab.id}` } });
  },
});
