import { routes } from '#src/contracts/routes.ts';
import { accessionParam, mayChangeComplex, seeComplex } from '#src/server/access/records.ts';
import { changeComplex, deleteDraft } from '#src/server/complexes/change.ts';
import { complexRecord } from '#src/server/complexes/record.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const GET = endpoint(routes.readComplex, {
  sight: ({ asker, params }) => seeComplex(asker, accessionParam(params)),
  act: ({ access }) => complexRecord(access),
});

export const PATCH = endpoint(routes.changeComplex, {
  sight: ({ asker, params }) => mayChangeComplex(asker, accessionParam(params)),
  represent: complexRecord,
  act: async ({ asker, access, body }) => {
    await changeComplex(access, body);
    return complexRecord(await seeComplex(asker, access.complex.accession));
  },
});

export const DELETE = endpoint(routes.deleteComplex, {
  sight: ({ asker, params }) => mayChangeComplex(asker, accessionParam(params)),
  represent: complexRecord,
  act: ({ access }) => deleteDraft(access),
});
