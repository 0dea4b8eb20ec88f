import { Download } from 'lucide-react';
import { Button, buttonClass } from '#src/components/ui/Button.tsx';
import { Chip } from '#src/components/ui/Chip.tsx';
import { ColumnMenu } from '#src/components/ui/ColumnMenu.tsx';
import { EmptyState } from '#src/components/ui/EmptyState.tsx';
import { CONTROL } from '#src/components/ui/Field.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { SortHeader } from '#src/components/ui/SortHeader.tsx';
import { saveText } from '#src/components/ui/save-text.ts';
import { tableCsv } from '#src/components/ui/table-csv.ts';
import { useStoredSetting } from '#src/components/ui/useStoredSetting.ts';
import type { FacetCount, Page } from '#src/contracts/common.ts';
import type { SpectrumSummary } from '#src/contracts/spectra.ts';
import { FLAGS, TECHNIQUES } from '../words.ts';
import { COLUMNS, HIDDEN_AT_FIRST } from './columns.tsx';
import { hasFilter, type ListFilter, narrowed, orderOf, PAGE_SIZE, sortedBy, toggled } from './spectra-query.ts';
import { useSpectra } from './useSpectra.ts';

const WORDS: Partial<Record<ListFilter, Record<string, string>>> = { technique: TECHNIQUES, flag: FLAGS };

