import { formatNumber } from '#src/components/notation/quantity.ts';
import { Button, ButtonLink } from '#src/components/ui/Button.tsx';
import { ColumnMenu } from '#src/components/ui/ColumnMenu.tsx';
import { EmptyState } from '#src/components/ui/EmptyState.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { useStoredSetting } from '#src/components/ui/useStoredSetting.ts';
import type { Page } from '#src/contracts/common.ts';
import type { ComplexSummary } from '#src/contracts/complexes.ts';
import { ChosenFilters } from './ChosenFilters.tsx';
import { Console } from './Console.tsx';
import { COLUMN_NAMES, HIDDEN_AT_FIRST } from './columns.tsx';
import { DataTable } from './DataTable.tsx';
import { DownloadTable } from './DownloadTable.tsx';
import { MakeBundle } from './MakeBundle.tsx';
import { Pager } from './Pager.tsx';
import { useComplexes } from './useComplexes.ts';
import { hasFilters, sortBy, withoutFilters } from './view.ts';
import type { GeometryNames } from './words.ts';

interface ComplexesTableProps {
  /** The address the page was asked for, and its rows with the facets. */
  first: { search: string; page: Page<ComplexSummary> };
  /** Complexes in sight without any filter. */
  all: number;
  geometryNames: GeometryNames;
  labNames: Record<string, string>;
  /** Registering is for members; taking files away for them and for guests granted it. */
  may: { register: boolean; download: boolean };
}

/** The table of complexes with everything one can filter it by. */
export function ComplexesTable({ first, all, geometryNames, labNames, may }: ComplexesTableProps) {
  const { view, setView, page, facets, isLate, problem, retry } = useComplexes(first);
  const [looks, setLooks] = useStoredSetting('complexes', { columns: {} as Record<string, boolean>, compact: false });
  const visibility: Record<string, boolean> = { ...HIDDEN_AT_FIRST, ...looks.columns };
  const columns = Object.entries(COLUMN_NAMES)
    .filter(([id]) => id !== 'accession')
    .map(([id, name]) => ({ id, name, isVisible: visibility[id] ?? true }));
  return (
    <div className="flex flex-col gap-3.5">
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <h1 className="text-xl">Complexes</h1>
        <p role="status" className="text-ink-soft">
          {page.total === all
            ? `${formatNumber(all)} in all`
            : `${formatNumber(page.total)} of ${formatNumber(Math.max(all, page.total))} shown`}
        </p>
        <div className="ml-auto flex flex-wrap gap-2">
          {may.download && (
            <>
              <DownloadTable view={view} names={geometryNames} />
              <MakeBundle view={view} total={page.total} />
            </>
          )}
          {may.register && (
            <ButtonLink kind="primary" href="/complexes/new">
              Register a complex
            </ButtonLink>
          )}
        </div>
      </div>
      <Console
        view={view}
        facets={facets}
        names={geometryNames}
        onChange={setView}
        aside={
          <ColumnMenu
            columns={columns}
            onToggle={(id, isVisible) => setLooks({ columns: { ...looks.columns, [id]: isVisible } })}
            compact={{ value: looks.compact, onChange: (compact) => setLooks({ compact }) }}
          />
        }
      />
      <ChosenFilters view={view} names={geometryNames} labNames={labNames} onChange={setView} />
      <Problem problem={problem} onRetry={retry} />
      {page.items.length > 0 ? (
        <DataTable
          rows={page.items}
          names={geometryNames}
          sort={view.sort}
          onSort={(column) => setView(sortBy(view, column))}
          columnVisibility={visibility}
          isCompact={looks.compact}
          isLate={isLate}
        />
      ) : (
        !problem &&
        !isLate && (
          <Nothing view={view} all={all} may={may} onChange={setView} pageIsPast={page.total > 0 || view.page > 1} />
        )
      )}
      <Pager view={view} total={page.total} onTurn={setView} />
    </div>
  );
}

/** Why there are no rows, and what to do about it. */
function Nothing({
  view,
  all,
  may,
  onChange,
  pageIsPast,
}: {
  view: Parameters<typeof hasFilters>[0];
  all: number;
  may: { register: boolean };
  onChange: (view: Parameters<typeof hasFilters>[0]) => void;
  pageIsPast: boolean;
}) {
  if (pageIsPast && view.page > 1)
    return (
      <EmptyState
        title="The list ends before this page"
        action={<Button onClick={() => onChange({ ...view, page: 1 })}>First page</Button>}
      />
    );
  if (hasFilters(view))
    return (
      <EmptyState
        title="No complex matches all of this"
        action={<Button onClick={() => onChange(withoutFilters(view))}>Clear all filters</Button>}
      >
        Take a filter away, or widen the band window. The counts beside each choice tell what it would leave.
      </EmptyState>
    );
  if (may.register && all === 0)
    return (
      <EmptyState
        title="There are no complexes yet"
        action={
          <ButtonLink kind="primary" href="/complexes/new">
            Register a complex
          </ButtonLink>
        }
      >
        Type a formula as you would write it; the program reads metal, oxidation state, d-count and isomers from it.
      </EmptyState>
    );
  return (
    <EmptyState title="Nothing is shared with you at present">
      What you see here comes from folios shared with you. Ask the lab that invited you; access may have ended.
    </EmptyState>
  );
}
