import { routes } from '#src/contracts/routes.ts';
import { asSteward } from '#src/server/access/people.ts';
import { Answer, endpoint } from '#src/server/endpoint.ts';
import { linkHeader } from '#src/server/paging.ts';
import { listAccounts } from '#src/server/people/accounts.ts';

export const GET = endpoint(routes.listPeople, {
  sight: ({ asker }) => asSteward(asker),
  act: async ({ access, query, context }) => {
    const page = await listAccounts(access, query);
    return new Answer(page, { headers: linkHeader(context.url, page) });
  },
});
