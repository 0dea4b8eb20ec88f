import { closeDatabase, database } from '#src/server/database.ts';
import { resetFactors } from '#src/server/second-factor/reset.ts';
import { accountOf, readOptions, requireDatabase, run, UsageError } from './lib/command.ts';
import { migrateDatabase } from './migrate.ts';

// Removes the second factors of a person who lost them, recovery codes too. See that it is they who ask.
run(async () => {
  const { for: email, remove } = readOptions('second-factor --', {
    for: { type: 'string' },
    remove: { type: 'boolean' },
  });
  if (!email || !remove)
    throw new UsageError('npm run second-factor: say --remove, and whose they are, with --for <email>.');
  requireDatabase();
  const open = await database();
  await migrateDatabase(open);
  const account = await accountOf(open, email);
  if (!account) throw new UsageError(`There is no account ${email}.`);
  const removed = await resetFactors(account);
  await closeDatabase();
  console.log(
    removed === 0
      ? `${account.email} has no second factor; nothing was changed.`
      : `Removed ${removed} second ${removed === 1 ? 'factor' : 'factors'} of ${account.email}, who is signed out and told by mail.`,
  );
});
