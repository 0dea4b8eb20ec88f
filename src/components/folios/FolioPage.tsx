import { useState } from 'react';
import type { FolioRecord } from '../../contracts/sharing.ts';
import { BundlePanel } from '../bundles/BundlePanel.tsx';
import { Button } from '../ui/Button.tsx';
import { longDay } from '../ui/dates.ts';
import { Facts } from '../ui/Panel.tsx';
import { Notice } from '../ui/StatusLine.tsx';
import { EditFolio } from './EditFolio.tsx';
import { FolioContent } from './FolioContent.tsx';
import { FolioReaders } from './FolioReaders.tsx';
import { isUnderEmbargo, ownAccess } from './folio-facts.ts';
import { LICENCES } from './licences.ts';
import { useFolio } from './useFolio.ts';

interface Props {
  folio: FolioRecord;
  now: string;
  isDemo: boolean;
}

/** A folio: what it is, what it holds, who may read it, and the file to take away. */
export function FolioPage({ folio: first, now, isDemo }: Props) {
  const state = useFolio(first);
  const { folio } = state;
  return (
    <div className="grid items-start gap-6 lg:grid-cols-[320px_minmax(0,1fr)]">
      <div className="flex flex-col gap-6">
        <Label folio={folio} now={now} state={state} />
        <BundlePanel target={{ folio: folio.id }} isEmpty={folio.items.length === 0} mayDownload={folio.may.download} />
      </div>
      <div className="flex min-w-0 flex-col gap-6">
        <FolioContent folio={folio} editItems={state.editItems} />
        {folio.may.invite && <FolioReaders folio={folio} revokeGrant={state.revokeGrant} now={now} isDemo={isDemo} />}
      </div>
    </div>
  );
}

function Label({ folio, now, state }: { folio: FolioRecord; now: string; state: ReturnType<typeof useFolio> }) {
  const [editing, setEditing] = useState(false);
  const licence = LICENCES.find(({ value }) => value === folio.licence);
  const isClosed = isUnderEmbargo(folio, now);
  return (
    <section className="specimen px-[18px] py-4">
      <p className="text-xs text-ink-soft">Folio</p>
      <h1 className="text-lg font-semibold">{folio.name}</h1>
      {folio.description && <p className="mt-1 whitespace-pre-line text-ink-soft">{folio.description}</p>}
      <div className="mt-4">
        <Facts
          facts={[
            ['Lab', folio.lab.name],
            ['Licence', licence?.label ?? folio.licence],
            [
              folio.level === null ? 'Guests see' : 'You see',
              folio.shows === 'attested' ? 'attested bands only' : 'attested and proposed bands',
            ],
            folio.edition === null
              ? null
              : [
                  'Edition',
                  <span key="e" className="num">
                    {folio.edition}
                  </span>,
                ],
            [folio.level === null ? 'You' : 'You may', ownAccess(folio)],
          ]}
        />
      </div>
      {isClosed && (
        <div className="mt-4">
          <Notice title="Embargo." tone="plain">
            Guests see nothing of this folio before {longDay(folio.embargoUntil!)}.
          </Notice>
        </div>
      )}
      {folio.may.change && (
        <Button className="mt-4" onClick={() => setEditing(true)}>
          Change
        </Button>
      )}
      {editing && <EditFolio folio={folio} change={state.change} onClose={() => setEditing(false)} />}
    </section>
  );
}
