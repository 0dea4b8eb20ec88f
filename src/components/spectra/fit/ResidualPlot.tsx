import { formatNumber } from '#src/components/notation/quantity.ts';
import type { PlotArea } from '../plot/types.ts';

interface ResidualPlotProps {
  area: PlotArea;
  /** cm⁻¹, ascending, and curve minus fit. */
  x: ArrayLike<number>;
  residual: ArrayLike<number>;
  rms: number | null;
}

const HEIGHT = 76;
const MARGIN = 6;

/** What the fit leaves over, on the axis of the curve above it. */
export function ResidualPlot({ area, x, residual, rms }: ResidualPlotProps) {
  const inSight = Array.from(x as ArrayLike<number>, (_, i) => i).filter(
    (i) => x[i]! >= area.x[0] && x[i]! <= area.x[1] && Number.isFinite(residual[i]!),
  );
  const most = inSight.reduce((largest, i) => Math.max(largest, Math.abs(residual[i]!)), 0) || 1;
  const middle = HEIGHT / 2;
  const top = (value: number) => middle - (value / most) * (middle - MARGIN);
  const left = (wavenumber: number) => ((wavenumber - area.x[0]) / (area.x[1] - area.x[0])) * area.width;
  const path = inSight.map((i, k) => `${k === 0 ? 'M' : 'L'}${left(x[i]!).toFixed(1)} ${top(residual[i]!).toFixed(1)}`);
  const label = `Residual, curve minus fit, up to ${formatNumber(most, 2)}${rms === null ? '' : `; root mean square ${formatNumber(rms, 2)}`}`;
  return (
    <div className="mt-3">
      <svg width={area.left + area.width} height={HEIGHT} role="img" aria-label={label} className="overflow-visible">
        <g transform={`translate(${area.left} 0)`}>
          {[most, 0, -most].map((value) => (
            <g key={value}>
              <path d={`M0 ${top(value)}H${area.width}`} stroke="var(--color-faint)" />
              <text x={-8} y={top(value) + 4} textAnchor="end" fontSize="12" fill="var(--color-ink-soft)">
                {formatNumber(value, 2)}
              </text>
            </g>
          ))}
          <path d={path.join('')} fill="none" stroke="var(--color-ink)" strokeWidth="1" />
        </g>
      </svg>
      <p className="text-xs text-ink-soft" style={{ paddingLeft: area.left }}>
        residual
      </p>
    </div>
  );
}
