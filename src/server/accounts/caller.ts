import { AsyncLocalStorage } from 'node:async_hooks';

/** What a sign-in has to know of the request besides what was typed. */
export interface Caller {
  /** The client's network address, as the server saw it or a trusted proxy told it; null where neither knows. */
  address: string | null;
  /** The live session of the cookie that came along, or null. */
  session: { id: string; accountId: string } | null;
}

const callers = new AsyncLocalStorage<Caller>();
const NOBODY: Caller = { address: null, session: null };

/**
 * Do `work` for a caller. The sign-in library hands its callbacks a request of its own making, which cannot tell the
 * client's address; a header could, but a header is what a client may send, too.
 */
export const withCaller = <T>(caller: Caller, work: () => T): T => callers.run(caller, work);

/** The caller for whom the present work is done. */
export const presentCaller = (): Caller => callers.getStore() ?? NOBODY;
