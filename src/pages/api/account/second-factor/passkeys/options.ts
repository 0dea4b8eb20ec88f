import { routes } from '#src/contracts/routes.ts';
import { mayChangeFactors } from '#src/server/access/second-factor.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { startPasskey } from '#src/server/second-factor/passkeys.ts';

export const POST = endpoint(routes.startPasskey, {
  sight: ({ asker }) => mayChangeFactors(asker),
  act: ({ access, body }) => startPasskey(access, body),
});
