import { routes } from '#src/contracts/routes.ts';
import { mayChangeFactor } from '#src/server/access/second-factor.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { confirmTotp } from '#src/server/second-factor/enrol-totp.ts';

export const POST = endpoint(routes.confirmTotp, {
  sight: ({ asker, params }) => mayChangeFactor(asker, params.id!),
  act: ({ access, body }) => confirmTotp(access, body),
});
