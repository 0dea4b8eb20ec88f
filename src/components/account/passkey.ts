import type { PublicKeyCredentialRequestOptionsJSON } from '@simplewebauthn/browser';
import { sendJson } from '../ui/http.ts';

/** Whether this browser knows passkeys. */
export const knowsPasskeys = (): boolean => typeof window.PublicKeyCredential === 'function';

/**
 * Let a passkey sign a challenge of the server.
 *
 * @returns what it signed, as JSON; null when the person or the browser gave up
 * @throws {ProblemError} when the server refuses: no passkey on the account, too many attempts
 */
export async function askPasskey(email: string, password: string): Promise<string | null> {
  const path = '/api/sign-in/passkey-options';
  const optionsJSON = await sendJson<PublicKeyCredentialRequestOptionsJSON>('POST', path, { email, password });
  const { startAuthentication } = await import('@simplewebauthn/browser');
  const answer = await startAuthentication({ optionsJSON }).catch(() => null);
  return answer && JSON.stringify(answer);
}
