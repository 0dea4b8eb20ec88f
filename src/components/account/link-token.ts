import { useEffect, useState } from 'react';
import { readFragment } from './invitation-token.ts';

/**
 * The token of a link by mail, which stands in the fragment, where no server is sent it. It is taken out of the address
 * and kept with this entry of the tab's history alone: a reload finds it again, nothing else does.
 *
 * @returns undefined until the address was read, which only the browser can; null where it holds none
 */
export function useLinkToken(): { token: string | null | undefined; forget: () => void } {
  const [token, setToken] = useState<string | null | undefined>(undefined);
  useEffect(() => {
    const take = () => setToken(takeLinkToken());
    take();
    // Pasting a newer link over the address changes the fragment alone and loads nothing.
    window.addEventListener('hashchange', take);
    return () => window.removeEventListener('hashchange', take);
  }, []);
  const forget = () => {
    history.replaceState(null, '', location.pathname);
    setToken(null);
  };
  return { token, forget };
}

function takeLinkToken(): string | null {
  const fragment = readFragment(location.hash);
  if (fragment) history.replaceState({ linkToken: fragment }, '', location.pathname + location.search);
  return fragment ?? (history.state as { linkToken?: string } | null)?.linkToken ?? null;
}
