import { eq } from 'drizzle-orm';
import { accounts } from '#src/db/schema/index.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { factorKinds, passesSecondFactor } from '../second-factor/verify.ts';
import { beginSession, endSession } from '../sessions.ts';
import { record } from '../trail.ts';
import { presentCaller } from './caller.ts';
import { type AccountRow, accountOfCredentials, refusedSignIn } from './credentials.ts';
import { forgiveSignIn } from './throttle.ts';

/** A sign-in that the page must explain: the code is one of those that `signInFault` knows. */
export class SignInRefused extends Error {
  override readonly name = 'SignInRefused';

  constructor(readonly code: 'too-many' | 'second-factor' | 'second-factor-wrong') {
    super(code);
  }
}

/** All that one attempt carries; what was left out is empty. There is no half sign-in that a second request completes. */
export interface Typed {
  email: string;
  password: string;
  /** Of an authenticator app, or a recovery code. */
  code: string;
  /** What a passkey signed, as JSON. */
  passkey: string;
}

/**
 * Sign in: prove address and password, then the second factor where the account has one, then begin a session. The
 * session that this browser had before ends, whoever's it was.
 *
 * @returns who signed in, with the new session's id for the cookie; null when address and password do not go together
 * @throws {SignInRefused}
 */
export async function signIn(typed: Typed, userAgent: string | null) {
  const caller = presentCaller();
  const account = await accountOfCredentials(typed, caller.address).catch(tooMany);
  if (!account) return null;
  const secondFactor = await proveSecondFactor(account, typed, caller.address).catch(tooMany);
  const { write } = await database();
  const sessionId = await write(async (tx) => {
    // Between the proof and this moment the password may have been changed, which ended every session.
    const [still] = await tx.select().from(accounts).where(eq(accounts.id, account.id));
    if (still?.state !== 'active' || still.passwordHash !== account.passwordHash) return null;
    if (caller.session) await endSession(tx, caller.session.accountId, caller.session.id);
    await forgiveSignIn(tx, account.email, caller.address ?? 'unknown');
    const id = await beginSession(tx, { accountId: account.id, secondFactor, userAgent, address: caller.address });
    const detail = { session: id, secondFactor };
    await record(
      tx,
      { accountId: account.id },
      { action: 'sign-in', subjectType: 'account', subjectId: account.id, detail },
    );
    return id;
  });
  return sessionId && { id: account.id, email: account.email, name: account.name, sessionId };
}

function tooMany(error: unknown): never {
  throw error instanceof HttpError && error.status === 429 ? new SignInRefused('too-many') : error;
}

/** Whether a second factor was shown: false for an account that has none. @throws {SignInRefused} */
async function proveSecondFactor(account: AccountRow, { code, passkey }: Typed, address: string | null) {
  const kinds = await factorKinds(account.id);
  if (kinds.length === 0) return false;
  if (!code.trim() && !passkey) throw new SignInRefused('second-factor');
  const given = passkey ? { passkey } : { code: code.trim() };
  if (await passesSecondFactor(account.id, given)) return true;
  refusedSignIn('wrong second factor', { account: account.id, address });
  throw new SignInRefused('second-factor-wrong');
}

/** End the session of a cookie that signs out; a copy of that cookie opens nothing from then on. */
export async function endedSignIn(accountId: string, sessionId: string): Promise<void> {
  const { write } = await database();
  await write(async (tx) => {
    if (!(await endSession(tx, accountId, sessionId))) return;
    const entry = { action: 'sign-out', subjectType: 'account' as const, subjectId: accountId };
    await record(tx, { accountId }, { ...entry, detail: { session: sessionId } });
  });
}
