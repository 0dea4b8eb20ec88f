import { formatNumber } from '../notation/quantity.ts';
import { Button } from '../ui/Button.tsx';

interface PagesProps {
  name: string;
  /** Rows before this page. */
  before: number;
  shown: number;
  total: number;
  hasNext: boolean;
  isLate: boolean;
  onEarlier: () => void;
  onNext: () => void;
}

const whole = (count: number) => formatNumber(count, 12);

/** Which rows these are, and the way to the others. */
export function Pages({ name, before, shown, total, hasNext, isLate, onEarlier, onNext }: PagesProps) {
  if (before === 0 && !hasNext) return null;
  return (
    <nav aria-label={`Pages of ${name}`} className="flex items-center gap-3">
      <Button disabled={before === 0} onClick={onEarlier}>
        Previous
      </Button>
      <span className="text-xs text-ink-soft">
        {whole(before + 1)}–{whole(before + shown)} of {whole(total)}
      </span>
      <Button disabled={!hasNext || isLate} onClick={onNext}>
        Next
      </Button>
    </nav>
  );
}
