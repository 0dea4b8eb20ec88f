import { routes } from '#src/contracts/routes.ts';
import { accessionParam, seeComplex } from '#src/server/access/records.ts';
import { complexTransitions } from '#src/server/complexes/transitions.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const GET = endpoint(routes.readTransitions, {
  sight: ({ asker, params }) => seeComplex(asker, accessionParam(params)),
  act: ({ access, query }) => complexTransitions(access, query.spin),
});
