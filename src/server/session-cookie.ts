const OVER_HTTPS = { httpOnly: true, sameSite: 'lax', path: '/', secure: true } as const;
const bound = (name: string) => ({ name: `__Host-authjs.${name}`, options: OVER_HTTPS });

/**
 * Cookies of the sign-in library. Over https all of them are bound to this very host by their names (`__Host-`), so that
 * no other host of the domain can set or read one; the library by itself does so for its form token alone.
 */
export const signInCookies = (publicOrigin: string) =>
  publicOrigin.startsWith('https:')
    ? { useSecureCookies: true, cookies: { sessionToken: bound('session-token'), callbackUrl: bound('callback-url') } }
    : { useSecureCookies: false };

/** The session in a Cookie header, whole or in the numbered pieces that the library makes of a long one. */
export const SESSION_COOKIE = /(?:^|;\s*)(?:__Host-)?authjs\.session-token(?:\.\d+)?=/;
