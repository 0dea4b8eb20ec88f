import { routes } from '#src/contracts/routes.ts';
import { mayChangeFactors } from '#src/server/access/second-factor.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { renewRecoveryCodes } from '#src/server/second-factor/factors.ts';

export const POST = endpoint(routes.renewRecoveryCodes, {
  sight: ({ asker }) => mayChangeFactors(asker),
  act: ({ access, body }) => renewRecoveryCodes(access, body),
});
