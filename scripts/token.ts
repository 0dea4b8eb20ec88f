import { accessTokens } from '#src/db/schema/index.ts';
import { closeDatabase, database } from '#src/server/database.ts';
import { newId, newSecret, nowIso, sha256 } from '#src/server/ids.ts';
import { record } from '#src/server/trail.ts';
import { accountOf, readOptions, requireDatabase, run, UsageError } from './lib/command.ts';
import { migrateDatabase } from './migrate.ts';

const VALID_FOR_MS = 30 * 24 * 3600 * 1000;

// Prints an access token for an account, and nothing else, so that `T=$(npm run -s token -- --as …)` works.
run(async () => {
  const { as: email, scope = 'write' } = readOptions('token --', { as: { type: 'string' }, scope: { type: 'string' } });
  if (!email) throw new UsageError('npm run token: say for whom, with --as <email>.');
  if (scope !== 'read' && scope !== 'write') throw new UsageError(`--scope is read or write, not "${scope}".`);
  requireDatabase();
  const open = await database();
  await migrateDatabase(open);
  const account = await accountOf(open, email);
  if (account?.state !== 'active') throw new UsageError(`There is no active account ${email}.`);

  const token = `zft_${newSecret()}`;
  const row = {
    id: newId(),
    accountId: account.id,
    name: 'made on the server',
    hash: sha256(token),
    scopes: scope === 'read' ? (['read'] as 'read'[]) : (['read', 'write'] as ('read' | 'write')[]),
    createdAt: nowIso(),
    expiresAt: new Date(Date.now() + VALID_FOR_MS).toISOString(),
  };
  await open.write(async (tx) => {
    await tx.insert(accessTokens).values(row);
    const detail = { accountId: account.id, scopes: row.scopes, expiresAt: row.expiresAt, by: 'script' };
    await record(tx, { accountId: null }, { action: 'token.created', subjectType: 'token', subjectId: row.id, detail });
  });
  await closeDatabase();
  console.log(token);
});
