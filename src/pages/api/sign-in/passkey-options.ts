import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { signInOptions } from '#src/server/second-factor/sign-in-options.ts';

export const POST = endpoint(routes.startPasskeySignIn, {
  act: ({ body, context }) => signInOptions(body, context.clientAddress),
});
