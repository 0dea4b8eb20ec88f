import { useState } from 'react';
import { minute } from '#src/components/ui/dates.ts';
import { Panel } from '#src/components/ui/Panel.tsx';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import { historyText } from './specimen.ts';

const AT_FIRST = 6;

/** What happened to the record, the latest first. */
export function HistoryPanel({ history }: { history: ComplexRecord['history'] }) {
  const [showsAll, setShowsAll] = useState(false);
  const shown = showsAll ? history : history.slice(0, AT_FIRST);
  return (
    <Panel title="History">
      {history.length === 0 && <p className="text-ink-soft">Nothing is recorded.</p>}
      <ol className="flex flex-col gap-1.5">
        {shown.map((entry, i) => (
          <li key={`${entry.at} ${i}`} className="flex flex-wrap gap-x-3">
            <time dateTime={entry.at} className="w-40 flex-none text-xs leading-[21px] text-ink-soft">
              {minute(entry.at)}
            </time>
            <span className="min-w-0 break-words">
              {historyText(entry)}
              {entry.who && <span className="text-ink-soft">, {entry.who}</span>}
            </span>
          </li>
        ))}
      </ol>
      {shown.length < history.length && (
        <button type="button" className="link mt-2 min-h-6 text-xs" onClick={() => setShowsAll(true)}>
          Show all {history.length}
        </button>
      )}
    </Panel>
  );
}
