import { routes } from '#src/contracts/routes.ts';
import { mayAcceptTerms } from '#src/server/access/grants.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { acceptTerms } from '#src/server/grants/terms.ts';

export const POST = endpoint(routes.acceptTerms, {
  sight: ({ asker, params }) => mayAcceptTerms(asker, params.id!),
  act: ({ access, body }) => acceptTerms(access, body.licence),
});
