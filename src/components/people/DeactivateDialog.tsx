import type { PersonDetail, PersonRecord } from '../../contracts/people.ts';
import { Formula } from '../notation/index.tsx';
import { Button } from '../ui/Button.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { Problem } from '../ui/Problem.tsx';
import { countWords } from './draft-words.ts';
import { useChangePerson, usePerson } from './usePeople.ts';

interface Props {
  person: PersonRecord;
  onClose: () => void;
  onDone: (said: string) => void;
}

/** Closing an account: what ends with it, what stays, and which labs would be without a lead. */
export function DeactivateDialog({ person, onClose, onDone }: Props) {
  const seen = usePerson(person.id);
  const change = useChangePerson(person.id, ({ name }) => onDone(`${name} is deactivated.`));
  const detail = seen.data?.data;
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Deactivate ${person.name}`}
      description="The person cannot sign in any more, from the next request on. What they registered keeps their name. The account can be reactivated."
      actions={
        <>
          <Button onClick={onClose}>Keep active</Button>
          <Button
            kind="danger"
            disabled={!detail || change.isPending}
            onClick={() => change.mutate({ patch: { state: 'deactivated' }, shown: seen.data })}
          >
            Deactivate
          </Button>
        </>
      }
    >
      <div className="flex flex-col gap-3">
        {!detail && !seen.error && <p className="text-ink-soft">Looking up what would end …</p>}
        {detail && <Consequences detail={detail} />}
        <Problem problem={change.error ?? seen.error} onRetry={() => void seen.refetch()} />
      </div>
    </Dialog>
  );
}

function Consequences({ detail }: { detail: PersonDetail }) {
  const { tokens, invitations, drafts, labs } = detail;
  const ended = [
    tokens > 0 && countWords(tokens, 'access token'),
    invitations > 0 && countWords(invitations, 'open invitation'),
  ].filter((part) => part !== false);
  const leaderless = labs.filter(({ onlyLead }) => onlyLead);
  return (
    <>
      <p>
        Every session ends.
        {ended.length > 0 && ` Revoked are ${ended.join(' and ')}; they stay so after a reactivation.`}
      </p>
      {leaderless.length > 0 && (
        <p className="font-semibold">
          Nobody else leads {leaderless.map(({ name }) => name).join(' and ')}. Make another member lead there first, or
          soon after.
        </p>
      )}
      {drafts.length === 0 ? (
        <p>The person has no drafts.</p>
      ) : (
        <div>
          <p>Drafts stay in their labs, in the sight of the leads there:</p>
          <ul className="mt-1.5 max-h-48 overflow-y-auto border border-hairline px-3 py-1.5">
            {drafts.map(({ kind, id, name, accession, lab }) => (
              <li key={id} className="py-0.5">
                <a
                  href={kind === 'spectrum' ? `/spectra/${id}` : `/complexes/${accession}`}
                  className="link"
                  target="_blank"
                  rel="noreferrer"
                >
                  <span className="num">{accession}</span> {kind === 'complex' ? <Formula formula={name} /> : name}
                </a>
                <span className="text-ink-soft">
                  , {kind}, {lab.name}
                </span>
              </li>
            ))}
          </ul>
        </div>
      )}
    </>
  );
}
