import type { BandFit } from '#src/chem/spectra/fit/fit-bands.ts';
import { groupDigits } from '#src/components/notation/quantity.ts';

/** Rows by number of bands, lowest AICc of each column; pure for its test. */
export function comparedRows(compared: BandFit['compared']) {
  const lowest = Math.min(...compared.map(({ aicc }) => aicc));
  const counts = [...new Set(compared.map(({ count }) => count))].sort((a, b) => a - b);
  const above = (count: number, edge: boolean) => {
    const those = compared.filter((one) => one.count === count && one.edge === edge).map(({ aicc }) => aicc);
    return those.length === 0 ? null : Math.min(...those) - lowest;
  };
  return counts.map((count) => ({ count, without: above(count, false), withEdge: above(count, true) }));
}

interface ComparedFitsProps {
  compared: BandFit['compared'];
  chosen: { count: number; edge: boolean };
}

/** Numbers of bands that were tried, by how far their criterion lies above the lowest. */
export function ComparedFits({ compared, chosen }: ComparedFitsProps) {
  if (compared.length < 2) return null;
  const rows = comparedRows(compared);
  const hasEdge = rows.some(({ withEdge }) => withEdge !== null);
  const hasPlain = rows.some(({ without }) => without !== null);
  const cell = (count: number, edge: boolean, value: number | null) => {
    const isChosen = chosen.count === count && chosen.edge === edge;
    return (
      <td className={`num text-right! ${isChosen ? 'font-semibold text-zaffre' : ''}`}>
        {value === null ? '–' : groupDigits(value.toFixed(1))}
        {isChosen && <span className="sr-only"> (taken)</span>}
      </td>
    );
  };
  return (
    <details>
      <summary className="cursor-pointer text-xs text-ink-soft hover:text-zaffre">Numbers of bands compared</summary>
      <p className="mt-2 max-w-prose text-xs text-ink-soft">
        AICc above the lowest of all. More bands count only where each of them is significant and the criterion falls by
        more than 15.
      </p>
      <table className="table table-compact mt-1 w-auto!">
        <thead>
          <tr>
            <th scope="col">bands</th>
            {hasPlain && (
              <th scope="col" className="text-right!">
                no edge
              </th>
            )}
            {hasEdge && (
              <th scope="col" className="text-right!">
                with edge
              </th>
            )}
          </tr>
        </thead>
        <tbody>
          {rows.map(({ count, without, withEdge }) => (
            <tr key={count}>
              <td className="num">{count}</td>
              {hasPlain && cell(count, false, without)}
              {hasEdge && cell(count, true, withEdge)}
            </tr>
          ))}
        </tbody>
      </table>
    </details>
  );
}
