import { CredentialsSignin } from '@auth/core/errors';
import Credentials from '@auth/core/providers/credentials';
import { defineConfig } from 'auth-astro';
import { eq } from 'drizzle-orm';
import { accounts } from '../db/schema/index.ts';
import { database } from './database.ts';
import { HttpError } from './http.ts';
import { log } from './log.ts';
import { passwordFits } from './passwords.ts';
import { countAttempt } from './rate-limit.ts';
import { beginSession, SESSION_LIFE_MS } from './sessions.ts';
import { settings } from './settings.ts';
import { record } from './trail.ts';

declare module '@auth/core/types' {
  interface User {
    sessionId?: string;
  }
  interface Session {
    sessionId: string;
  }
}

class TooMany extends CredentialsSignin {
  override code = 'too-many';
}

const QUARTER_HOUR = 15 * 60 * 1000; // ms

async function authorize(given: Partial<Record<string, unknown>>, request: Request) {
  const email = String(given.email ?? '')
    .trim()
    .toLowerCase();
  const password = String(given.password ?? '');
  if (!email || !password || password.length > 1000) return null;
  try {
    await countAttempt(`sign-in:${email}`, { most: 10, windowMs: QUARTER_HOUR });
  } catch (error) {
    if (error instanceof HttpError) throw new TooMany();
    throw error;
  }
  const { db, write } = await database();
  const [account] = await db.select().from(accounts).where(eq(accounts.email, email));
  // The same work for an unknown address as for a wrong password.
  const fits = await passwordFits(account?.passwordHash ?? null, password);
  if (!account || !fits || account.state !== 'active') return null;
  const sessionId = await write(async (tx) => {
    await record(tx, { accountId: account.id }, { action: 'sign-in', subjectType: 'account', subjectId: account.id });
    const userAgent = request.headers.get('user-agent');
    return beginSession(tx, { accountId: account.id, secondFactor: false, userAgent, address: null });
  });
  return { id: account.id, email: account.email, name: account.name, sessionId };
}

export default defineConfig({
  secret: settings().authSecret,
  trustHost: true,
  session: { strategy: 'jwt', maxAge: SESSION_LIFE_MS / 1000 },
  pages: { signIn: '/signin', error: '/signin' },
  providers: [Credentials({ credentials: { email: {}, password: {} }, authorize })],
  callbacks: {
    jwt({ token, user }) {
      if (user) {
        token.sub = user.id ?? '';
        token.sid = user.sessionId;
      }
      return token;
    },
    session({ session, token }) {
      session.sessionId = String(token.sid ?? '');
      return session;
    },
  },
  logger: { error: (error) => log.warn({ reason: error.name }, 'sign-in refused'), warn: () => {}, debug: () => {} },
});
