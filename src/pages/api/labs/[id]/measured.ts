import { routes } from '#src/contracts/routes.ts';
import { seeLab } from '#src/server/access/sharing.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { measured } from '#src/server/labs/measured.ts';

export const GET = endpoint(routes.readMeasured, {
  sight: ({ asker, params }) => seeLab(asker, params.id!),
  act: ({ access }) => measured(access),
});
