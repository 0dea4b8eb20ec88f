import type { FolioRecord } from '../../contracts/sharing.ts';
import { Button } from '../ui/Button.tsx';
import { longDay } from '../ui/dates.ts';
import { Problem } from '../ui/Problem.tsx';
import { LicenceTerms } from './LicenceTerms.tsx';
import { licenceOf } from './licences.ts';
import type { useFolio } from './useFolio.ts';

interface Props {
  folio: FolioRecord;
  acceptTerms: ReturnType<typeof useFolio>['acceptTerms'];
}

/** Asks a guest to accept the licence where it is not the one accepted before. Reading goes on meanwhile. */
export function TermsBanner({ folio, acceptTerms }: Props) {
  const { terms } = folio;
  if (!terms || terms.isCurrent) return null;
  return (
    <section aria-label="Terms" className="border border-hairline bg-zaffre-wash px-4 py-3">
      <p>
        <b className="font-semibold text-zaffre">
          {terms.licence ? 'The licence of this folio changed.' : 'The terms of this folio.'}
        </b>{' '}
        {terms.licence && terms.acceptedAt && (
          <>
            You accepted {licenceOf(terms.licence)?.label ?? terms.licence} on {longDay(terms.acceptedAt)}; what you
            downloaded until then keeps that one.{' '}
          </>
        )}
        You may read on while you decide.
      </p>
      <div className="mt-2">
        <LicenceTerms licence={folio.licence} until={folio.expires} />
      </div>
      <div className="mt-3 flex flex-col gap-3">
        <Problem problem={acceptTerms.error} />
        <Button
          kind="primary"
          className="self-start"
          disabled={acceptTerms.isPending}
          onClick={() => acceptTerms.mutate(folio.licence)}
        >
          Accept {folio.licence}
        </Button>
      </div>
    </section>
  );
}
