import { accountOfPage, forgetDrafts } from './draft-store.ts';

let opened: BroadcastChannel | undefined;
/** One channel a page: what a page says over it reaches the other tabs and not the page itself. */
const tabs = (): BroadcastChannel => {
  opened ??= new BroadcastChannel('zaffre-signed-out');
  return opened;
};

function forget(except?: string): void {
  try {
    forgetDrafts(sessionStorage, except);
  } catch {
    // Storage may be forbidden, and then nothing was kept.
  }
}

/** Nothing that was typed stays in this browser after signing out: here at once, in its other tabs as they hear of it. */
export function leaveNothing(): void {
  forget();
  tabs().postMessage(null);
}

/**
 * For every page: drafts of another account go, and a page open in another tab leaves for the sign-in page when this
 * browser signs out, since what it shows belongs to who signed out.
 */
export function watchSignOut(): void {
  const account = accountOfPage();
  if (!account) return;
  forget(account);
  tabs().onmessage = () => {
    forget();
    location.assign('/signin');
  };
}
