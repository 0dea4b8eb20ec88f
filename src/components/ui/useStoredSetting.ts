import { useCallback, useEffect, useState } from 'react';

/**
 * A taste of this browser, such as the columns of a table: kept in local storage. The first drawing shows `initial`, as
 * the server did. Never for anything that tells about a record or a person.
 */
export function useStoredSetting<T extends object>(key: string, initial: T) {
  const name = `zaffre-setting:${key}`;
  const [value, setValue] = useState(initial);
  useEffect(() => {
    try {
      const kept = localStorage.getItem(name);
      if (kept !== null) setValue((now) => ({ ...now, ...(JSON.parse(kept) as Partial<T>) }));
    } catch {
      // Storage may be forbidden, or hold what an older page wrote.
    }
  }, [name]);
  const change = useCallback(
    (part: Partial<T>) =>
      setValue((now) => {
        const next = { ...now, ...part };
        try {
          localStorage.setItem(name, JSON.stringify(next));
        } catch {
          // Without storage the setting lives as long as the page.
        }
        return next;
      }),
    [name],
  );
  return [value, change] as const;
}
