import { useQuery } from '@tanstack/react-query';
import type { LabRecord, MemberRecord } from '../../contracts/sharing.ts';
import { DataTable } from '../ui/DataTable.tsx';
import { shortDay } from '../ui/dates.ts';
import { EmptyState } from '../ui/EmptyState.tsx';
import { getJson } from '../ui/http.ts';
import { Facts, Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { queryClient } from '../ui/query-client.ts';
import type { DataColumn } from '../ui/table-csv.ts';
import { LabInvitations } from './LabInvitations.tsx';
import { LabSettings } from './LabSettings.tsx';

interface Props {
  lab: LabRecord;
  members: MemberRecord[];
  /** Whether the asker leads this lab or is the steward. */
  leads: boolean;
  isDemo: boolean;
}

/** A lab: what it is, its people, who was asked to join, and its settings for those who lead it. */
export function LabPage({ lab: first, members, leads, isDemo }: Props) {
  const { data: lab } = useQuery(
    {
      queryKey: ['lab', first.id],
      queryFn: ({ signal }) => getJson<LabRecord>(`/api/labs/${first.id}`, signal),
      initialData: first,
    },
    queryClient,
  );
  return (
    <div className="grid items-start gap-6 lg:grid-cols-[300px_minmax(0,1fr)]">
      <div className="flex flex-col gap-6">
        <section className="specimen px-[18px] py-4">
          <h1 className="text-lg font-semibold">{lab.name}</h1>
          {lab.description && <p className="mt-1 text-ink-soft">{lab.description}</p>}
          <div className="mt-4">
            <Facts
              facts={[
                ['Place', lab.place ?? '–'],
                ['Your role', lab.role ?? 'none'],
                ['Complexes', <Count key="c" of={lab.complexes} href={`/complexes?lab=${lab.id}`} />],
                ['Spectra', <Count key="s" of={lab.spectra} href={`/spectra?lab=${lab.id}`} />],
                ['Attesting', lab.outsideAttest ? 'also by contributors of other labs' : 'by leads'],
              ]}
            />
          </div>
        </section>
        {leads && <LabSettings lab={lab} />}
      </div>
      <div className="flex min-w-0 flex-col gap-6">
        <People lab={first.id} first={members} leads={leads} />
        {leads && <LabInvitations lab={lab} isDemo={isDemo} />}
      </div>
    </div>
  );
}

function Count({ of, href }: { of: number; href: string }) {
  return of > 0 ? (
    <a href={href} className="link num">
      {of}
    </a>
  ) : (
    <span className="num">0</span>
  );
}

const COLUMNS: DataColumn<MemberRecord>[] = [
  { id: 'name', header: 'Name', value: (member) => member.name },
  { id: 'role', header: 'Role', value: (member) => member.role },
  {
    id: 'since',
    header: 'Since',
    value: (member) => member.since.slice(0, 10),
    cell: (member) => shortDay(member.since),
  },
];
const WITH_ADDRESS: DataColumn<MemberRecord>[] = [
  COLUMNS[0]!,
  { id: 'email', header: 'Address', value: (member) => member.email },
  ...COLUMNS.slice(1),
];

function People({ lab, first, leads }: { lab: string; first: MemberRecord[]; leads: boolean }) {
  const { data, error } = useQuery(
    {
      queryKey: ['lab', lab, 'members'],
      queryFn: ({ signal }) => getJson<MemberRecord[]>(`/api/labs/${lab}/members`, signal),
      initialData: first,
    },
    queryClient,
  );
  return (
    <Panel title="People">
      <Problem problem={error} />
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
        />
      )}
    </Panel>
  );
}
