import { useMemo, useRef } from 'react';
import { lmctTrend } from '#src/chem/charge-transfer/index.ts';
import { findLigand, type ligands as library } from '#src/chem/ligands/index.ts';
import { parseFormula } from '#src/components/notation/formula.ts';
import { groupDigits, oxidationStateText } from '#src/components/notation/quantity.ts';
import { SvgRuns } from '#src/components/notation/SvgRuns.tsx';
import { Button } from '#src/components/ui/Button.tsx';
import { Panel } from '#src/components/ui/Panel.tsx';
import { Segmented } from '#src/components/ui/Segmented.tsx';
import { saveText } from '#src/components/ui/save-text.ts';
import { type DataColumn, tableCsv } from '#src/components/ui/table-csv.ts';
import { ticksOf } from '../drawing/clip-curve.ts';
import { placeAlong } from '../drawing/place-along.ts';
import { svgFile } from '../drawing/svg-file.ts';
import { useWidth } from '../drawing/useWidth.ts';
import type { LevelsState, TrendGeometry } from './levels-address.ts';
import { TREND_IONS } from './trend-ions.ts';

const COLOURS = ['dd', 'lmct', 'mlct', 'intraligand', 'intervalence'].map((name) => `var(--color-band-${name})`);
const DASHES = [undefined, '6 3', '2 3'];
const SIZE = { height: 460, left: 64, right: 96, top: 26, bottom: 44 };
/** The lowest edge of what is drawn, cm⁻¹. */
const FLOOR = 0;

interface TrendPanelProps {
  state: LevelsState;
  change: (part: Partial<LevelsState>) => void;
}

/** LMCT of several ions over ligands of rising optical electronegativity, field and spin pairing left out. */
export function TrendPanel({ state: { trend: geometry }, change }: TrendPanelProps) {
  const holder = useRef<HTMLDivElement>(null);
  const width = useWidth(holder, 900);
  const { ligands, lines } = useMemo(() => trendOf(geometry), [geometry]);
  const toX = (i: number) => SIZE.left + ((i + 0.5) / ligands.length) * (width - SIZE.left - SIZE.right);
  const highest = Math.max(60_000, ...lines.flatMap(({ points }) => points.map(({ wavenumber }) => wavenumber)));
  const bottom = SIZE.height - SIZE.bottom;
  const toY = (wavenumber: number) => bottom - ((wavenumber - FLOOR) / (highest - FLOOR)) * (bottom - SIZE.top);
  const ends = lines.map(({ points }) => points.at(-1)!);
  const places = placeAlong(
    ends.map(({ wavenumber }, i) => ({ at: toY(wavenumber), size: 15, rank: i })),
    { from: SIZE.top, to: bottom, gap: 0 },
  );
  const save = () => {
    const svg = holder.current?.querySelector('svg');
    if (svg)
      saveText(`lmct-trend-${geometry}.svg`, svgFile(new XMLSerializer().serializeToString(svg)), 'image/svg+xml');
  };
  return (
    <Panel
      title="LMCT of ions against ligands"
      controls={
        <Segmented
          label="Geometry"
          options={[
            { value: 'OC-6', label: 'Octahedral' },
            { value: 'T-4', label: 'Tetrahedral' },
            { value: 'SP-4', label: 'Square planar' },
          ]}
          value={geometry}
          onChange={(next) => change({ trend: next })}
        />
      }
      aside={
        <span className="flex gap-2">
          <Button size="small" onClick={save}>
            Download SVG
          </Button>
          <Button
            size="small"
            onClick={() => saveText(`lmct-trend-${geometry}.csv`, trendCsv(ligands, lines), 'text/csv')}
          >
            Download CSV
          </Button>
        </span>
      }
    >
      <div ref={holder}>
        <svg
          xmlns="http://www.w3.org/2000/svg"
          role="img"
          aria-label={`LMCT estimates of ${lines.length} ions with ${ligands.length} ligands`}
          viewBox={`0 0 ${width} ${SIZE.height}`}
          width={width}
          height={SIZE.height}
          className="h-auto w-full"
          fontFamily="Noto Sans, sans-serif"
          fontSize="12"
        >
          <g fontSize="11" fill="var(--color-ink-soft)">
            {ticksOf([FLOOR, highest], 6).map((tick) => (
              <g key={tick}>
                <line
                  x1={SIZE.left}
                  x2={width - SIZE.right}
                  y1={toY(tick)}
                  y2={toY(tick)}
                  stroke="var(--color-hairline)"
                  strokeWidth="0.7"
                />
                <text x={SIZE.left - 8} y={toY(tick) + 4} textAnchor="end">
                  {groupDigits(String(tick))}
                </text>
              </g>
            ))}
            <text x={6} y={14} fontSize="12">
              <SvgRuns
                runs={[
                  { text: 'wavenumber / cm', style: 'normal' },
                  { text: '−1', style: 'sup' },
                ]}
              />
            </text>
            <path d={`M${SIZE.left} ${bottom}H${width - SIZE.right}`} stroke="var(--color-ink-soft)" />
          </g>
          {ligands.map(({ abbreviation }, i) => (
            <text key={abbreviation} x={toX(i)} y={bottom + 19} textAnchor="middle" fill="var(--color-ink)">
              <SvgRuns runs={parseFormula(abbreviation)} />
            </text>
          ))}
          {lines.map(({ ion, points }, k) => {
            const colour = COLOURS[k % COLOURS.length]!;
            const drawn = points.filter(({ wavenumber }) => wavenumber >= FLOOR);
            const place = (ligand: string) => toX(ligands.findIndex(({ abbreviation }) => abbreviation === ligand));
            const end = drawn.at(-1);
            if (!end) return null;
            return (
              <g key={`${ion.element}${ion.oxidationState}`}>
                <path
                  d={`M${drawn.map(({ ligand, wavenumber }) => `${place(ligand).toFixed(1)} ${toY(wavenumber).toFixed(1)}`).join('L')}`}
                  fill="none"
                  stroke={colour}
                  strokeWidth="1.4"
                  strokeDasharray={DASHES[Math.floor(k / COLOURS.length) % DASHES.length]}
                />
                {drawn.map(({ ligand, wavenumber }) => (
                  <circle key={ligand} cx={place(ligand)} cy={toY(wavenumber)} r="3" fill={colour}>
                    <title>{`${oxidationStateText(ion.element, ion.oxidationState)} with ${ligand}: ${wavenumber} cm⁻¹, ± 3000`}</title>
                  </circle>
                ))}
                {places[k] !== null && (
                  <>
                    <path
                      d={`M${(place(end.ligand) + 5).toFixed(1)} ${toY(end.wavenumber).toFixed(1)}L${width - SIZE.right + 4} ${places[k]!.toFixed(1)}`}
                      stroke="var(--color-hairline)"
                      fill="none"
                    />
                    <text x={width - SIZE.right + 8} y={places[k]! + 4} fill={colour}>
                      {oxidationStateText(ion.element, ion.oxidationState)}
                    </text>
                  </>
                )}
              </g>
            );
          })}
        </svg>
      </div>
      <p className="mt-2 max-w-[95ch] text-xs text-ink-soft">
        Estimates of 30 000 cm⁻¹ times the difference of optical electronegativities; they usually err by 3 000 cm⁻¹ or
        more. Field splitting and spin pairing are left out, so that lines compare ligands: a page of a complex and the
        plan add them.
      </p>
    </Panel>
  );
}

