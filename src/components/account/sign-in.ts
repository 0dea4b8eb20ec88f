import { readProblem, unreachable } from '../ui/problem-error.ts';

/** Why a sign-in was refused, in words. One sentence for an unknown address and for a wrong password. */
export function signInFault(error: string | null, code: string | null): string | null {
  if (!error) return null;
  if (code === 'too-many') return 'Too many attempts for this address. Wait a quarter of an hour, then try again.';
  if (error === 'CredentialsSignin') return 'Address and password do not belong together.';
  if (error === 'MissingCSRF') return 'The form was open for too long. Try again.';
  return 'Signing in did not work. Try again; if it stays so, tell a steward.';
}

/** The fault that the address holds to which a sign-in answered; null when it went well. */
export function faultInAnswer(url: string, base: string): string | null {
  const { searchParams } = new URL(url, base);
  return signInFault(searchParams.get('error'), searchParams.get('code'));
}

async function send(path: string, fields: Record<string, string>): Promise<string> {
  const body = new URLSearchParams({ ...fields, csrfToken: await csrfToken() });
  const response = await request(path, { method: 'POST', body, headers: { 'x-auth-return-redirect': '1' } });
  return ((await response.json()) as { url: string }).url;
}

async function csrfToken(): Promise<string> {
  const response = await request('/api/auth/csrf', {});
  return ((await response.json()) as { csrfToken: string }).csrfToken;
}

async function request(path: string, init: RequestInit): Promise<Response> {
  const response = await fetch(path, init).catch((error: unknown) => {
    throw unreachable(error);
  });
  if (!response.ok) throw await readProblem(response);
  return response;
}

/**
 * Sign in with address and password.
 *
 * @returns why it was refused, or null once the session stands
 * @throws {ProblemError} when the server cannot be reached or fails
 */
export async function signIn(email: string, password: string): Promise<string | null> {
  const url = await send('/api/auth/callback/credentials', { email, password, callbackUrl: '/' });
  return faultInAnswer(url, location.origin);
}

/** End the session of this browser. @throws {ProblemError} */
export async function signOut(): Promise<void> {
  await send('/api/auth/signout', { callbackUrl: '/signin' });
}
