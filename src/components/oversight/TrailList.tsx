import { Download } from 'lucide-react';
import { useState } from 'react';
import type { Page } from '../../contracts/common.ts';
import type { TrailRow } from '../../contracts/oversight.ts';
import { formatNumber } from '../notation/quantity.ts';
import { ButtonLink } from '../ui/Button.tsx';
import { Chip } from '../ui/Chip.tsx';
import { ColumnMenu } from '../ui/ColumnMenu.tsx';
import { EmptyState } from '../ui/EmptyState.tsx';
import { CONTROL } from '../ui/Field.tsx';
import { Problem } from '../ui/Problem.tsx';
import { SortHeader } from '../ui/SortHeader.tsx';
import { useStoredSetting } from '../ui/useStoredSetting.ts';
import { ChainVerdict } from './ChainVerdict.tsx';
import { Choose, Days } from './Choose.tsx';
import { Pages } from './Pages.tsx';
import { RowDetails } from './RowDetails.tsx';
import { HIDDEN_AT_FIRST, TRAIL_COLUMNS } from './trail-columns.tsx';
import {
  addressOf,
  exportOf,
  hasFilter,
  narrowed,
  PAGE_SIZE,
  requestOf,
  type TrailView,
  toggled,
  viewFrom,
} from './trail-query.ts';
import { useViewedList } from './useViewedList.ts';
import { actionWords, KINDS } from './words.ts';

const HOW = { from: viewFrom, requestOf, addressOf };

/** Who did what when, filtered, ordered and turned page by page on the server. */
export function TrailList({ first }: { first: { search: string; page: Page<TrailRow> } }) {
  const list = useViewedList<TrailView, TrailRow>('trail', first, HOW);
  const { view, setView, page, isLate } = list;
  const [hidden, setHidden] = useStoredSetting('trail-columns-hidden', HIDDEN_AT_FIRST);
  const [chosen, setChosen] = useState<TrailRow | null>(null);
  const shown = TRAIL_COLUMNS.filter(({ id }) => !hidden[id]);
  const kindWords = (type: string) => KINDS[type] ?? type;
  return (
    <>
      <ChainVerdict />
      <div className="flex flex-col gap-4">
        <div className="flex flex-wrap items-center gap-3 border border-hairline bg-glaze px-4 py-3">
          <input
            type="search"
            aria-label="Search in records, people, actions and details, or for a hash"
            placeholder="Record, person, detail, hash"
            maxLength={200}
            value={list.text}
            onChange={(event) => list.setText(event.currentTarget.value)}
            className={`${CONTROL} max-w-64`}
          />
          <Choose
            label="Action"
            choices={page.facets?.action ?? []}
            nameOf={actionWords}
            onPick={(value) => setView(toggled(view, 'action', value))}
          />
          <Choose
            label="Kind of record"
            choices={page.facets?.subjectType ?? []}
            nameOf={kindWords}
            onPick={(value) => setView(toggled(view, 'subjectType', value))}
          />
          <Days from={view.from} to={view.to} onChange={(part) => setView(narrowed(view, part))} />
          <div className="ml-auto flex gap-2">
            <ColumnMenu
              columns={TRAIL_COLUMNS.map(({ id, name }) => ({ id, name, isVisible: !hidden[id] }))}
              onToggle={(id, isVisible) => setHidden({ [id]: !isVisible })}
            />
            <ButtonLink size="small" href={exportOf(view, 'csv')} download>
              <Download aria-hidden="true" size={14} />
              CSV
            </ButtonLink>
            <ButtonLink size="small" href={exportOf(view, 'jsonl')} download>
              <Download aria-hidden="true" size={14} />
              JSON lines
            </ButtonLink>
          </div>
          {hasFilter(view) && <ChosenFilters view={view} onChange={setView} clearText={() => list.setText('')} />}
        </div>
        <p role="status" className="text-xs text-ink-soft">
          {page.total === 1 ? '1 row' : `${formatNumber(page.total, 12)} rows`}
        </p>
        <Problem problem={list.error} onRetry={list.refetch} />
        {page.items.length === 0 ? (
          <EmptyState title={hasFilter(view) ? 'No row fits the filter' : 'Nothing has happened yet'}>
            {hasFilter(view) &&
              'Take a filter away to see more. A hash that was kept and is not found means that the trail was changed.'}
          </EmptyState>
        ) : (
          // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reachable by the keyboard
          <section aria-label="Trail" tabIndex={0} className="overflow-x-auto border border-hairline bg-glaze">
            <table className="table table-compact" aria-busy={isLate}>
              <caption className="sr-only">The trail; what was done opens the details of its row</caption>
              <thead>
                <tr>
                  {shown.map(({ id, name, sorts, figures }) => (
                    <SortHeader
                      key={id}
                      sorted={sorts ? (view.sort === 'seq' ? 'rising' : 'falling') : null}
                      onSort={
                        sorts
                          ? () => setView(narrowed(view, { sort: view.sort === 'seq' ? '-seq' : 'seq' }))
                          : undefined
                      }
                      className={figures ? 'text-right!' : ''}
                    >
                      {name}
                    </SortHeader>
                  ))}
                </tr>
              </thead>
              <tbody className={isLate ? 'opacity-60' : ''}>
                {page.items.map((row) => (
                  <tr key={row.seq}>
                    {shown.map(({ id, figures, cell }) => (
                      <td key={id} className={figures ? 'num text-right!' : ''}>
                        {cell(row, () => setChosen(row))}
                      </td>
                    ))}
                  </tr>
                ))}
              </tbody>
            </table>
          </section>
        )}
        <Pages
          name="the trail"
          before={view.cursors.length * PAGE_SIZE}
          shown={page.items.length}
          total={page.total}
          hasNext={page.next !== null}
          isLate={isLate}
          onEarlier={() => setView({ ...view, cursors: view.cursors.slice(0, -1) })}
          onNext={() => page.next && setView({ ...view, cursors: [...view.cursors, page.next] })}
        />
      </div>
      {chosen && <RowDetails row={chosen} onClose={() => setChosen(null)} />}
    </>
  );
}

interface ChosenFiltersProps {
  view: TrailView;
  onChange: (view: TrailView) => void;
  clearText: () => void;
}

function ChosenFilters({ view, onChange, clearText }: ChosenFiltersProps) {
  return (
    <div className="flex w-full flex-wrap items-center gap-2 text-xs">
      {view.action.map((value) => (
        <Chip
          key={`action ${value}`}
          name={`the action ${actionWords(value)}`}
          onRemove={() => onChange(toggled(view, 'action', value))}
        >
          {actionWords(value)}
        </Chip>
      ))}
      {view.subjectType.map((value) => (
        <Chip
          key={`kind ${value}`}
          name={`the kind ${KINDS[value] ?? value}`}
          onRemove={() => onChange(toggled(view, 'subjectType', value))}
        >
          {KINDS[value] ?? value}
        </Chip>
      ))}
      {view.subject && (
        <Chip name="the one record" onRemove={() => onChange(narrowed(view, { subject: '' }))}>
          one record
        </Chip>
      )}
      {view.actor && (
        <Chip name="the one person" onRemove={() => onChange(narrowed(view, { actor: '' }))}>
          {view.actor === 'program' ? 'by the program' : 'one person'}
        </Chip>
      )}
      <button
        type="button"
        className="link min-h-6"
        onClick={() => {
          clearText();
          onChange({ ...viewFrom(''), sort: view.sort });
        }}
      >
        Clear all
      </button>
    </div>
  );
}
