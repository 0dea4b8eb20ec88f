import { routes } from '#src/contracts/routes.ts';
import { requireLab, seeComplex } from '#src/server/access/records.ts';
import { listComplexes } from '#src/server/complexes/list.ts';
import { complexRecord } from '#src/server/complexes/record.ts';
import { registerComplex } from '#src/server/complexes/register.ts';
import { Answer, endpoint } from '#src/server/endpoint.ts';
import { linkHeader } from '#src/server/paging.ts';

export const GET = endpoint(routes.listComplexes, {
  act: async ({ asker, query, context }) => {
    const page = await listComplexes(asker, query);
    return new Answer(page, { headers: linkHeader(context.url, page) });
  },
});

export const POST = endpoint(routes.createComplex, {
  judge: ({ asker, body }) => requireLab(asker, body.lab),
  act: async ({ asker, body }) => {
    const accession = await registerComplex(asker, body);
    const complex = await complexRecord(await seeComplex(asker, accession));
    return new Answer(complex, { headers: { location: `/api/complexes/${accession}` } });
  },
});
