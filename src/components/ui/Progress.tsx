import { Button } from './Button.tsx';

interface ProgressProps {
  label: string;
  /** 0 to 1; null while nobody can tell. */
  value: number | null;
  /** What is being done just now, under the bar. */
  detail?: string;
  onCancel?: () => void;
}

/** A bar for what takes more than a second, with a way out. */
export function Progress({ label, value, detail, onCancel }: ProgressProps) {
  const percent = value === null ? null : Math.round(Math.min(1, Math.max(0, value)) * 100);
  return (
    <div className="flex items-center gap-3">
      <div className="min-w-0 flex-1">
        <div className="mb-1 flex justify-between text-xs text-ink-soft">
          <span>{label}</span>
          {percent !== null && <span className="num">{percent} %</span>}
        </div>
        <div
          role="progressbar"
          aria-label={label}
          aria-valuemin={0}
          aria-valuemax={100}
          aria-valuenow={percent ?? undefined}
          className="h-1.5 overflow-hidden rounded-sm bg-hairline"
        >
          <div
            className={`h-full bg-zaffre ${percent === null ? 'w-1/3 animate-pulse' : 'transition-[width]'}`}
            style={percent === null ? undefined : { width: `${percent}%` }}
          />
        </div>
        {detail && <p className="mt-1 text-xs text-ink-soft">{detail}</p>}
      </div>
      {onCancel && (
        <Button size="small" onClick={onCancel}>
          Cancel
        </Button>
      )}
    </div>
  );
}
