import { ProblemError } from '../../ui/problem-error.ts';

const WORDS: Record<string, string> = {
  ERROR_AUTHENTICATOR_PREVIOUSLY_REGISTERED: 'This device or key holds a passkey of your account already.',
  ERROR_AUTHENTICATOR_NO_SUPPORTED_PUBKEYCREDPARAMS_ALG: 'This key makes no signatures that the registry can check.',
  ERROR_INVALID_DOMAIN:
    'Passkeys belong to a name, not to an address in figures. Open the registry by its name, such as localhost.',
  ERROR_INVALID_RP_ID: 'Open the registry under its own name: passkeys are not made under another one.',
  ERROR_CEREMONY_ABORTED: 'It was broken off. Nothing was set up.',
};
const CANCELLED =
  'The browser was told no, or nobody answered in time. Nothing was set up; try again when you are ready.';

/** What the browser or the authenticator refused, in words. */
export function passkeyFault(error: unknown): ProblemError {
  const { code, name } = (error ?? {}) as { code?: unknown; name?: unknown };
  const known = typeof code === 'string' ? WORDS[code] : undefined;
  const detail = known ?? (name === 'NotAllowedError' ? CANCELLED : 'The browser could not make a passkey here.');
  return new ProblemError(0, 'No passkey was set up', detail);
}
