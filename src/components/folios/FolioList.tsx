import type { FolioRecord } from '../../contracts/sharing.ts';
import { ButtonLink } from '../ui/Button.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { shortDay } from '../ui/dates.ts';
import { EmptyState } from '../ui/EmptyState.tsx';
import type { DataColumn } from '../ui/table-csv.ts';
import { isUnderEmbargo, openGrants, ownAccess } from './folio-facts.ts';

interface Props {
  folios: FolioRecord[];
  mayMake: boolean;
  /** ISO 8601, by the server's clock. */
  now: string;
}

function columns(mayMake: boolean, now: string): DataColumn<FolioRecord>[] {
  const guests: DataColumn<FolioRecord> = {
    id: 'guests',
    header: 'Guests',
    // Grants are listed for those who give them; others are not told that there are none.
    value: (folio) => (folio.may.invite ? openGrants(folio, now).length : null),
    figures: true,
  };
  return [
    {
      id: 'name',
      header: 'Folio',
      value: (folio) => folio.name,
      cell: (folio) => (
        <a href={`/folios/${folio.id}`} className="link whitespace-normal">
          {folio.name}
        </a>
      ),
    },
    { id: 'lab', header: 'Lab', value: (folio) => folio.lab.name },
    { id: 'licence', header: 'Licence', value: (folio) => folio.licence },
    { id: 'shows', header: 'Bands', value: (folio) => folio.shows },
    { id: 'items', header: 'Complexes', value: (folio) => folio.items.length, figures: true },
    ...(mayMake ? [guests] : []),
    { id: 'access', header: 'You', value: ownAccess },
    {
      id: 'embargo',
      header: 'Embargo',
      value: (folio) => (isUnderEmbargo(folio, now) ? folio.embargoUntil!.slice(0, 10) : null),
      cell: (folio) => (isUnderEmbargo(folio, now) ? `until ${shortDay(folio.embargoUntil!)}` : '–'),
    },
  ];
}

/** Folios in sight. */
export function FolioList({ folios, mayMake, now }: Props) {
  return (
    <>
      <header className="mb-5 flex flex-wrap items-center gap-4">
        <h1 className="text-xl font-semibold">Folios</h1>
        {mayMake && (
          <ButtonLink kind="primary" href="/folios/new" className="ml-auto">
            New folio
          </ButtonLink>
        )}
      </header>
      {folios.length > 0 ? (
        <DataTable name="Folios" columns={columns(mayMake, now)} rows={folios} rowId={(folio) => folio.id} />
      ) : (
        <EmptyState title="No folio">
          {mayMake
            ? 'A folio is a set of complexes and spectra shared as one, under a licence. Make one to share with a partner outside.'
            : 'Nothing is shared with you just now. Access may have ended, or be under embargo; the lab that invited you can tell.'}
        </EmptyState>
      )}
    </>
  );
}
