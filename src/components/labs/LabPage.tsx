import { useQuery } from '@tanstack/react-query';
import type { MeasuredRecord } from '../../contracts/people.ts';
import type { LabRecord, MemberRecord } from '../../contracts/sharing.ts';
import { getJson } from '../ui/http.ts';
import { Facts } from '../ui/Panel.tsx';
import { queryClient } from '../ui/query-client.ts';
import { LabInvitations } from './LabInvitations.tsx';
import { LabMeasured } from './LabMeasured.tsx';
import { LabPeople, type Me } from './LabPeople.tsx';
import { LabSettings } from './LabSettings.tsx';

interface Props {
  lab: LabRecord;
  members: MemberRecord[];
  measured: MeasuredRecord;
  me: Me;
  /** Whether the asker leads this lab or is the steward. */
  leads: boolean;
  isDemo: boolean;
}

/** A lab: what it is, its people, what it measured, who was asked to join, and settings for those who lead it. */
export function LabPage({ lab: first, members, measured, me, leads, isDemo }: Props) {
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
                lab.facility ? ['Kind', 'facility: measures for other labs'] : null,
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
        <LabPeople lab={lab} first={members} leads={leads} me={me} />
        {leads && <LabInvitations lab={lab} isDemo={isDemo} />}
        <LabMeasured lab={lab} measured={measured} />
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
