import { routes } from '#src/contracts/routes.ts';
import { accessionParam, requireMemberSight, seeComplex } from '#src/server/access/records.ts';
import { Answer, endpoint } from '#src/server/endpoint.ts';
import { listLevelFits } from '#src/server/level-fits/list.ts';
import { saveLevelFit } from '#src/server/level-fits/write.ts';

export const GET = endpoint(routes.listLevelFits, {
  sight: ({ asker, params }) => seeComplex(asker, accessionParam(params)),
  act: ({ access }) => listLevelFits(access),
});

export const POST = endpoint(routes.createLevelFit, {
  sight: ({ asker, params }) => seeComplex(asker, accessionParam(params)),
  judge: ({ asker, access }) => requireMemberSight(asker, access.complex),
  act: async ({ access, body, context }) => {
    const id = await saveLevelFit(access, body, context.request.signal);
    const [saved] = await listLevelFits(access, id);
    return new Answer(saved);
  },
});
