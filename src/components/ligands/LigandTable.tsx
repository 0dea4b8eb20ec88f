import { Formula } from '../notation/index.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import type { DataColumn } from '../ui/table-csv.ts';
import { chargeText, donorText, type LigandRow } from './ligand-row.ts';

const COLUMNS: readonly DataColumn<LigandRow>[] = [
  {
    id: 'abbreviation',
    header: 'Abbreviation',
    value: ({ abbreviation }) => abbreviation,
    cell: ({ abbreviation }) => <Formula formula={abbreviation} className="font-medium" />,
  },
  {
    id: 'name',
    header: 'Name',
    value: ({ name }) => name,
    cell: ({ name }) => <span className="block max-w-60 whitespace-normal">{name}</span>,
  },
  {
    id: 'synonyms',
    header: 'Also read as',
    value: ({ synonyms }) => synonyms.join(', ') || null,
    cell: ({ synonyms }) => <span className="block max-w-60 whitespace-normal">{synonyms.join(', ') || '–'}</span>,
  },
  {
    id: 'charge',
    header: 'Charge',
    value: ({ charge }) => charge,
    cell: ({ charge }) => chargeText(charge),
    figures: true,
  },
  {
    id: 'donors',
    header: 'Donors',
    value: (row) => donorText(row),
    cell: (row) => <Formula formula={donorText(row)} />,
  },
  { id: 'denticity', header: 'Denticity', value: ({ denticity }) => denticity, figures: true },
  { id: 'pi', header: 'π character', value: ({ piCharacter }) => piCharacter },
  { id: 'f', header: 'Field factor f', value: ({ f }) => f, figures: true },
  { id: 'opticalPi', header: 'χ(opt), π', value: ({ opticalPi }) => opticalPi, figures: true },
  { id: 'opticalSigma', header: 'χ(opt), σ', value: ({ opticalSigma }) => opticalSigma, figures: true },
  {
    id: 'source',
    header: 'Source',
    value: ({ source }) => source,
    cell: ({ source }) => (
      <span className="line-clamp-2 min-w-56 max-w-72 text-xs whitespace-normal" title={source ?? undefined}>
        {source ?? '–'}
      </span>
    ),
  },
];

/** The ligand library: what the reader of formulae knows by abbreviation. */
export function LigandTable({ rows }: { rows: LigandRow[] }) {
  return (
    <DataTable
      name="Ligands"
      columns={COLUMNS}
      rows={rows}
      rowId={(row) => row.abbreviation}
      sort="abbreviation"
      compact
    />
  );
}
