import { routes } from '#src/contracts/routes.ts';
import {
  accessionParam,
  requireLab,
  requireMemberSight,
  seeComplex,
  seePreparation,
} from '#src/server/access/records.ts';
import { Answer, endpoint } from '#src/server/endpoint.ts';
import { linkHeader } from '#src/server/paging.ts';
import { listPreparations } from '#src/server/preparations/list.ts';
import { preparationRecords } from '#src/server/preparations/record.ts';
import { createPreparation } from '#src/server/preparations/write.ts';

export const GET = endpoint(routes.listPreparations, {
  sight: ({ asker, params }) => seeComplex(asker, accessionParam(params)),
  act: async ({ access, query, context }) => {
    const page = await listPreparations(access, query);
    return new Answer(page, { headers: linkHeader(context.url, page) });
  },
});

export const POST = endpoint(routes.createPreparation, {
  sight: ({ asker, params }) => seeComplex(asker, accessionParam(params)),
  judge: ({ asker, access, body }) => {
    requireLab(asker, body.lab);
    requireMemberSight(asker, access.complex);
  },
  act: async ({ asker, access, body }) => {
    const id = await createPreparation(access, body);
    const { preparation } = await seePreparation(asker, id);
    const [record] = await preparationRecords(asker, [preparation]);
    return new Answer(record, { headers: { location: `/api/preparations/${id}` } });
  },
});
