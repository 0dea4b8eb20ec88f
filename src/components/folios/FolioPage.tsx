import { useState } from 'react';
import type { FolioRecord } from '../../contracts/sharing.ts';
import { BundlePanel } from '../bundles/BundlePanel.tsx';
import { Button, ButtonLink } from '../ui/Button.tsx';
import { longDay } from '../ui/dates.ts';
import { EmptyState } from '../ui/EmptyState.tsx';
import { Facts, Panel } from '../ui/Panel.tsx';
import { Notice } from '../ui/StatusLine.tsx';
import { AccessEnded } from './AccessEnded.tsx';
import { AccessRequests } from './AccessRequests.tsx';
import { AskForMore } from './AskForMore.tsx';
import { DeleteFolio } from './DeleteFolio.tsx';
import { EditFolio } from './EditFolio.tsx';
import { FolioContent } from './FolioContent.tsx';
import { FolioReaders } from './FolioReaders.tsx';
import { isUnderEmbargo, openGrants, ownAccess } from './folio-facts.ts';
import { GuestInvitations } from './GuestInvitations.tsx';
import { licenceOf } from './licences.ts';
import { TermsBanner } from './TermsBanner.tsx';
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
  if (state.isGone) return <Gone folio={folio} />;
  return (
    <div className="flex flex-col gap-6">
      <TermsBanner folio={folio} acceptTerms={state.acceptTerms} />
      <div className="grid items-start gap-6 lg:grid-cols-[320px_minmax(0,1fr)]">
        <div className="flex flex-col gap-6">
          <Label folio={folio} now={now} state={state} />
          <BundlePanel
            target={{ folio: folio.id }}
            isEmpty={folio.items.length === 0}
            mayDownload={folio.may.download}
          />
          {folio.level !== null && (
            <Panel title="Ask for more">
              <AskForMore folio={folio.id} asked={folio.asked} mayDownload={folio.may.download} />
            </Panel>
          )}
        </div>
        <div className="flex min-w-0 flex-col gap-6">
          {folio.may.invite && <AccessRequests folio={folio.id} />}
          <FolioContent folio={folio} editItems={state.editItems} />
          {folio.may.invite && (
            <>
              <FolioReaders folio={folio} revokeGrant={state.revokeGrant} changeGrant={state.changeGrant} now={now} />
              <GuestInvitations folio={folio} now={now} isDemo={isDemo} />
            </>
          )}
        </div>
      </div>
    </div>
  );
}

/** What stands there once the folio is out of sight; nothing of its content stays on the screen. */
function Gone({ folio }: { folio: FolioRecord }) {
  if (folio.level === null)
    return (
      <EmptyState title="This folio is no longer in your sight" action={<ButtonLink href="/folios">Folios</ButtonLink>}>
        It may have been deleted, or your part in its lab may have ended.
      </EmptyState>
    );
  const now = new Date().toISOString();
  const endedAt = folio.expires && folio.expires < now ? folio.expires : now;
  const { id, name, lab, contact, asked } = folio;
  return <AccessEnded folio={{ id, name, lab: lab.name }} endedAt={endedAt} contact={contact} asked={asked} mayAsk />;
}

function Label({ folio, now, state }: { folio: FolioRecord; now: string; state: ReturnType<typeof useFolio> }) {
  const [editing, setEditing] = useState(false);
  const licence = licenceOf(folio.licence);
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
            folio.terms?.acceptedAt
              ? [
                  'Accepted',
                  `${longDay(folio.terms.acceptedAt)}${folio.terms.isCurrent ? '' : `, under ${folio.terms.licence ?? 'an earlier licence'}`}`,
                ]
              : null,
            folio.contact ? ['Ask', folio.contact] : null,
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
      {(folio.may.change || folio.may.delete) && (
        <div className="mt-4 flex gap-2">
          {folio.may.change && <Button onClick={() => setEditing(true)}>Change</Button>}
          {folio.may.delete && (
            <DeleteFolio folio={folio} remove={state.remove} readers={openGrants(folio, now).length} />
          )}
        </div>
      )}
      {editing && <EditFolio folio={folio} change={state.change} onClose={() => setEditing(false)} />}
    </section>
  );
}
