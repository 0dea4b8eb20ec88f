import { useMutation } from '@tanstack/react-query';
import { useRef, useState } from 'react';
import { sendJson } from '#src/components/ui/http.ts';
import { queryClient } from '#src/components/ui/query-client.ts';
import type { ComplexInput, ComplexRecord, PreparationInput } from '#src/contracts/complexes.ts';

export interface Registration {
  complex: ComplexInput;
  preparation: PreparationInput | null;
}

/** A key for each thing sent: the same body again is a repeat, a changed one is a new request. */
function useIdempotencyKey() {
  const last = useRef({ body: '', key: '' });
  return (body: unknown): string => {
    const text = JSON.stringify(body);
    if (last.current.body !== text) last.current = { body: text, key: crypto.randomUUID() };
    return last.current.key;
  };
}

/**
 * Registers the complex, then its preparation where one is wanted. When only the second fails, trying again sends
 * only the second: `registered` holds the accession by then.
 */
export function useRegistration(onDone: (accession: string) => void) {
  const [registered, setRegistered] = useState<string | null>(null);
  const complexKey = useIdempotencyKey();
  const preparationKey = useIdempotencyKey();

  const { mutate, isPending, error, reset } = useMutation(
    {
      mutationFn: async ({ complex, preparation }: Registration) => {
        const accession =
          registered ??
          (
            await sendJson<ComplexRecord>('POST', '/api/complexes', complex, {
              idempotencyKey: complexKey(complex),
            })
          ).accession;
        setRegistered(accession);
        if (preparation)
          await sendJson('POST', `/api/complexes/${accession}/preparations`, preparation, {
            idempotencyKey: preparationKey({ accession, ...preparation }),
          });
        return accession;
      },
      onSuccess: onDone,
    },
    queryClient,
  );
  return { register: mutate, isSending: isPending, problem: error, forgetProblem: reset, registered };
}
