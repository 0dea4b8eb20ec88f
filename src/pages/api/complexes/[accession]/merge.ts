import { routes } from '#src/contracts/routes.ts';
import { mayMergeComplex } from '#src/server/access/merges.ts';
import { accessionParam, seeComplex } from '#src/server/access/records.ts';
import { complexRecord } from '#src/server/complexes/record.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { mergeComplex } from '#src/server/merges/merge.ts';

export const POST = endpoint(routes.mergeComplex, {
  sight: ({ asker, params }) => mayMergeComplex(asker, accessionParam(params)),
  represent: complexRecord,
  act: async ({ asker, access, body }) => complexRecord(await seeComplex(asker, await mergeComplex(access, body))),
});
