const KEY = 'zaffre-invitation';

/**
 * Take the token of an invitation out of the address and keep it for this tab, so that it survives signing in or a
 * reload. It stays until it is used or refused (`forgetInvitation`). It stands in the fragment, which no server is sent.
 *
 * @returns the token, or null where neither the address nor this tab holds one
 */
export function takeInvitationToken(): string | null {
  const fragment = readFragment(location.hash);
  if (location.hash) history.replaceState(null, '', location.pathname + location.search);
  if (fragment) sessionStorage.setItem(KEY, fragment);
  return fragment ?? sessionStorage.getItem(KEY);
}

export const forgetInvitation = (): void => sessionStorage.removeItem(KEY);

/** `#abc` and `#token=abc` both hold the token abc; an empty fragment holds none. */
export function readFragment(hash: string): string | null {
  const text = hash.replace(/^#/, '');
  const token = text.startsWith('token=') ? new URLSearchParams(text).get('token') : text;
  return token || null;
}
