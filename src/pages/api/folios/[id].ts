import { routes } from '#src/contracts/routes.ts';
import { mayDeleteFolio } from '#src/server/access/grants.ts';
import { mayChangeFolio, seeFolio } from '#src/server/access/sharing.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { changeFolio } from '#src/server/folios/change.ts';
import { deleteFolio } from '#src/server/folios/delete.ts';
import { folioRecord } from '#src/server/folios/record.ts';

export const GET = endpoint(routes.readFolio, {
  sight: ({ asker, params }) => seeFolio(asker, params.id!),
  act: ({ access }) => folioRecord(access),
});

export const PATCH = endpoint(routes.changeFolio, {
  sight: ({ asker, params }) => mayChangeFolio(asker, params.id!),
  represent: (access) => folioRecord(access),
  act: ({ access, body }) => changeFolio(access, body),
});

export const DELETE = endpoint(routes.deleteFolio, {
  sight: ({ asker, params }) => mayDeleteFolio(asker, params.id!),
  represent: (access) => folioRecord(access),
  act: ({ access }) => deleteFolio(access),
});
