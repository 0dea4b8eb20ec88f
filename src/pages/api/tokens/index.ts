import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { createToken, listTokens, revokeAllTokens } from '#src/server/tokens/tokens.ts';

export const GET = endpoint(routes.listTokens, { act: ({ asker }) => listTokens(asker) });

export const POST = endpoint(routes.createToken, { act: ({ asker, body }) => createToken(asker, body) });

export const DELETE = endpoint(routes.revokeAllTokens, {
  act: ({ asker, query }) => revokeAllTokens(asker, query),
});
