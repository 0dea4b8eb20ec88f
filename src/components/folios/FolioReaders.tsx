import { useState } from 'react';
import type { GrantRecord } from '../../contracts/grants.ts';
import type { FolioRecord } from '../../contracts/sharing.ts';
import { Button } from '../ui/Button.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { shortDay } from '../ui/dates.ts';
import { Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import type { DataColumn } from '../ui/table-csv.ts';
import { ChangeGrant } from './ChangeGrant.tsx';
import { endedGrants, openGrants } from './folio-facts.ts';
import type { useFolio } from './useFolio.ts';

function columns(licence: string): DataColumn<GrantRecord>[] {
  return [
    { id: 'name', header: 'Name', value: (grant) => grant.name },
    { id: 'email', header: 'Address', value: (grant) => grant.email },
    { id: 'level', header: 'May', value: (grant) => (grant.level === 'download' ? 'read and download' : 'read') },
    {
      id: 'until',
      header: 'Until',
      value: (grant) => grant.expires.slice(0, 10),
      cell: (grant) => shortDay(grant.expires),
    },
    {
      id: 'terms',
      header: 'Terms accepted',
      value: (grant) => grant.termsAcceptedAt?.slice(0, 10) ?? null,
      cell: (grant) => <Terms grant={grant} licence={licence} />,
    },
    { id: 'by', header: 'By', value: (grant) => grant.grantedBy },
  ];
}

/** The day, and the licence where it is not the folio's present one. */
function Terms({ grant, licence }: { grant: GrantRecord; licence: string }) {
  if (!grant.termsAcceptedAt) return '–';
  const isOlder = grant.termsLicence !== null && grant.termsLicence !== licence;
  return (
    <>
      {shortDay(grant.termsAcceptedAt)}
      {isOlder && <span className="text-alert"> under {grant.termsLicence}</span>}
    </>
  );
}

const ENDED: DataColumn<GrantRecord>[] = [
  { id: 'name', header: 'Name', value: (grant) => grant.name },
  { id: 'email', header: 'Address', value: (grant) => grant.email },
  {
    id: 'ended',
    header: 'Ended',
    value: (grant) => (grant.revokedAt ?? grant.expires).slice(0, 10),
    cell: (grant) => shortDay(grant.revokedAt ?? grant.expires),
  },
  { id: 'how', header: 'How', value: (grant) => (grant.revoked ? 'by hand' : 'by its time') },
];

interface Props {
  folio: FolioRecord;
  revokeGrant: ReturnType<typeof useFolio>['revokeGrant'];
  changeGrant: ReturnType<typeof useFolio>['changeGrant'];
  now: string;
}

/** Who may read a folio besides the members of its lab, and who might once. */
export function FolioReaders({ folio, revokeGrant, changeGrant, now }: Props) {
  const [asked, setAsked] = useState<GrantRecord | null>(null);
  const [changed, setChanged] = useState<GrantRecord | null>(null);
  const readers = openGrants(folio, now);
  const ended = endedGrants(folio, now);
  const change = (grant: GrantRecord) => {
    changeGrant.reset();
    setChanged(grant);
  };
  return (
    <>
      <Panel title="Who may read it" aside={`besides the members of ${folio.lab.name}`}>
        <Problem problem={revokeGrant.error} />
        {readers.length === 0 ? (
          <p className="text-ink-soft">No guest. Invite one below.</p>
        ) : (
          <DataTable
            name="Readers"
            columns={columns(folio.licence)}
            rows={readers}
            rowId={(grant) => grant.id}
            tools={readers.length > 8}
            compact
            actions={(grant) => (
              <span className="inline-flex gap-1.5">
                <Button size="small" onClick={() => change(grant)} aria-label={`Change ${grant.email}`}>
                  Change
                </Button>
                <Button size="small" kind="danger" onClick={() => setAsked(grant)} aria-label={`Revoke ${grant.email}`}>
                  Revoke
                </Button>
              </span>
            )}
          />
        )}
        {ended.length > 0 && (
          <details className="mt-3">
            <summary className="min-h-6 cursor-pointer text-ink-soft">Access that ended ({ended.length})</summary>
            <div className="mt-2">
              <DataTable
                name="Access that ended"
                columns={ENDED}
                rows={ended}
                rowId={(grant) => grant.id}
                tools={ended.length > 8}
                compact
                actions={(grant) =>
                  !grant.revoked && (
                    <Button size="small" onClick={() => change(grant)} aria-label={`Renew ${grant.email}`}>
                      Renew
                    </Button>
                  )
                }
              />
            </div>
          </details>
        )}
      </Panel>
      {changed && <ChangeGrant grant={changed} changeGrant={changeGrant} now={now} onClose={() => setChanged(null)} />}
      <Dialog
        open={asked !== null}
        onOpenChange={(open) => !open && setAsked(null)}
        title="End this access"
        description={`${asked?.name} (${asked?.email}) sees nothing of this folio from the next request on, and is told by mail. What was downloaded stays with them.`}
        actions={
          <>
            <Button onClick={() => setAsked(null)}>Keep it</Button>
            <Button
              kind="danger"
              disabled={revokeGrant.isPending}
              onClick={() => {
                if (asked) revokeGrant.mutate(asked.id);
                setAsked(null);
              }}
            >
              Revoke
            </Button>
          </>
        }
      />
    </>
  );
}
