import { routes } from '#src/contracts/routes.ts';
import { mayWithdrawFit } from '#src/server/access/level-fits.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { withdrawLevelFit } from '#src/server/level-fits/write.ts';

export const DELETE = endpoint(routes.withdrawLevelFit, {
  sight: ({ asker, params }) => mayWithdrawFit(asker, params.id ?? ''),
  act: ({ access }) => withdrawLevelFit(access),
});
