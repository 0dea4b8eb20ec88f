import type { Page } from '../../contracts/common.ts';
import type { AccessLogRow } from '../../contracts/oversight.ts';
import { formatNumber } from '../notation/quantity.ts';
import { Chip } from '../ui/Chip.tsx';
import { minute } from '../ui/dates.ts';
import { EmptyState } from '../ui/EmptyState.tsx';
import { CONTROL } from '../ui/Field.tsx';
import { Problem } from '../ui/Problem.tsx';
import { Segmented } from '../ui/Segmented.tsx';
import {
  ACCESS_PAGE,
  type AccessView,
  accessAddress,
  accessFrom,
  accessRequest,
  hasAccessFilter,
  narrowedAccess,
} from './access-query.ts';
import { Days } from './Choose.tsx';
import { Pages } from './Pages.tsx';
import { SubjectName } from './SubjectName.tsx';
import { useViewedList } from './useViewedList.ts';
import { KINDS } from './words.ts';

const HOW = { from: accessFrom, requestOf: accessRequest, addressOf: accessAddress };
const KIND_CHOICES = [
  { value: 'all', label: 'All' },
  { value: 'look', label: 'Looked' },
  { value: 'download', label: 'Downloaded' },
] as const;
const RECORDS = ['complex', 'spectrum', 'folio', 'bundle', 'table'] as const;

interface Props {
  first: { search: string; page: Page<AccessLogRow> };
  /** Whether all labs are told of, or the reader's own. */
  ofAll: boolean;
}

/** Who looked at single records and who took files away, one row a person, record and day. */
export function AccessLog({ first, ofAll }: Props) {
  const list = useViewedList<AccessView, AccessLogRow>('access-log', first, HOW);
  const { view, setView, page, isLate } = list;
  const one = view.folio || view.complex || view.spectrum;
  return (
    <div className="flex flex-col gap-4">
      <p className="max-w-3xl text-ink-soft">
        Single records that were opened and files that were taken away, {ofAll ? 'of all labs' : 'of the labs you lead'}
        , by day (UTC). Lists are not counted. Guests agree to it with the terms of their folio.
      </p>
      <div className="flex flex-wrap items-center gap-3 border border-hairline bg-glaze px-4 py-3">
        <input
          type="search"
          aria-label="Search for a person by name or address"
          placeholder="Person"
          maxLength={200}
          value={list.text}
          onChange={(event) => list.setText(event.currentTarget.value)}
          className={`${CONTROL} max-w-56`}
        />
        <Segmented
          label="What was done"
          options={KIND_CHOICES}
          value={view.kind || 'all'}
          onChange={(kind) => setView(narrowedAccess(view, { kind: kind === 'all' ? '' : kind }))}
        />
        <select
          aria-label="Filter by kind of record"
          value={view.subjectType[0] ?? ''}
          onChange={(event) =>
            setView(narrowedAccess(view, { subjectType: event.currentTarget.value ? [event.currentTarget.value] : [] }))
          }
          className={`${CONTROL} w-auto! pr-8`}
        >
          <option value="">All kinds of record</option>
          {RECORDS.map((type) => (
            <option key={type} value={type}>
              {KINDS[type]}
            </option>
          ))}
        </select>
        <Days from={view.from} to={view.to} onChange={(part) => setView(narrowedAccess(view, part))} />
        {one && (
          <Chip
            name="the one record"
            onRemove={() => setView(narrowedAccess(view, { folio: '', complex: '', spectrum: '' }))}
          >
            {view.folio ? 'one folio and its bundles' : 'one record'}
          </Chip>
        )}
        {view.account && (
          <Chip name="the one person" onRemove={() => setView(narrowedAccess(view, { account: '' }))}>
            one person
          </Chip>
        )}
      </div>
      <p role="status" className="text-xs text-ink-soft">
        {page.total === 1 ? '1 row' : `${formatNumber(page.total, 12)} rows`}
      </p>
      <Problem problem={list.error} onRetry={list.refetch} />
      {page.items.length === 0 ? (
        <EmptyState title={hasAccessFilter(view) ? 'No row fits the filter' : 'Nobody has looked yet'} />
      ) : (
        // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reachable by the keyboard
        <section aria-label="Who looked" tabIndex={0} className="overflow-x-auto border border-hairline bg-glaze">
          <table className="table table-compact" aria-busy={isLate}>
            <caption className="sr-only">Who looked and who downloaded, the latest first</caption>
            <thead>
              <tr>
                {['Last that day', 'Who', 'Address', 'Did', 'Record', 'Kind'].map((head) => (
                  <th key={head} scope="col">
                    {head}
                  </th>
                ))}
                <th scope="col" className="text-right!">
                  Times
                </th>
              </tr>
            </thead>
            <tbody className={isLate ? 'opacity-60' : ''}>
              {page.items.map((row) => (
                <tr key={`${row.account.id} ${row.kind} ${row.subject.type} ${row.subject.id} ${row.day}`}>
                  <td>
                    <time dateTime={row.lastAt}>{minute(row.lastAt)}</time>
                  </td>
                  <td>{row.account.name}</td>
                  <td className="text-ink-soft">{row.account.email}</td>
                  <td>{row.kind === 'look' ? 'looked' : 'downloaded'}</td>
                  <td>
                    <SubjectLink row={row} />
                  </td>
                  <td>{KINDS[row.subject.type] ?? row.subject.type}</td>
                  <td className="num text-right!">{row.count}</td>
                </tr>
              ))}
            </tbody>
          </table>
        </section>
      )}
      <Pages
        name="who looked"
        before={view.cursors.length * ACCESS_PAGE}
        shown={page.items.length}
        total={page.total}
        hasNext={page.next !== null}
        isLate={isLate}
        onEarlier={() => setView({ ...view, cursors: view.cursors.slice(0, -1) })}
        onNext={() => page.next && setView({ ...view, cursors: [...view.cursors, page.next] })}
      />
    </div>
  );
}

function SubjectLink({ row: { subject } }: { row: AccessLogRow }) {
  const name = subject.label ?? (subject.type === 'table' ? `the ${subject.id}` : 'deleted since');
  if (!subject.href) return <span className="block max-w-80 truncate">{name}</span>;
  return (
    <a href={subject.href} className="link block max-w-80 truncate" title={name}>
      <SubjectName type={subject.type} name={name} />
    </a>
  );
}
