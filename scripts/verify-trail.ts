import { closeDatabase, database } from '#src/server/database.ts';
import { verifyTrail } from '#src/server/oversight/verify-trail.ts';
import { readOptions, requireDatabase, run } from './lib/command.ts';

// Follows the chain of the trail from its first row and prints the verdict as JSON: rows, verified, firstBroken, head.
// Ends with 1 when it is broken, so that a nightly job can tell.
run(async () => {
  readOptions('verify-trail --', {});
  requireDatabase();
  const verdict = await verifyTrail((await database()).db);
  await closeDatabase();
  console.log(JSON.stringify(verdict));
  if (!verdict.verified) process.exitCode = 1;
});
