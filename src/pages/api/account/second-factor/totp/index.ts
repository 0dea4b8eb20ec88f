import { routes } from '#src/contracts/routes.ts';
import { mayChangeFactors } from '#src/server/access/second-factor.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { startTotp } from '#src/server/second-factor/enrol-totp.ts';

export const POST = endpoint(routes.startTotp, {
  sight: ({ asker }) => mayChangeFactors(asker),
  act: ({ access, body }) => startTotp(access, body),
});
