import { routes } from '#src/contracts/routes.ts';
import { Answer, endpoint } from '#src/server/endpoint.ts';
import { listOutbox } from '#src/server/mail/outbox.ts';
import { linkHeader } from '#src/server/paging.ts';

export const GET = endpoint(routes.listOutbox, {
  act: async ({ asker, query, context }) => {
    const page = await listOutbox(asker, query);
    return new Answer(page, { headers: linkHeader(context.url, page) });
  },
});
