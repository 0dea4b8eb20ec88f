import { routes } from '#src/contracts/routes.ts';
import { seeMergeTask } from '#src/server/access/merges.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { settleMergeTask } from '#src/server/merges/tasks.ts';

export const POST = endpoint(routes.settleMergeTask, {
  sight: ({ asker, params }) => seeMergeTask(asker, params.id!),
  act: ({ access, body }) => settleMergeTask(access, body),
});
