import { formatNumber } from '../../notation/quantity.ts';
import type { JoinedSeries } from './join-series.ts';
import type { PlotSeries } from './types.ts';
import { seriesLooks } from './uplot-options.ts';

interface PlotKeyProps {
  series: readonly PlotSeries[];
  joined: JoinedSeries;
  /** Grid point under the data cursor; null for none. */
  index: number | null;
}

/** Which curve is which, and what each says under the cursor. */
export function PlotKey({ series, joined, index }: PlotKeyProps) {
  return (
    <ul className="flex min-w-0 flex-wrap gap-x-5 gap-y-0.5 text-xs">
      {series.map((s, i) => {
        const { colour, dash } = seriesLooks(s, i);
        return (
          <li key={s.id} className="flex items-center gap-2">
            <svg width="22" height="6" aria-hidden="true">
              <path d="M0 3H22" stroke={colour} strokeWidth="2" strokeDasharray={dash.join(' ') || undefined} />
            </svg>
            <span>{s.label}</span>
            {index !== null && <span className="num text-ink-soft">{formatNumber(joined.y[i]?.[index], 3)}</span>}
          </li>
        );
      })}
    </ul>
  );
}
