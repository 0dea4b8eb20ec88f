import { routes } from '#src/contracts/routes.ts';
import { seeAccount } from '#src/server/access/people.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { accountDetail } from '#src/server/people/account-record.ts';
import { changeAccount } from '#src/server/people/accounts.ts';

export const GET = endpoint(routes.readPerson, {
  sight: ({ asker, params }) => seeAccount(asker, params.id!),
  act: ({ access }) => accountDetail(access),
});

export const PATCH = endpoint(routes.changePerson, {
  sight: ({ asker, params }) => seeAccount(asker, params.id!),
  represent: (access) => accountDetail(access),
  act: ({ access, body }) => changeAccount(access, body),
});
