import { routes } from '#src/contracts/routes.ts';
import { requireLab } from '#src/server/access/records.ts';
import { Answer, endpoint } from '#src/server/endpoint.ts';
import { createFolio } from '#src/server/folios/change.ts';
import { listFolios } from '#src/server/folios/list.ts';
import { linkHeader } from '#src/server/paging.ts';

export const GET = endpoint(routes.listFolios, {
  act: async ({ asker, query, context }) => {
    const page = await listFolios(asker, query);
    return new Answer(page, { headers: linkHeader(context.url, page) });
  },
});

export const POST = endpoint(routes.createFolio, {
  judge: ({ asker, body }) => requireLab(asker, body.lab),
  act: async ({ asker, body }) => {
    const folio = await createFolio(asker, body);
    return new Answer(folio, { headers: { location: `/api/folios/${folio.id}` } });
  },
});
