import { Unit } from '../../notation/index.tsx';
import { formatNumber } from '../../notation/quantity.ts';
import { type JoinedSeries, spreadIndices } from './join-series.ts';
import type { PlotSeries } from './types.ts';
import { X_FIGURES, X_TITLES, type XUnit, Y_TITLES, type YUnit } from './units.ts';
import type { ViewWindow } from './view-window.ts';

/** Rows at most; all points are in the CSV of the spectrum. */
const ROWS = 200;

interface PlotTableProps {
  series: readonly PlotSeries[];
  joined: JoinedSeries;
  view: ViewWindow | null;
  xUnit: XUnit;
  yUnit: YUnit;
}

/** The same curves as numbers: the window in sight, in rows spread evenly over its points. */
export function PlotTable({ series, joined, view, xUnit, yUnit }: PlotTableProps) {
  const inside = joined.x.flatMap((x, i) => (view === null || (x >= view[0] && x <= view[1]) ? [i] : []));
  const rows = spreadIndices(inside.length, ROWS).map((i) => inside[i]!);
  const y = Y_TITLES[yUnit];
  return (
    <section
      className="mt-3 max-h-80 overflow-auto border border-hairline"
      aria-label="The curves as a table"
      // biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls must be reached by keyboard (WCAG 2.1.1)
      tabIndex={0}
    >
      <table className="table table-compact">
        <thead className="sticky top-0 bg-glaze">
          <tr>
            <th scope="col">
              <Unit unit={X_TITLES[xUnit].unit} />
            </th>
            {series.map(({ id, label }) => (
              <th key={id} scope="col">
                {label}, {y.name}
              </th>
            ))}
          </tr>
        </thead>
        <tbody className="num">
          {rows.map((i) => (
            <tr key={i}>
              <td>{formatNumber(joined.x[i], X_FIGURES[xUnit])}</td>
              {series.map(({ id }, k) => (
                <td key={id}>{formatNumber(joined.y[k]?.[i], 4)}</td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
      {inside.length > rows.length && (
        <p className="px-3 py-2 text-xs text-ink-soft">
          {rows.length} of {inside.length} points, evenly spread.
        </p>
      )}
    </section>
  );
}
