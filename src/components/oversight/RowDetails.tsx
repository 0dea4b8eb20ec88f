import { useQuery } from '@tanstack/react-query';
import type { TrailEntryRecord, TrailRow } from '../../contracts/oversight.ts';
import { Dialog } from '../ui/Dialog.tsx';
import { minute } from '../ui/dates.ts';
import { getJson } from '../ui/http.ts';
import { Facts } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { queryClient } from '../ui/query-client.ts';
import { SubjectName } from './SubjectName.tsx';
import { changesOf, deedWords, fieldWords, subjectWords, valueWords } from './words.ts';

/** One row of the trail in full: who, when, by what, and what it changed. */
export function RowDetails({ row, onClose }: { row: TrailRow; onClose: () => void }) {
  const { data, error, refetch } = useQuery(
    {
      queryKey: ['trail-row', row.seq],
      queryFn: ({ signal }) => getJson<TrailEntryRecord>(`/api/trail/${row.seq}`, signal),
    },
    queryClient,
  );
  const { subject } = row;
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      width="wide"
      title={
        <>
          {row.actor?.name ?? 'The program'} {deedWords(row)}{' '}
          <SubjectName type={subject.type} name={subjectWords(row)} />
        </>
      }
    >
      <Facts
        facts={[
          ['Row', <span className="num">{row.seq}</span>],
          ['When', minute(row.at)],
          ['Who', row.actor ? `${row.actor.name}, ${row.actor.email}` : 'the program itself'],
          row.token ? ['By access token', row.token.name] : null,
          subject.href
            ? [
                'Record',
                <a href={subject.href} className="link">
                  <SubjectName type={subject.type} name={subjectWords(row)} />
                </a>,
              ]
            : null,
          ['Hash', <code className="num text-xs break-all">{row.hash}</code>],
        ]}
      />
      <Problem problem={error} onRetry={() => void refetch()} />
      {data && <Changes entry={data} />}
    </Dialog>
  );
}

function Changes({ entry }: { entry: TrailEntryRecord }) {
  const changes = changesOf(entry.detail, entry.before);
  if (changes.length === 0) return <p className="mt-4 text-ink-soft">The row tells nothing more.</p>;
  const hasBefore = changes.some(({ before }) => before !== undefined);
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reachable by the keyboard
    <section aria-label="What the row tells" tabIndex={0} className="mt-4 overflow-x-auto border border-hairline">
      <table className="table table-compact">
        <thead>
          <tr>
            <th scope="col">Field</th>
            {hasBefore && <th scope="col">Before</th>}
            <th scope="col">{hasBefore ? 'After' : 'Value'}</th>
          </tr>
        </thead>
        <tbody>
          {changes.map(({ name, before, after }) => (
            <tr key={name}>
              <th scope="row" className="align-top!">
                {fieldWords(name)}
              </th>
              {hasBefore && (
                <td className="align-top whitespace-pre-wrap! text-ink-soft">
                  {before === undefined ? '–' : valueWords(before)}
                </td>
              )}
              <td className="align-top break-words whitespace-pre-wrap!">{valueWords(after)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}
