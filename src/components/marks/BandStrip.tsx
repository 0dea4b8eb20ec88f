import { formatNumber } from '../notation/quantity.ts';
import { type BandStyle, bandStyle } from './band-classes.ts';
import { placeOnStrip, STRIP_VISIBLE, tickHeight } from './band-strip.ts';
import { VisibleLight } from './VisibleLight.tsx';

export interface StripBand {
  /** cm⁻¹ */
  wavenumber: number;
  /** dm³ mol⁻¹ cm⁻¹; null where only the position is known. */
  epsilon: number | null;
  class: string;
}

const BASE = 29.5;

/** The bands of a complex on one scale, 50 000 to 4 000 cm⁻¹: one tick a band, its height by log ε. */
export function BandStrip({ bands, width = 230 }: { bands: readonly StripBand[]; width?: number }) {
  const seen = bands.filter(({ wavenumber }) => placeOnStrip(wavenumber) >= 0 && placeOnStrip(wavenumber) <= 1);
  return (
    <span className="relative inline-block align-middle" style={{ width, height: 34 }}>
      <svg
        role="img"
        aria-label={describe(bands)}
        width={width}
        height="34"
        viewBox={`0 0 ${width} 34`}
        className="block"
      >
        <title>{describe(bands)}</title>
        <line x1="0" x2={width} y1={BASE} y2={BASE} stroke="var(--color-hairline)" />
        {seen.map((band) => (
          <Tick
            key={`${band.wavenumber} ${band.class} ${band.epsilon}`}
            x={placeOnStrip(band.wavenumber) * (width - 4) + 2}
            height={tickHeight(band.epsilon)}
            style={bandStyle(band.class)}
          />
        ))}
      </svg>
      <VisibleLight rule={STRIP_VISIBLE} top={31} />
    </span>
  );
}

/** One stroke upwards from the base line, in the manner of its class. */
function Tick({ x, height, style }: { x: number; height: number; style: BandStyle }) {
  const { colour, stroke } = style;
  const top = BASE - 0.5 - height;
  if (stroke.kind === 'hollow') {
    return <rect x={x - 1.7} y={top} width="3.4" height={height} fill="none" stroke={colour} strokeWidth="1" />;
  }
  if (stroke.kind === 'double') {
    return (
      <path d={`M${x - 1.5} ${BASE - 0.5}V${top}M${x + 1.5} ${BASE - 0.5}V${top}`} stroke={colour} strokeWidth="1.2" />
    );
  }
  return (
    <line
      x1={x}
      x2={x}
      y1={BASE - 0.5}
      y2={top}
      stroke={colour}
      strokeWidth="2.4"
      strokeDasharray={stroke.dash || undefined}
    />
  );
}

function describe(bands: readonly StripBand[]): string {
  if (bands.length === 0) return 'no bands';
  return bands
    .map((band) => {
      const epsilon = band.epsilon === null ? '' : `, ε ${formatNumber(band.epsilon, 3)}`;
      return `${bandStyle(band.class).name} ${formatNumber(Math.round(band.wavenumber))} cm⁻¹${epsilon}`;
    })
    .join('; ');
}
