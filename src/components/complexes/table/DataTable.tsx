import { useTable } from '@tanstack/react-table';
import { useMemo } from 'react';
import { SortHeader } from '#src/components/ui/SortHeader.tsx';
import type { ComplexSummary } from '#src/contracts/complexes.ts';
import { complexColumns, features, SORTABLE } from './columns.tsx';
import type { GeometryNames } from './words.ts';

interface DataTableProps {
  rows: ComplexSummary[];
  names: GeometryNames;
  /** `-updated`: a column, with a minus where it falls. */
  sort: string;
  onSort: (column: string) => void;
  columnVisibility: Record<string, boolean>;
  isCompact: boolean;
  isLate: boolean;
}

/** The rows. Order, filter and page are the server's; only the choice of columns is made here. */
export function DataTable({ rows, names, sort, onSort, columnVisibility, isCompact, isLate }: DataTableProps) {
  const columns = useMemo(() => complexColumns(names), [names]);
  const sorting = useMemo(() => [{ id: sort.replace(/^-/, ''), desc: sort.startsWith('-') }], [sort]);
  const table = useTable({
    features,
    columns,
    data: rows,
    getRowId: (row) => row.accession,
    manualSorting: true,
    state: { sorting, columnVisibility },
  });
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reachable by the keyboard
    <section aria-label="Table of complexes" tabIndex={0} className="overflow-x-auto border border-hairline bg-glaze">
      <table className={`table ${isCompact ? 'table-compact' : ''}`} aria-busy={isLate}>
        <caption className="sr-only">Complexes, one a row; the accession opens the complex</caption>
        <thead>
          {table.getHeaderGroups().map((group) => (
            <tr key={group.id}>
              {group.headers.map((header) => {
                const { id } = header.column;
                const sorted = header.column.getIsSorted();
                return (
                  <SortHeader
                    key={header.id}
                    sorted={sorted ? (sorted === 'desc' ? 'falling' : 'rising') : null}
                    onSort={SORTABLE.has(id) ? () => onSort(id) : undefined}
                    className={id === 'cuvette' ? 'w-9 pr-0!' : ''}
                  >
                    <table.FlexRender header={header} />
                  </SortHeader>
                );
              })}
            </tr>
          ))}
        </thead>
        <tbody className={isLate ? 'opacity-60' : ''}>
          {table.getRowModel().rows.map((row) => (
            <tr key={row.id} className="relative">
              {row.getVisibleCells().map((cell) => (
                <td key={cell.id} className={cell.column.id === 'cuvette' ? 'w-9 pr-0!' : ''}>
                  <table.FlexRender cell={cell} />
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}
