import type { AskedForMore } from '../../contracts/grants.ts';
import { ButtonLink } from '../ui/Button.tsx';
import { longDay } from '../ui/dates.ts';
import { AskForMore } from './AskForMore.tsx';

interface Props {
  folio: { id: string; name: string; lab: string };
  /** When it ended, ISO 8601. */
  endedAt: string;
  /** A lead of the lab, or null while nobody leads it. */
  contact: string | null;
  /** Whether a request can be sent from here. */
  mayAsk: boolean;
  asked?: readonly AskedForMore[];
}

/** Stands in place of a folio, or of something in one, that was open to this reader and is no more. */
export function AccessEnded({ folio, endedAt, contact, mayAsk, asked = [] }: Props) {
  return (
    <section className="specimen mx-auto max-w-xl px-6 pt-5 pb-6" aria-labelledby="access-ended">
      <h1 id="access-ended" className="text-lg font-semibold">
        Your access ended
      </h1>
      <p className="mt-2">
        Your access to “{folio.name}” ended on {longDay(endedAt)}.{' '}
        {contact ? `${contact}, ${folio.lab}, can renew it.` : `${folio.lab} can renew it.`}
      </p>
      <p className="mt-2 text-ink-soft">What you downloaded stays yours to use under the licence that it came with.</p>
      {mayAsk && (
        <div className="mt-5 border-t border-hairline pt-4">
          <AskForMore folio={folio.id} asked={asked} mayDownload={false} hasEnded />
        </div>
      )}
      <p className="mt-5">
        <ButtonLink href="/">Day sheet</ButtonLink>
      </p>
    </section>
  );
}
