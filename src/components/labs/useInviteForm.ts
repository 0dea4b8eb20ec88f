import { useState } from 'react';
import { ProblemError } from '../ui/problem-error.ts';
import { MOST_AT_ONCE, readAddresses, refusedAddresses, toInvite } from './address-list.ts';

/**
 * The part that both forms for inviting share: whether what was typed can be sent, and what the server said of single
 * addresses, for as long as they are the ones it was asked about.
 */
export function useInviteForm(typed: string, error: unknown) {
  const [triedWith, setTriedWith] = useState<string | null>(null);
  const addresses = readAddresses(typed);
  const isSame = triedWith === typed;
  const refused = refusedAddresses(addresses, isSame && error instanceof ProblemError ? error : null);
  const isReady = addresses.length > 0 && addresses.length <= MOST_AT_ONCE && addresses.every(({ fault }) => !fault);
  return {
    refused,
    wasTried: isSame,
    /** The addresses to send, or null where something is to be mended first. */
    take: () => {
      setTriedWith(typed);
      return isReady ? toInvite(addresses) : null;
    },
  };
}