/** The spectra in sight: filtered, ordered and turned page by page on the server, the filters in the address. */
export function SpectraList({ first }: { first: { search: string; page: Page<SpectrumSummary> } }) {
  const spectra = useSpectra(first);
  const { query, setQuery, page, isLate } = spectra;
  const [hidden, setHidden] = useStoredSetting('spectra-columns-hidden', HIDDEN_AT_FIRST);
  const shown = COLUMNS.filter(({ id }) => !hidden[id]);
  const facet = (name: ListFilter) => page.facets?.[name] ?? [];
  const csv = () =>
    tableCsv(
      shown.map(({ name, ...column }) => ({ ...column, header: name })),
      page.items,
    );
  const from = query.cursors.length * PAGE_SIZE;
  return (
    <div className="flex flex-col gap-4">
      <div className="specimen flex flex-wrap items-end gap-3 px-4 py-3">
        <input
          type="search"
          aria-label="Search in title, formula, accession, file name and solvent"
          placeholder="Title, formula, solvent, file"
          maxLength={200}
          value={spectra.text}
          onChange={(event) => spectra.setText(event.currentTarget.value)}
          className={`${CONTROL} max-w-64`}
        />
        <FacetSelect
          name="lab"
          label="Lab"
          counts={facet('lab')}
          onPick={(value) => setQuery(toggled(query, 'lab', value))}
        />
        <FacetSelect
          name="technique"
          label="Technique"
          counts={facet('technique')}
          onPick={(value) => setQuery(toggled(query, 'technique', value))}
        />
        <FacetSelect
          name="flag"
          label="Flag"
          counts={facet('flag')}
          onPick={(value) => setQuery(toggled(query, 'flag', value))}
        />
        <div className="ml-auto flex gap-2">
          <ColumnMenu
            columns={COLUMNS.map(({ id, name }) => ({ id, name, isVisible: !hidden[id] }))}
            onToggle={(id, isVisible) => setHidden({ [id]: !isVisible })}
          />
          <button
            type="button"
            className={buttonClass('plain', 'small')}
            disabled={page.items.length === 0}
            onClick={() => saveText('spectra.csv', csv(), 'text/csv;charset=utf-8')}
          >
            <Download aria-hidden="true" size={14} />
            CSV of this page
          </button>
        </div>
        {hasFilter(query) && (
          <div className="flex w-full flex-wrap gap-2 text-xs">
            {(['lab', 'technique', 'flag', 'state'] as const).flatMap((name) =>
              query[name].map((value) => (
                <Chip
                  key={`${name} ${value}`}
                  name={wordOf(name, value, facet(name))}
                  onRemove={() => setQuery(toggled(query, name, value))}
                >
                  {wordOf(name, value, facet(name))}
                </Chip>
              )),
            )}
            <button
              type="button"
              className="link min-h-6"
              onClick={() => {
                spectra.setText('');
                setQuery(narrowed(query, { lab: [], technique: [], flag: [], state: [], q: '' }));
              }}
            >
              Clear all
            </button>
          </div>
        )}
      </div>
      <p role="status" className="text-xs text-ink-soft">
        {page.total === 1 ? '1 spectrum' : `${page.total} spectra`}
      </p>
      <Problem problem={spectra.error} onRetry={spectra.refetch} />
      {page.items.length === 0 ? (
        <EmptyState title={hasFilter(query) ? 'No spectrum fits the filter' : 'No spectrum is in your sight'}>
          {hasFilter(query) ? 'Take a filter away to see more.' : 'Spectra are added on the page of their complex.'}
        </EmptyState>
      ) : (
        // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reachable by the keyboard
        <section aria-label="Table of spectra" tabIndex={0} className="overflow-x-auto border border-hairline bg-glaze">
          <table className="table" aria-busy={isLate}>
            <caption className="sr-only">Spectra, one a row; the title opens the spectrum</caption>
            <thead>
              <tr>
                {shown.map(({ id, name, head, sort, figures }) => (
                  <SortHeader
                    key={id}
                    sorted={sort ? orderOf(query, sort) : null}
                    onSort={sort && (() => setQuery(sortedBy(query, sort)))}
                    className={figures ? 'text-right!' : id === 'colour' ? 'w-9 pr-0!' : ''}
                  >
                    {head ?? name}
                  </SortHeader>
                ))}
              </tr>
            </thead>
            <tbody className={isLate ? 'opacity-60' : ''}>
              {page.items.map((spectrum) => (
                <tr key={spectrum.id} className="relative">
                  {shown.map(({ id, figures, value, cell }) => (
                    <td key={id} className={figures ? 'num text-right!' : id === 'colour' ? 'w-9 pr-0!' : ''}>
                      {cell ? cell(spectrum) : (value(spectrum) ?? '–')}
                    </td>
                  ))}
                </tr>
              ))}
            </tbody>
          </table>
        </section>
      )}
      {(page.next || query.cursors.length > 0) && (
        <nav aria-label="Pages of spectra" className="flex items-center gap-3">
          <Button
            disabled={query.cursors.length === 0}
            onClick={() => setQuery({ ...query, cursors: query.cursors.slice(0, -1) })}
          >
            Earlier
          </Button>
          <span className="text-xs text-ink-soft">
            {from + 1}–{from + page.items.length} of {page.total}
          </span>
          <Button
            disabled={!page.next || isLate}
            onClick={() => page.next && setQuery({ ...query, cursors: [...query.cursors, page.next] })}
          >
            Next
          </Button>
        </nav>
      )}
    </div>
  );
}

const wordOf = (name: ListFilter, value: string, counts: readonly FacetCount[]): string =>
  counts.find((one) => String(one.value) === value)?.label ?? WORDS[name]?.[value] ?? value;

interface FacetSelectProps {
  name: ListFilter;
  label: string;
  counts: readonly FacetCount[];
  onPick: (value: string) => void;
}

/** Choices with how many spectra each would leave; a chosen one is taken away at its chip. */
function FacetSelect({ name, label, counts, onPick }: FacetSelectProps) {
  return (
    <select
      aria-label={`Filter by ${label.toLowerCase()}`}
      value=""
      disabled={counts.length === 0}
      onChange={(event) => event.currentTarget.value && onPick(event.currentTarget.value)}
      className={`${CONTROL} w-auto! max-w-52 pr-8`}
    >
      <option value="">{label}</option>
      {counts.map(({ value, count }) => (
        <option key={value} value={String(value)}>
          {wordOf(name, String(value), counts)}, {count}
        </option>
      ))}
    </select>
  );
}
