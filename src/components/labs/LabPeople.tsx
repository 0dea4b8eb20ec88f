import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { Departure } from '../../contracts/people.ts';
import type { LabRecord, MemberRecord } from '../../contracts/sharing.ts';
import { draftTotal, draftWords } from '../people/draft-words.ts';
import { Button } from '../ui/Button.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { shortDay } from '../ui/dates.ts';
import { EmptyState } from '../ui/EmptyState.tsx';
import { getJson } from '../ui/http.ts';
import { Menu } from '../ui/Menu.tsx';
import { Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { queryClient } from '../ui/query-client.ts';
import { StatusLine } from '../ui/StatusLine.tsx';
import type { DataColumn } from '../ui/table-csv.ts';
import { DepartureDialog } from './DepartureDialog.tsx';
import { useRole } from './useRole.ts';

/** Who looks at the page. */
export interface Me {
  id: string;
  steward: boolean;
}

interface Props {
  lab: LabRecord;
  first: MemberRecord[];
  /** Whether the asker leads this lab or is the steward. */
  leads: boolean;
  me: Me;
}

const NAME: DataColumn<MemberRecord> = {
  id: 'name',
  header: 'Name',
  value: (member) => member.name,
  cell: ({ name, state }) => (
    <>
      {name}
      {state === 'deactivated' && <span className="ml-2 text-xs text-ink-soft">deactivated</span>}
    </>
  ),
};
const ADDRESS: DataColumn<MemberRecord> = { id: 'email', header: 'Address', value: (member) => member.email };
const REST: DataColumn<MemberRecord>[] = [
  { id: 'role', header: 'Role', value: (member) => member.role },
  {
    id: 'since',
    header: 'Since',
    value: (member) => member.since.slice(0, 10),
    cell: (member) => shortDay(member.since),
  },
];
const COLUMNS = [NAME, ...REST];
const WITH_ADDRESS = [NAME, ADDRESS, ...REST];

/** The people of a lab: leads change roles and remove, everybody may leave. */
export function LabPeople({ lab, first, leads, me }: Props) {
  const { data, error } = useQuery(
    {
      queryKey: ['lab', lab.id, 'members'],
      queryFn: ({ signal }) => getJson<MemberRecord[]>(`/api/labs/${lab.id}/members`, signal),
      initialData: first,
    },
    queryClient,
  );
  const [done, setDone] = useState('');
  const [leaving, setLeaving] = useState<MemberRecord | null>(null);
  const [demoting, setDemoting] = useState<MemberRecord | null>(null);
  const role = useRole(lab.id, (member) => {
    if (member.id === me.id && !me.steward) location.reload();
    setDone(`${member.name} is a ${member.role} now.`);
  });
  const change = (member: MemberRecord, to: MemberRecord['role']) => {
    setDone('');
    role.mutate({ member, role: to });
  };
  const gone = (member: MemberRecord, departure: Departure) => {
    if (member.id === me.id) return location.assign('/');
    setLeaving(null);
    setDone(goneWords(member.name, departure));
    void queryClient.invalidateQueries({ queryKey: ['lab', lab.id] });
  };
  const actions = (member: MemberRecord) => {
    const isMe = member.id === me.id;
    if (!leads && !isMe) return null;
    const leave = { label: isMe ? 'Leave the lab …' : 'Remove from the lab …', danger: true };
    const turn =
      member.role === 'lead'
        ? { label: 'Make contributor …', onSelect: () => setDemoting(member) }
        : { label: 'Make lead', onSelect: () => change(member, 'lead') };
    const label = (
      <>
        Change<span className="sr-only"> {member.name}</span>
      </>
    );
    const items = [...(leads ? [turn] : []), { ...leave, onSelect: () => setLeaving(member) }];
    return <Menu kind="quiet" label={label} items={items} />;
  };
  const mayAct = leads || data.some(({ id }) => id === me.id);
  return (
    <Panel title="People" aside={leads ? 'A change takes effect with the person’s next request' : undefined}>
      <Problem problem={role.error ?? error} />
      {data.length === 0 ? (
        <EmptyState title="Nobody yet">{leads ? 'Invite its lead below.' : 'A steward invites its lead.'}</EmptyState>
      ) : (
        <DataTable
          name="People"
          columns={leads ? WITH_ADDRESS : COLUMNS}
          rows={data}
          rowId={(member) => member.id}
          tools={data.length > 5}
          compact
          {...(mayAct ? { actions } : {})}
        />
      )}
      <StatusLine>{done}</StatusLine>
      {leaving && (
        <DepartureDialog
          lab={lab}
          members={data}
          leaver={leaving}
          me={me}
          onClose={() => setLeaving(null)}
          onGone={(departure) => gone(leaving, departure)}
        />
      )}
      <Dialog
        open={demoting !== null}
        onOpenChange={(open) => !open && setDemoting(null)}
        title={`Make ${demoting?.id === me.id ? 'yourself' : demoting?.name} contributor`}
        description="A contributor makes, measures and proposes; only leads attest, invite and change roles. Open invitations sent as lead are revoked."
        actions={
          <>
            <Button onClick={() => setDemoting(null)}>Keep the role</Button>
            <Button
              kind="danger"
              onClick={() => {
                if (demoting) change(demoting, 'contributor');
                setDemoting(null);
              }}
            >
              Make contributor
            </Button>
          </>
        }
      />
    </Panel>
  );
}

/** "Ada is no longer a member. Drafts went to Bo: 2 complexes. 1 access token was revoked." */
function goneWords(name: string, { drafts, draftsTo, tokens, invitations }: Departure): string {
  const words = draftWords(drafts);
  const went = words && (draftsTo ? `${words} went to ${draftsTo.name}` : `${words} wait for the next lead`);
  const ended = [tokens > 0 && `access tokens revoked: ${tokens}`, invitations > 0 && `invitations: ${invitations}`];
  const rest = [draftTotal(drafts) > 0 && went, ...ended].filter(Boolean);
  return `${name} is no longer a member.${rest.length > 0 ? ` ${rest.join('; ')}.` : ''}`;
}
