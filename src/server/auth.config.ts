import { CredentialsSignin } from '@auth/core/errors';
import Credentials from '@auth/core/providers/credentials';
import { defineConfig } from 'auth-astro';
import { endedSignIn, SignInRefused, signIn } from './accounts/sign-in.ts';
import { log } from './log.ts';
import { signInCookies } from './session-cookie.ts';
import { SESSION_LIFE_MS } from './sessions.ts';
import { settings } from './settings.ts';

declare module '@auth/core/types' {
  interface User {
    sessionId?: string;
  }
  interface Session {
    sessionId: string;
  }
}

/** A refusal whose code the sign-in page reads from its address. */
class Refusal extends CredentialsSignin {
  constructor(code: string) {
    super();
    this.code = code;
  }
}

async function authorize(given: Partial<Record<string, unknown>>, request: Request) {
  const text = (field: string) => (typeof given[field] === 'string' ? given[field] : '');
  const typed = { email: text('email'), password: text('password'), code: text('code'), passkey: text('passkey') };
  try {
    return (await signIn(typed, request.headers.get('user-agent'))) || null;
  } catch (error) {
    throw error instanceof SignInRefused ? new Refusal(error.code) : error;
  }
}

export default defineConfig({
  secret: settings().authSecret,
  trustHost: true,
  ...signInCookies(settings().publicOrigin),
  session: { strategy: 'jwt', maxAge: SESSION_LIFE_MS / 1000 },
  pages: { signIn: '/signin', error: '/signin' },
  providers: [Credentials({ credentials: { email: {}, password: {}, code: {}, passkey: {} }, authorize })],
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
  events: {
    async signOut(message) {
      const token = 'token' in message ? message.token : null;
      if (token) await endedSignIn(String(token.sub ?? ''), String(token.sid ?? ''));
    },
  },
  logger: {
    // A refused sign-in was told by the one who refused it, with its reason.
    error: (error) => {
      if (!(error instanceof CredentialsSignin)) log.warn({ reason: error.name }, 'the sign-in library refused');
    },
    warn: () => {},
    debug: () => {},
  },
});
