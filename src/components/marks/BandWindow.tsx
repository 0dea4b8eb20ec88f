import { useId } from 'react';
import { VisibleLight } from './VisibleLight.tsx';
import { visibleRule } from './visible-light.ts';

interface BandWindowProps {
  /** Bands in bins of equal width over `range`, shortest wavelength first. */
  counts: readonly number[];
  /** Ends of the histogram in nm. */
  range?: readonly [number, number];
  /** The chosen window in nm; null where none is chosen. */
  window: readonly [number, number] | null;
  width?: number;
}

const BARS = 62;

/** How many bands lie where, with the chosen window laid over it and visible light under it. */
export function BandWindow({ counts, range = [200, 1100], window: chosen, width = 330 }: BandWindowProps) {
  const titleId = useId();
  const [from, to] = range;
  const place = (nm: number) => (nm - from) / (to - from);
  const most = Math.max(1, ...counts);
  const bin = (to - from) / Math.max(1, counts.length);
  const inside = (i: number) =>
    chosen !== null && from + (i + 0.5) * bin >= chosen[0] && from + (i + 0.5) * bin <= chosen[1];
  const labels = [from, 500, 800, to].filter((nm, i, all) => nm >= from && nm <= to && all.indexOf(nm) === i);

  return (
    <div className="relative max-w-full" style={{ width }}>
      <svg
        viewBox={`0 0 ${width} ${BARS}`}
        className="block w-full"
        height={BARS}
        preserveAspectRatio="none"
        role="img"
        aria-labelledby={titleId}
      >
        <title id={titleId}>{`${counts.reduce((a, b) => a + b, 0)} bands from ${from} to ${to} nm`}</title>
        {chosen && (
          <rect
            x={place(chosen[0]) * width}
            width={Math.max(1, (place(chosen[1]) - place(chosen[0])) * width)}
            height={BARS}
            fill="var(--color-zaffre-wash)"
          />
        )}
        {counts.map((count, i) => {
          const height = (count / most) * (BARS - 6);
          return (
            <rect
              key={from + i * bin}
              x={(i * width) / counts.length}
              y={BARS - height}
              width={width / counts.length - 1}
              height={height}
              fill={inside(i) ? 'var(--color-band-dd)' : 'var(--color-glass)'}
            />
          );
        })}
      </svg>
      <VisibleLight rule={visibleRule(place)} top={BARS + 2} />
      <div className="relative mt-1.5 h-4 text-xs leading-4 text-ink-soft" aria-hidden="true">
        {labels.map((nm) => (
          <span
            key={nm}
            className="absolute whitespace-nowrap"
            style={{ left: `${place(nm) * 100}%`, transform: `translateX(-${place(nm) * 100}%)` }}
          >
            {nm === to ? `${nm} nm` : nm}
          </span>
        ))}
      </div>
    </div>
  );
}