/** Ligands that the tables know, by the electronegativity of the orbital that gives, and the lines over them. */
function trendOf(geometry: TrendGeometry) {
  const chi = (one: (typeof library)[number]) =>
    one.opticalElectronegativity?.pi ?? one.opticalElectronegativity?.sigma;
  const ligands = ['I', 'Br', 'Cl', 'OH2', 'H2O', 'F', 'NH3', 'CN', 'NCS', 'acac', 'oxo', 'O']
    .map((name) => findLigand(name))
    .filter((one) => one !== null)
    .filter(
      (one, i, all) =>
        chi(one) !== undefined && all.findIndex((other) => other.abbreviation === one.abbreviation) === i,
    )
    .sort((a, b) => chi(a)! - chi(b)!);
  const lines = lmctTrend(TREND_IONS[geometry], ligands, geometry).filter(({ points }) => points.length > 1);
  return { ligands, lines };
}

type Line = ReturnType<typeof trendOf>['lines'][number];

function trendCsv(ligands: readonly { abbreviation: string }[], lines: readonly Line[]): string {
  const columns: DataColumn<{ abbreviation: string }>[] = [
    { id: 'ligand', header: 'ligand', value: ({ abbreviation }) => abbreviation },
    ...lines.map(({ ion, points }) => ({
      id: `${ion.element}${ion.oxidationState}`,
      header: `${oxidationStateText(ion.element, ion.oxidationState)} cm-1`,
      value: ({ abbreviation }: { abbreviation: string }) =>
        points.find(({ ligand }) => ligand === abbreviation)?.wavenumber ?? null,
    })),
  ];
  return tableCsv(columns, ligands);
}
