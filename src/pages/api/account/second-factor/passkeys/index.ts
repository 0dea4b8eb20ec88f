import { routes } from '#src/contracts/routes.ts';
import { mayChangeFactors } from '#src/server/access/second-factor.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { addPasskey } from '#src/server/second-factor/passkeys.ts';

export const POST = endpoint(routes.addPasskey, {
  sight: ({ asker }) => mayChangeFactors(asker),
  act: ({ access, body }) => addPasskey(access, body),
});
