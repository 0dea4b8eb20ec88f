import { routes } from '#src/contracts/routes.ts';
import { mayChangeGrant } from '#src/server/access/grants.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { changeGrant, revokeGrant } from '#src/server/grants/change.ts';
import { grantRecord } from '#src/server/grants/record.ts';

export const GET = endpoint(routes.readGrant, {
  sight: ({ asker, params }) => mayChangeGrant(asker, params.id!, params.grant!),
  act: ({ access }) => grantRecord(access),
});

export const PATCH = endpoint(routes.changeGrant, {
  sight: ({ asker, params }) => mayChangeGrant(asker, params.id!, params.grant!),
  represent: (access) => grantRecord(access),
  act: ({ access, body }) => changeGrant(access, body),
});

export const DELETE = endpoint(routes.revokeGrant, {
  sight: ({ asker, params }) => mayChangeGrant(asker, params.id!, params.grant!),
  act: ({ access }) => revokeGrant(access),
});
