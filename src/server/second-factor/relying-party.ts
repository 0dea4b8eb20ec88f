import { settings } from '../settings.ts';

/** As whom the registry asks for passkeys, and from where their answers may come. */
export interface RelyingParty {
  /** A domain name (WebAuthn §5.4.2); passkeys belong to it. */
  id: string;
  name: string;
  /** Origins of pages whose answers count. */
  origins: string[];
}

/**
 * The registry towards authenticators. Demo mode is served under every name of this machine, but an address in figures
 * is no domain: there passkeys work at `localhost` alone.
 */
export function relyingParty(): RelyingParty {
  const { mode, publicOrigin } = settings();
  const { protocol, port, hostname } = new URL(publicOrigin);
  if (mode === 'production') return { id: hostname, name: 'Zaffre', origins: [publicOrigin] };
  const local = `${protocol}//localhost${port ? `:${port}` : ''}`;
  return { id: 'localhost', name: 'Zaffre', origins: [...new Set([publicOrigin, local])] };
}
