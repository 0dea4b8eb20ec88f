import { useMutation } from '@tanstack/react-query';
import type { MemberDetail } from '../../contracts/people.ts';
import type { MemberRecord } from '../../contracts/sharing.ts';
import { getVersioned, ProblemError, sendJson } from '../ui/http.ts';
import { queryClient } from '../ui/query-client.ts';

/** Gives a member another role, if the role is still the one that the table shows. */
export function useRole(labId: string, onDone: (member: MemberDetail) => void) {
  return useMutation(
    {
      mutationFn: async ({ member, role }: { member: MemberRecord; role: MemberRecord['role'] }) => {
        const url = `/api/labs/${labId}/members/${member.id}`;
        const { data, etag } = await getVersioned<MemberDetail>(url);
        if (data.role !== member.role)
          throw new ProblemError(
            412,
            'Somebody changed this role meanwhile',
            `${data.name} is ${data.role} by now. The table shows it when it is read again.`,
          );
        return sendJson<MemberDetail>('PATCH', url, { role }, { ifMatch: etag });
      },
      onSuccess: onDone,
      onSettled: () => queryClient.invalidateQueries({ queryKey: ['lab', labId] }),
    },
    queryClient,
  );
}
