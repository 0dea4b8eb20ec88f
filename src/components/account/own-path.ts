const ORIGIN = 'http://own.invalid';

/**
 * Where to go after signing in: a path of our own, or the day sheet for everything else. An address of another host
 * is never followed, in whatever way it is written (`//host`, `/\host`, `https:`, with line breaks or tabs between).
 */
export function ownPath(wanted: string | null | undefined): string {
  if (!wanted?.startsWith('/') || !URL.canParse(wanted, ORIGIN)) return '/';
  const url = new URL(wanted, ORIGIN);
  const isPage = url.origin === ORIGIN && !/^\/(?:api|signin)(?:\/|$)/.test(url.pathname);
  return isPage ? `${url.pathname}${url.search}${url.hash}` : '/';
}

/** The address of the sign-in page that leads back to a path. */
export const signInPath = (next: string): string =>
  next === '/' ? '/signin' : `/signin?${new URLSearchParams({ next })}`;
