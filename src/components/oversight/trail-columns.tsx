import type { ReactNode } from 'react';
import type { TrailRow } from '../../contracts/oversight.ts';
import { minute } from '../ui/dates.ts';
import { SubjectName } from './SubjectName.tsx';
import { deedWords, KINDS, subjectWords } from './words.ts';

/** A column of the trail. */
export interface TrailColumn {
  id: string;
  name: string;
  /** The order on the server that a click asks for. */
  sorts?: boolean;
  figures?: boolean;
  cell: (row: TrailRow, open: () => void) => ReactNode;
}

/** Columns for who asks for them. */
export const HIDDEN_AT_FIRST: Record<string, boolean> = { email: true, hash: true };

/** The columns of the trail, in order. */
export const TRAIL_COLUMNS: readonly TrailColumn[] = [
  { id: 'seq', name: 'Row', sorts: true, figures: true, cell: ({ seq }) => seq },
  { id: 'when', name: 'When', cell: ({ at }) => <time dateTime={at}>{minute(at)}</time> },
  {
    id: 'who',
    name: 'Who',
    cell: ({ actor }) => actor?.name ?? <span className="text-ink-soft">the program</span>,
  },
  { id: 'email', name: 'Address', cell: ({ actor }) => actor?.email || '–' },
  {
    id: 'what',
    name: 'What',
    cell: (row, open) => (
      <button
        type="button"
        onClick={open}
        className="block min-h-6 max-w-[34rem] min-w-64 text-left whitespace-normal hover:text-zaffre hover:underline"
      >
        {deedWords(row)}{' '}
        <span className="font-medium">
          <SubjectName type={row.subject.type} name={subjectWords(row)} />
        </span>
        <span className="sr-only">, row {row.seq}: details</span>
      </button>
    ),
  },
  { id: 'kind', name: 'Kind of record', cell: ({ subject }) => KINDS[subject.type] ?? subject.type },
  {
    id: 'token',
    name: 'By token',
    cell: ({ token }) => token?.name ?? <span className="text-ink-soft">–</span>,
  },
  { id: 'hash', name: 'Hash', figures: true, cell: ({ hash }) => <span title={hash}>{hash.slice(0, 12)}…</span> },
];
