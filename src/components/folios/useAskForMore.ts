import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import type { AccessRequestInput, AccessRequestRecord, AskedForMore } from '../../contracts/grants.ts';
import { sendJson } from '../ui/http.ts';
import { queryClient } from '../ui/query-client.ts';

/** Requests of a guest about one folio: those that wait, and sending one. */
export function useAskForMore(folio: string, asked: readonly AskedForMore[]) {
  const [own, setOwn] = useState<readonly AskedForMore[]>([]);
  const ask = useMutation(
    {
      mutationFn: (input: AccessRequestInput) =>
        sendJson<AccessRequestRecord>('POST', `/api/folios/${folio}/requests`, input),
      onSuccess: ({ id, wants, createdAt }) => setOwn((before) => [...before, { id, wants, createdAt }]),
    },
    queryClient,
  );
  const sent = [...asked, ...own.filter(({ id }) => !asked.some((request) => request.id === id))];
  return { ask, sent };
}
