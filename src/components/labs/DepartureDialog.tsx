import { useMutation, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { Departure, MemberDetail } from '../../contracts/people.ts';
import type { LabRecord, MemberRecord } from '../../contracts/sharing.ts';
import { draftTotal, draftWords } from '../people/draft-words.ts';
import { Button } from '../ui/Button.tsx';
import { Select } from '../ui/controls.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { getVersioned, sendJson } from '../ui/http.ts';
import { Problem } from '../ui/Problem.tsx';
import { queryClient } from '../ui/query-client.ts';
import { heirsOf } from './heirs.ts';
import type { Me } from './LabPeople.tsx';

interface Props {
  lab: LabRecord;
  members: readonly MemberRecord[];
  leaver: MemberRecord;
  me: Me;
  onClose: () => void;
  onGone: (departure: Departure) => void;
}

/** Leaving a lab, or removing somebody: what ends, and who gets the drafts. */
export function DepartureDialog({ lab, members, leaver, me, onClose, onGone }: Props) {
  const isMe = leaver.id === me.id;
  const url = `/api/labs/${lab.id}/members/${leaver.id}`;
  const heirs = heirsOf(members, leaver.id, me.id);
  const [heir, setHeir] = useState(heirs[0]?.role === 'lead' ? heirs[0].id : '');
  const seen = useQuery(
    {
      queryKey: [url],
      queryFn: ({ signal }) => getVersioned<MemberDetail>(url, signal),
      staleTime: 0,
    },
    queryClient,
  );
  const go = useMutation(
    {
      mutationFn: () => {
        const query = heir ? `?draftsTo=${encodeURIComponent(heir)}` : '';
        return sendJson<Departure>('DELETE', `${url}${query}`, undefined, { ifMatch: seen.data?.etag });
      },
      onSuccess: onGone,
      onError: () => seen.refetch(),
    },
    queryClient,
  );
  const member = seen.data?.data;
  const isHeld = member?.onlyLead === true && !me.steward;
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={isMe ? `Leave ${lab.name}` : `Remove ${leaver.name} from ${lab.name}`}
      description={`${isMe ? 'You lose' : `${leaver.name} loses`} sight of what is for this lab alone, with the next request. Access tokens made for this lab end. What is registered keeps its maker’s name.`}
      actions={
        <>
          <Button onClick={onClose}>{isMe ? 'Stay' : 'Keep in the lab'}</Button>
          <Button kind="danger" disabled={!member || isHeld || go.isPending} onClick={() => go.mutate()}>
            {isMe ? 'Leave the lab' : 'Remove'}
          </Button>
        </>
      }
    >
      <div className="flex flex-col gap-3">
        {!member && !seen.error && <p className="text-ink-soft">Counting drafts …</p>}
        {isHeld && (
          <p className="font-semibold">
            {isMe ? 'You are' : `${leaver.name} is`} the only lead of this lab. Make another member lead first.
          </p>
        )}
        {member && !isHeld && <Drafts member={member} heirs={heirs} heir={heir} onHeir={setHeir} />}
        <Problem problem={go.error ?? seen.error} onRetry={() => void seen.refetch()} />
      </div>
    </Dialog>
  );
}

interface DraftsProps {
  member: MemberDetail;
  heirs: MemberRecord[];
  heir: string;
  onHeir: (id: string) => void;
}

function Drafts({ member, heirs, heir, onHeir }: DraftsProps) {
  const words = member.drafts && draftWords(member.drafts);
  if (!words) return <p>There are no drafts to hand over in this lab.</p>;
  const none = heirs[0]?.role === 'lead' ? [] : [{ value: '', label: 'Nobody: they wait for the next lead' }];
  return (
    <>
      <p>
        {draftTotal(member.drafts!) === 1 ? 'One draft is' : 'Drafts are'} handed over: {words}.
      </p>
      <Select
        label="Drafts go to"
        value={heir}
        onChange={(event) => onHeir(event.target.value)}
        options={[...none, ...heirs.map(({ id, name, role }) => ({ value: id, label: `${name}, ${role}` }))]}
      />
    </>
  );
}
