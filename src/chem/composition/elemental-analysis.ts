import { addCompositions, type Composition, findElement, molarMass } from '../elements.ts';
import { DomainError } from '../errors.ts';

/** Mass percentages by element, as a laboratory reports them: `{ C: 30.12, H: 5.05, N: 17.57 }`. */
export type Percentages = Readonly<Record<string, number>>;

/** Difference between found and calculated that is usually accepted, in percentage points; common practice of journals. */
export const ACCEPTED_DIFFERENCE = 0.4;

export interface AnalysedElement {
  element: string;
  /** Mass per cent. */
  calculated: number;
  /** Mass per cent. */
  found: number;
  /** Found less calculated, in percentage points. */
  difference: number;
  within: boolean;
}

export interface AnalysisJudgement {
  elements: AnalysedElement[];
  /** Every element found lies within the accepted difference. */
  agrees: boolean;
  /** Root mean square of the differences, in percentage points. */
  rms: number;
}

export interface SolvateFit extends AnalysisJudgement {
  /** Molecules of solvent per formula unit. */
  count: number;
  /** g/mol, solvent included. */
  molarMass: number;
}

/** Mass percentage of every element of a composition; NaN where a symbol is no element. */
export function massPercentages(composition: Readonly<Composition>): Record<string, number> {
  const total = molarMass(composition);
  return Object.fromEntries(
    Object.entries(composition).map(([symbol, count]) => [symbol, (100 * molarMass({ [symbol]: count })) / total]),
  );
}

/**
 * Elemental analysis found against calculated: each element, and whether all agree to ±0.4 percentage points.
 *
 * @throws {DomainError} field `found`: `empty` without a value; `unknown-symbol`; `out-of-range` for a value outside
 *   0 to 100 or a sum above 101
 */
export function judgeAnalysis(
  composition: Readonly<Composition>,
  found: Percentages,
  accepted = ACCEPTED_DIFFERENCE,
): AnalysisJudgement {
  checkFound(found);
  const calculated = massPercentages(composition);
  const elements = Object.entries(found).map(([element, value]) => {
    const expected = calculated[element] ?? 0;
    const difference = value - expected;
    // Both are rounded to two figures before they are compared, as printed: 0.40 is accepted.
    const within = Math.abs(Math.round(difference * 100)) <= Math.round(accepted * 100);
    return { element, calculated: expected, found: value, difference, within };
  });
  const rms = Math.sqrt(elements.reduce((sum, e) => sum + e.difference ** 2, 0) / elements.length);
  return { elements, agrees: elements.every((e) => e.within), rms };
}

function checkFound(found: Percentages): void {
  const entries = Object.entries(found);
  if (entries.length === 0) throw new DomainError('empty', 'No percentage was given', 'found');
  for (const [symbol, value] of entries) {
    if (!findElement(symbol)) throw new DomainError('unknown-symbol', `${symbol} is no element`, 'found');
    if (!(value >= 0 && value <= 100))
      throw new DomainError('out-of-range', `${value} % of ${symbol}: 0 to 100 is possible`, 'found');
  }
  const sum = entries.reduce((total, [, value]) => total + value, 0);
  if (sum > 101) throw new DomainError('out-of-range', `The percentages sum to ${sum.toFixed(2)}, above 100`, 'found');
}

/**
 * Which solvate fits an analysis best: each count from 0 to 12 in halves, best first. Several may agree; carbon alone
 * hardly tells one hydrate from the next.
 *
 * @param dry - composition of one formula unit without that solvent
 * @param solvent - of one molecule; water by default
 * @throws {DomainError} as `judgeAnalysis`
 */
export function fitSolvate(
  dry: Readonly<Composition>,
  found: Percentages,
  solvent: Readonly<Composition> = { H: 2, O: 1 },
  { most = 12, step = 0.5 }: { most?: number; step?: number } = {},
): SolvateFit[] {
  const counts = Array.from({ length: Math.floor(most / step + 1e-9) + 1 }, (_, i) => i * step);
  return counts
    .map((count) => {
      const composition = addCompositions([
        { composition: dry, count: 1 },
        { composition: solvent, count },
      ]);
      return { count, molarMass: molarMass(composition), ...judgeAnalysis(composition, found) };
    })
    .sort((a, b) => a.rms - b.rms);
}
