import { useMutation, useQuery } from '@tanstack/react-query';
import type { PersonDetail, PersonPatch, PersonRecord } from '../../contracts/people.ts';
import { getJson, getVersioned, sendJson, type Versioned } from '../ui/http.ts';
import { queryClient } from '../ui/query-client.ts';

const KEY = ['people'];
const again = () => queryClient.invalidateQueries({ queryKey: KEY });
const pathOf = (id: string) => `/api/accounts/${encodeURIComponent(id)}`;

/** Everybody who has an account, read page by page. The first reading came with the document. */
export function usePeople(first: PersonRecord[]) {
  return useQuery(
    {
      queryKey: KEY,
      queryFn: async ({ signal }) => {
        const all: PersonRecord[] = [];
        for (let cursor: string | null = ''; cursor !== null; ) {
          const query: string = cursor ? `&cursor=${encodeURIComponent(cursor)}` : '';
          const page = await getJson<{ items: PersonRecord[]; next: string | null }>(
            `/api/accounts?limit=500${query}`,
            signal,
          );
          all.push(...page.items);
          cursor = page.next;
        }
        return all;
      },
      initialData: first,
      staleTime: 30_000, // ms; otherwise the list just rendered would be read again
    },
    queryClient,
  );
}

/** One account as it is now, with what a deactivation would end. */
export const usePerson = (id: string) =>
  useQuery(
    {
      queryKey: ['person', id],
      queryFn: ({ signal }) => getVersioned<PersonDetail>(pathOf(id), signal),
      staleTime: 0,
    },
    queryClient,
  );

/** Changes an account in the version that was shown, or in the present one where none was. */
export const useChangePerson = (id: string, onDone: (person: PersonDetail) => void) =>
  useMutation(
    {
      mutationFn: async ({ patch, shown }: { patch: PersonPatch; shown?: Versioned<PersonDetail> | undefined }) => {
        const { etag } = shown ?? (await getVersioned<PersonDetail>(pathOf(id)));
        return sendJson<PersonDetail>('PATCH', pathOf(id), patch, { ifMatch: etag });
      },
      onSuccess: onDone,
      onSettled: () => {
        void queryClient.invalidateQueries({ queryKey: ['person', id] });
        return again();
      },
    },
    queryClient,
  );

/** Signs a person out everywhere, or mails them a link to choose a new password. */
export const useAct = (id: string, onDone: (answer: { ended: number } | undefined) => void) =>
  useMutation(
    {
      mutationFn: (act: 'end-sessions' | 'password-reset') =>
        sendJson<{ ended: number } | undefined>('POST', `${pathOf(id)}/${act}`),
      onSuccess: onDone,
    },
    queryClient,
  );

/** Adds a person to a lab without an invitation. */
export const useAddToLab = (id: string, onDone: () => void) =>
  useMutation(
    {
      mutationFn: ({ lab, role }: { lab: string; role: string }) =>
        sendJson('POST', `/api/labs/${encodeURIComponent(lab)}/members`, { account: id, role }),
      onSuccess: onDone,
      onSettled: again,
    },
    queryClient,
  );
