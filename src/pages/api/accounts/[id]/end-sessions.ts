import { routes } from '#src/contracts/routes.ts';
import { seeAccount } from '#src/server/access/people.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { endAccountSessions } from '#src/server/people/accounts.ts';

export const POST = endpoint(routes.endPersonSessions, {
  sight: ({ asker, params }) => seeAccount(asker, params.id!),
  act: ({ access }) => endAccountSessions(access),
});
