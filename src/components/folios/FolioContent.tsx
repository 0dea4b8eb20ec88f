import { useInfiniteQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { Page } from '../../contracts/common.ts';
import type { ComplexSummary } from '../../contracts/complexes.ts';
import type { FolioRecord } from '../../contracts/sharing.ts';
import { prefixedFormula } from '../complexes/prefixed-formula.ts';
import { BandStrip } from '../marks/BandStrip.tsx';
import { Cuvette } from '../marks/Cuvette.tsx';
import { Formula, OxidationState, PointGroup } from '../notation/index.tsx';
import { Button } from '../ui/Button.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { EmptyState } from '../ui/EmptyState.tsx';
import { getJson } from '../ui/http.ts';
import { Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { queryClient } from '../ui/query-client.ts';
import type { DataColumn } from '../ui/table-csv.ts';
import { AddComplex } from './AddComplex.tsx';
import type { useFolio } from './useFolio.ts';

const AT_ONCE = 200;

function columns(items: FolioRecord['items']): DataColumn<ComplexSummary>[] {
  const chosen = new Map(items.map((item) => [item.accession, item.spectra]));
  return [
    {
      id: 'colour',
      header: 'Colour',
      value: (row) => row.colour,
      cell: ({ colour }) => (
        <Cuvette
          colour={colour}
          title={colour ? `Solution at peak visible absorbance 1: ${colour}` : 'No colour known'}
        />
      ),
    },
    {
      id: 'accession',
      header: 'Accession',
      value: (row) => row.accession,
      cell: ({ accession }) => (
        <a href={`/complexes/${accession}`} className="link num">
          {accession}
        </a>
      ),
    },
    {
      id: 'formula',
      header: 'Formula',
      value: (row) => row.formula,
      cell: (row) => <Formula formula={prefixedFormula(row.formula, row.isomer)} />,
    },
    {
      id: 'metal',
      header: 'Metal',
      value: (row) => row.centres.map(({ element }) => element).join(', '),
      cell: ({ centres: [centre] }) =>
        centre ? <OxidationState element={centre.element} state={centre.oxidationState.value} /> : '–',
    },
    {
      id: 'group',
      header: 'Group',
      value: (row) => row.pointGroup,
      cell: ({ pointGroup }) => (pointGroup ? <PointGroup group={pointGroup} /> : '–'),
    },
    {
      id: 'bands',
      header: 'Bands',
      value: (row) => row.strip.length,
      cell: (row) => <BandStrip bands={row.strip} width={180} />,
    },
    {
      id: 'spectra',
      header: 'Spectra',
      figures: true,
      value: (row) => row.spectra,
      cell: (row) => {
        const some = chosen.get(row.accession);
        return Array.isArray(some) ? `${some.length} of ${row.spectra}` : row.spectra;
      },
    },
  ];
}

interface Props {
  folio: FolioRecord;
  editItems: ReturnType<typeof useFolio>['editItems'];
}

/** The complexes of a folio; those who may change it add and take out. */
export function FolioContent({ folio, editItems }: Props) {
  const list = useInfiniteQuery(
    {
      queryKey: ['folio', folio.id, 'complexes'],
      queryFn: ({ pageParam, signal }) =>
        getJson<Page<ComplexSummary>>(
          `/api/complexes?${new URLSearchParams({ folio: folio.id, sort: 'accession', limit: String(AT_ONCE), ...pageParam })}`,
          signal,
        ),
      initialPageParam: {} as { cursor?: string },
      getNextPageParam: ({ next }) => (next ? { cursor: next } : undefined),
    },
    queryClient,
  );
  const rows = useMemo(() => list.data?.pages.flatMap((page) => page.items) ?? [], [list.data]);
  const shown = useMemo(() => columns(folio.items), [folio.items]);
  const total = list.data?.pages[0]?.total ?? folio.items.length;
  const mayChange = folio.may.change;
  return (
    <Panel title="Content" aside={total === 1 ? '1 complex' : `${total} complexes`}>
      {mayChange && <AddComplex present={folio.items} editItems={editItems} />}
      <Problem problem={editItems.error} />
      <Problem problem={list.error} onRetry={() => void list.refetch()} />
      {list.isPending && <p role="status">Reading the content…</p>}
      {list.data && rows.length === 0 && (
        <EmptyState title="Nothing in it yet">
          {mayChange
            ? 'Add complexes by accession, formula, name or ligand.'
            : 'The lab has not put anything into it, or nothing that you may see.'}
        </EmptyState>
      )}
      {rows.length > 0 && (
        <DataTable
          name="Content"
          columns={shown}
          rows={rows}
          rowId={(row) => row.accession}
          tools={rows.length > 5}
          actions={
            mayChange
              ? (row) => (
                  <Button
                    size="small"
                    kind="quiet"
                    disabled={editItems.isPending}
                    aria-label={`Take ${row.accession} out of the folio`}
                    onClick={() => editItems.mutate({ remove: row.accession })}
                  >
                    Take out
                  </Button>
                )
              : undefined
          }
        />
      )}
      {list.hasNextPage && (
        <div className="mt-3 flex items-center gap-3">
          <Button disabled={list.isFetchingNextPage} onClick={() => void list.fetchNextPage()}>
            Show more
          </Button>
          <span className="text-xs text-ink-soft">
            {rows.length} of {total} are here; filter, order and CSV are of these.
          </span>
        </div>
      )}
    </Panel>
  );
}
