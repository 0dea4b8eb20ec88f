import { readProblem, unreachable } from '../ui/problem-error.ts';
import { leaveNothing } from '../ui/signed-out.ts';

/** Why a sign-in was refused, in words. One sentence for an unknown address and for a wrong password. */
export function signInFault(error: string | null, code: string | null): string | null {
  if (!error) return null;
  if (code === 'too-many') return 'Too many attempts. Wait a quarter of an hour, then try again.';
  if (code === 'second-factor') return null; // no fault: the page asks for it
  if (code === 'second-factor-wrong')
    return 'The second factor did not fit, or was used before. A code works once: wait for the next one.';
  if (error === 'CredentialsSignin') return 'Address and password do not belong together.';
  if (error === 'MissingCSRF') return 'The form was open for too long. Try again.';
  return 'Signing in did not work. Try again; if it stays so, tell a steward.';
}

/** Whether the refusal of this code asks for a second factor, or for another one. */
export const asksSecondFactor = (code: string | null): boolean =>
  code === 'second-factor' || code === 'second-factor-wrong';

/** A sign-in that did not go through. */
export interface Refusal {
  fault: string | null;
  asksFactor: boolean;
}

/** The refusal that the address holds to which a sign-in answered; null when it went well. */
export function refusalInAnswer(url: string, base: string): Refusal | null {
  const { searchParams } = new URL(url, base);
  const error = searchParams.get('error');
  const code = searchParams.get('code');
  return error ? { fault: signInFault(error, code), asksFactor: asksSecondFactor(code) } : null;
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
 * Sign in with address and password, and the second factor where the account has one: a code, or what a passkey signed
 * as JSON. All goes in one request.
 *
 * @returns why it was refused, or null once the session stands
 * @throws {ProblemError} when the server cannot be reached or fails
 */
export async function signIn(
  email: string,
  password: string,
  factor: { code: string } | { passkey: string } | null = null,
): Promise<Refusal | null> {
  const url = await send('/api/auth/callback/credentials', { email, password, ...factor, callbackUrl: '/' });
  return refusalInAnswer(url, location.origin);
}

/** End the session of this browser. @throws {ProblemError} */
export async function signOut(): Promise<void> {
  await send('/api/auth/signout', { callbackUrl: '/signin' });
  leaveNothing();
}
