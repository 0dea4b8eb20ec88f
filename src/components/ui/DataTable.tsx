import {
  columnFilteringFeature,
  columnVisibilityFeature,
  createFilteredRowModel,
  createSortedRowModel,
  filterFn_includesString,
  globalFilteringFeature,
  rowSortingFeature,
  sortFn_alphanumeric,
  tableFeatures,
  useTable,
} from '@tanstack/react-table';
import { ArrowDown, ArrowUp } from 'lucide-react';
import { type ReactNode, useMemo } from 'react';
import { TableTools } from './TableTools.tsx';
import { type DataColumn, tableCsv } from './table-csv.ts';

const features = tableFeatures({
  rowSortingFeature,
  columnFilteringFeature,
  globalFilteringFeature,
  columnVisibilityFeature,
  sortedRowModel: createSortedRowModel(),
  filteredRowModel: createFilteredRowModel(),
  sortFns: { alphanumeric: sortFn_alphanumeric },
  filterFns: { includesString: filterFn_includesString },
});

interface DataTableProps<T> {
  /** Says what the rows are; the name of the scroll region and of the file. */
  name: string;
  columns: readonly DataColumn<T>[];
  rows: readonly T[];
  rowId: (row: T) => string;
  /** Column to sort by at first, with `-` before it for falling. */
  sort?: string;
  /** Buttons at the end of each row. */
  actions?: (row: T) => ReactNode;
  /** Left out for tables of a few rows. */
  tools?: boolean;
  compact?: boolean;
}

/** Rows that are all here: sorted, filtered and narrowed in the browser, and taken away as CSV. */
export function DataTable<T>(props: DataTableProps<T>) {
  const { name, columns, rows, rowId, sort = '', actions, tools = true, compact = false } = props;
  const definitions = useMemo(
    () =>
      columns.map((column) => ({
        id: column.id,
        header: column.header,
        accessorFn: (row: T) => column.value(row) ?? undefined,
        sortUndefined: 'last' as const,
        sortFn: 'alphanumeric' as const,
      })),
    [columns],
  );
  const data = useMemo(() => [...rows], [rows]);
  const table = useTable({
    features,
    columns: definitions,
    data: data as object[] as never[],
    getRowId: (row: never) => rowId(row as T),
    globalFilterFn: 'includesString',
    getColumnCanGlobalFilter: () => true,
    initialState: { sorting: sort ? [{ id: sort.replace(/^-/, ''), desc: sort.startsWith('-') }] : [] },
  });
  const byId = new Map(columns.map((column) => [column.id, column]));
  const shown = table.getVisibleLeafColumns().map(({ id }) => byId.get(id)!);
  const visibleRows = table.getRowModel().rows;
  const right = (id: string) => (byId.get(id)?.figures ? 'text-right!' : '');
  return (
    <div>
      {tools && (
        <TableTools
          name={name}
          filter={String(table.state.globalFilter ?? '')}
          onFilter={(text) => table.setGlobalFilter(text)}
          count={visibleRows.length}
          total={rows.length}
          columns={table.getAllLeafColumns().map((column) => ({
            id: column.id,
            label: byId.get(column.id)!.header,
            visible: column.getIsVisible(),
            toggle: () => column.toggleVisibility(),
          }))}
          csv={() =>
            tableCsv(
              shown,
              visibleRows.map((row) => row.original as T),
            )
          }
        />
      )}
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard */}
      <section aria-label={name} tabIndex={0} className="relative overflow-x-auto border border-hairline">
        <table className={`table ${compact ? 'table-compact' : ''}`}>
          <thead>
            <tr>
              {table.getHeaderGroups()[0]?.headers.map(({ id, column }) => {
                const order = column.getIsSorted();
                const Arrow = order === 'desc' ? ArrowDown : ArrowUp;
                return (
                  <th
                    key={id}
                    scope="col"
                    aria-sort={order ? (order === 'desc' ? 'descending' : 'ascending') : undefined}
                    className={right(column.id)}
                  >
                    <button
                      type="button"
                      onClick={column.getToggleSortingHandler()}
                      className={`inline-flex min-h-6 items-center gap-1 hover:text-ink ${byId.get(column.id)!.figures ? 'flex-row-reverse' : ''}`}
                    >
                      {byId.get(column.id)!.header}
                      <Arrow aria-hidden="true" size={12} className={order ? '' : 'invisible'} />
                    </button>
                  </th>
                );
              })}
              {actions && (
                <th scope="col">
                  <span className="sr-only">Actions</span>
                </th>
              )}
            </tr>
          </thead>
          <tbody>
            {visibleRows.map((row) => (
              <tr key={row.id}>
                {shown.map((column) => (
                  <td key={column.id} className={`${right(column.id)} ${column.figures ? 'num' : ''}`}>
                    {column.cell ? column.cell(row.original as T) : (column.value(row.original as T) ?? '–')}
                  </td>
                ))}
                {actions && <td className="sticky right-0 bg-glaze text-right!">{actions(row.original as T)}</td>}
              </tr>
            ))}
            {visibleRows.length === 0 && (
              <tr>
                <td colSpan={shown.length + (actions ? 1 : 0)} className="text-ink-soft">
                  No row fits the filter.
                </td>
              </tr>
            )}
          </tbody>
        </table>
      </section>
    </div>
  );
}
