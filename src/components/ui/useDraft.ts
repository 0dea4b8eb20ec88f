import { useCallback, useEffect, useState } from 'react';
import { accountOfPage, draftName } from './draft-store.ts';

function read<T>(key: string): T | undefined {
  try {
    const kept = sessionStorage.getItem(draftName(accountOfPage(), key));
    return kept === null ? undefined : (JSON.parse(kept) as T);
  } catch {
    return undefined; // storage may be forbidden, or hold what an older page wrote
  }
}

/**
 * What was typed into a form, kept for this tab and this account so that it survives a reload and a session that ran
 * out; signing out takes it away (`signed-out.ts`). Never for passwords or tokens.
 *
 * The first drawing shows `initial`, as the server did; what was kept appears right after.
 */
export function useDraft<T extends object>(key: string, initial: T) {
  const [draft, setDraft] = useState(initial);
  useEffect(() => {
    const kept = read<T>(key);
    if (kept) setDraft((now) => ({ ...now, ...kept }));
  }, [key]);

  const change = useCallback(
    (part: Partial<T>) =>
      setDraft((now) => {
        const next = { ...now, ...part };
        try {
          sessionStorage.setItem(draftName(accountOfPage(), key), JSON.stringify(next));
        } catch {
          // Without storage the text lives as long as the page.
        }
        return next;
      }),
    [key],
  );
  const clear = useCallback(() => {
    try {
      sessionStorage.removeItem(draftName(accountOfPage(), key));
    } catch {
      // Nothing was kept.
    }
    setDraft(initial);
  }, [key, initial]);
  return { draft, change, clear };
}
