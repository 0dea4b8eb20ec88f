import { createInterface } from 'node:readline';
import { text } from 'node:stream/consumers';
import { eq } from 'drizzle-orm';
import { NewPassword } from '#src/contracts/account.ts';
import { accounts } from '#src/db/schema/index.ts';
import { passwordFault } from '#src/server/accounts/password-rule.ts';
import { closeDatabase, database } from '#src/server/database.ts';
import { newId, nowIso } from '#src/server/ids.ts';
import { hashPassword } from '#src/server/passwords.ts';
import { record } from '#src/server/trail.ts';
import { accountOf, makeDataFolder, readOptions, run, UsageError } from './lib/command.ts';
import { isHalfLoaded } from './lib/demo-data.ts';
import { migrateDatabase } from './migrate.ts';

// Makes the first steward, or makes an account that is there a steward. From there on people are invited in the program.
run(async () => {
  const options = readOptions('steward --', {
    email: { type: 'string' },
    name: { type: 'string' },
    'password-stdin': { type: 'boolean' },
  });
  const email = options.email?.trim().toLowerCase();
  if (!email || !/^[^\s@]+@[^\s@]+$/.test(email))
    throw new UsageError('npm run steward: say who, with --email <address>.');
  makeDataFolder();
  const open = await database();
  await migrateDatabase(open);
  if (await isHalfLoaded(open))
    throw new UsageError('Loading the demo data was broken off; start the program once, then try again.');

  const account = await accountOf(open, email);
  const person = { email, name: account?.name ?? options.name ?? email };
  const passwordHash =
    account?.passwordHash ?? (await hashPassword(await readPassword(options['password-stdin'] ?? false, person)));
  const id = account?.id ?? newId();
  await open.write(async (tx) => {
    if (account)
      await tx.update(accounts).set({ steward: true, state: 'active', passwordHash }).where(eq(accounts.id, id));
    else
      await tx
        .insert(accounts)
        .values({ id, email, name: options.name ?? email, passwordHash, steward: true, createdAt: nowIso() });
    const action = account ? 'account.promoted' : 'account.created';
    await record(
      tx,
      { accountId: null },
      { action, subjectType: 'account', subjectId: id, detail: { steward: true, by: 'script' } },
    );
  });
  await closeDatabase();
  console.log(
    account ? `${email} is a steward now; the password is as it was.` : `${email} is a steward and can sign in.`,
  );
});

async function readPassword(fromInput: boolean, person: { email: string; name: string }): Promise<string> {
  if (!fromInput && !process.stdin.isTTY)
    throw new UsageError(
      'There is no terminal to ask for a password; send it on standard input with --password-stdin.',
    );
  const password = fromInput ? ((await text(process.stdin)).split(/\r?\n/)[0] ?? '') : await ask('Password: ');
  // The rule of the program, which knows no second way in.
  const fault = NewPassword.safeParse(password).error?.issues[0]?.message ?? (await passwordFault(password, person));
  if (fault) throw new UsageError(`${fault}.`);
  if (!fromInput && password !== (await ask('Once more: '))) throw new UsageError('The two passwords differ.');
  return password;
}

/** Ask on the terminal without showing what is typed. */
function ask(question: string): Promise<string> {
  const terminal = createInterface({ input: process.stdin, output: process.stderr, terminal: true });
  return new Promise((resolve, reject) => {
    terminal.on('SIGINT', () => reject(new UsageError('Nothing was changed.')));
    terminal.question(question, (answer) => {
      terminal.close();
      process.stderr.write('\n');
      resolve(answer);
    });
    // The question stands; from here on nothing is echoed.
    (terminal as unknown as { _writeToOutput(text: string): void })._writeToOutput = () => undefined;
  });
}
