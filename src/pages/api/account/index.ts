import { routes } from '#src/contracts/routes.ts';
import { accountRecord, changeAccount } from '#src/server/accounts/profile.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const GET = endpoint(routes.readAccount, { act: ({ asker }) => accountRecord(asker) });

export const PATCH = endpoint(routes.changeAccount, {
  represent: (_, asker) => accountRecord(asker),
  act: ({ asker, body }) => changeAccount(asker, body),
});
