import { routes } from '#src/contracts/routes.ts';
import { mayJudgeBand } from '#src/server/access/records.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { judgeBand } from '#src/server/spectra/judge.ts';

export const POST = endpoint(routes.disputeBand, {
  sight: ({ asker, params }) => mayJudgeBand(asker, params.id!),
  act: ({ access, body }) => judgeBand(access, 'disputed', body),
});
