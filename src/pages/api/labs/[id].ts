import { routes } from '#src/contracts/routes.ts';
import { mayChangeLab, seeLab } from '#src/server/access/sharing.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { changeLab } from '#src/server/labs/change.ts';
import { labRecord } from '#src/server/labs/record.ts';

export const GET = endpoint(routes.readLab, {
  sight: ({ asker, params }) => seeLab(asker, params.id!),
  act: ({ access }) => labRecord(access),
});

export const PATCH = endpoint(routes.changeLab, {
  sight: ({ asker, params }) => mayChangeLab(asker, params.id!),
  represent: (access) => labRecord(access),
  act: ({ access, body }) => changeLab(access, body),
});
