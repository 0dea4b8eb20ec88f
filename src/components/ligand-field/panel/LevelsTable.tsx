import { Irrep, Term, Unit } from '#src/components/notation/index.tsx';
import { formatNumber } from '#src/components/notation/quantity.ts';
import type { LevelRow } from './level-rows.ts';

const whole = (value: number) => formatNumber(Math.round(value), 7);

/** How far a level lies above a band. */
const signed = (distance: number): string => {
  const rounded = Math.round(distance);
  return `${rounded > 0 ? '+' : rounded < 0 ? '−' : ''}${whole(Math.abs(rounded))}`;
};

/** Levels with what the rules say of them and the bands that lie on them. */
export function LevelsTable({ rows, coupled, label }: { rows: readonly LevelRow[]; coupled: boolean; label: string }) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reached with the keyboard
    <section className="max-h-[340px] overflow-auto border-t border-hairline" tabIndex={0} aria-label={label}>
      <table className="table table-compact">
        <thead className="sticky top-0 z-10 bg-glaze">
          <tr>
            <th scope="col" className="!pl-[18px]">
              Level
            </th>
            <th scope="col" className="!text-right">
              <Unit unit="cm-1" />
            </th>
            <th scope="col" className="!text-right">
              nm
            </th>
            <th scope="col" className="!text-right">
              States
            </th>
            <th scope="col">{coupled ? 'Composition' : 'From the ground level'}</th>
            <th scope="col">
              Observed, <Unit unit="cm-1" />
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.key} className={row.spinAllowed === false ? 'text-ink-soft' : ''}>
              <td className="!pl-[18px] text-ink">
                {coupled ? <Irrep irrep={row.label} /> : <Term term={row.label} />}
              </td>
              <td className="num text-right">{whole(row.energy)}</td>
              <td className="num text-right">{row.energy > 1 ? formatNumber(Math.round(1e7 / row.energy), 6) : '–'}</td>
              <td className="num text-right">{row.degeneracy}</td>
              <td className="text-xs">
                {row.composition
                  ? row.composition.map(({ term, share }) => (
                      <span key={term} className="mr-2.5">
                        {Math.round(100 * share)} % <Term term={term} />
                      </span>
                    ))
                  : row.verdict}
              </td>
              <td>
                {row.bands.map(({ band, distance }) => (
                  <span key={band.id} className="mr-3">
                    <span className="num">{whole(band.wavenumber)}</span>{' '}
                    <span className="num text-xs text-ink-soft">({signed(distance)})</span>
                  </span>
                ))}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}
