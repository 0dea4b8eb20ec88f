import type { ReactNode } from 'react';

interface SortHeaderProps {
  children: ReactNode;
  /** How the rows are ordered by this column, if they are. */
  sorted: 'rising' | 'falling' | null;
  /** Left out where rows cannot be ordered by it. */
  onSort?: (() => void) | undefined;
  className?: string;
}

const ARIA = { rising: 'ascending', falling: 'descending' } as const;

/** The head of a column; where it orders the rows it is a button, and says how. */
export function SortHeader({ children, sorted, onSort, className = '' }: SortHeaderProps) {
  return (
    <th scope="col" aria-sort={onSort ? (sorted ? ARIA[sorted] : 'none') : undefined} className={className}>
      {onSort ? (
        <button
          type="button"
          onClick={onSort}
          className="-mx-1.5 inline-flex min-h-6 items-center gap-1 rounded px-1.5 hover:text-zaffre"
        >
          {children}
          <span aria-hidden="true" className={`w-2 text-zaffre ${sorted ? '' : 'opacity-0'}`}>
            {sorted === 'falling' ? '↓' : '↑'}
          </span>
        </button>
      ) : (
        <span className="inline-flex min-h-6 items-center whitespace-pre">{children}</span>
      )}
    </th>
  );
}
