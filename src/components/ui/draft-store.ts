const PREFIX = 'zaffre-draft:';

/** Account of who is signed in on this page, as its head tells; empty for nobody. */
export const accountOfPage = (): string => document.documentElement.dataset.account ?? '';

/** Under which name a draft is kept: apart for each account, since a browser may be shared. */
export const draftName = (account: string, key: string): string => `${PREFIX}${account}:${key}`;

/**
 * Take drafts out of a storage: all of them, or all but those of one account.
 *
 * @param except - account whose drafts stay
 */
export function forgetDrafts(storage: Storage, except?: string): void {
  const names = Array.from({ length: storage.length }, (_, i) => storage.key(i) ?? '');
  const kept = except ? draftName(except, '') : null;
  for (const name of names) if (name.startsWith(PREFIX) && !(kept && name.startsWith(kept))) storage.removeItem(name);
}
