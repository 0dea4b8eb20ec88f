import { formatNumber } from '#src/components/notation/quantity.ts';
import { Button } from '#src/components/ui/Button.tsx';
import { type ComplexView, PAGE_SIZE } from './view.ts';

interface PagerProps {
  view: ComplexView;
  total: number;
  onTurn: (view: ComplexView) => void;
}

/** Which rows these are, and the way to the others. */
export function Pager({ view, total, onTurn }: PagerProps) {
  const pages = Math.max(1, Math.ceil(total / PAGE_SIZE));
  if (pages === 1 && view.page === 1) return null;
  const first = (view.page - 1) * PAGE_SIZE + 1;
  const last = Math.min(total, view.page * PAGE_SIZE);
  return (
    <nav aria-label="Pages" className="flex flex-wrap items-center gap-2">
      <span className="mr-2 text-ink-soft">
        <span className="num">
          {formatNumber(first)}–{formatNumber(last)}
        </span>{' '}
        of <span className="num">{formatNumber(total)}</span>
      </span>
      <Button size="small" disabled={view.page === 1} onClick={() => onTurn({ ...view, page: view.page - 1 })}>
        Previous
      </Button>
      <Button size="small" disabled={view.page >= pages} onClick={() => onTurn({ ...view, page: view.page + 1 })}>
        Next
      </Button>
    </nav>
  );
}
