import { colourOfSolution } from '#src/chem/colour/index.ts';
import { checkConditions, type Flag, type YUnit } from '#src/chem/spectra/index.ts';
import type { spectra } from '#src/db/schema/index.ts';
import type { SolventShare } from './conditions.ts';
import { epsilonOf, storedQuantity } from './quantities.ts';

type Checked = Pick<typeof spectra.$inferSelect, 'technique' | 'concentration' | 'pathLength'> & {
  yUnit: YUnit;
  /** Highest absorbance that the instrument's lab trusts on it. */
  absorbanceLimit?: number | null;
  solvents: readonly SolventShare[];
};

/** What the conditions say against a curve. Only solutions have rules: others get no flags, which is no praise. */
export function flagsOf(curve: { x: Float64Array; value: Float64Array }, checked: Checked): Flag[] {
  if (checked.technique !== 'solution') return [];
  const quantity = storedQuantity(checked.technique, checked.yUnit);
  return checkConditions({
    x: curve.x,
    absorbance: curve.value,
    solvent: checked.solvents,
    concentration: checked.concentration,
    pathLength: checked.pathLength,
    // Whatever is no absorbance has neither its range nor its need of a cell.
    yUnit: quantity === 'absorbance' ? 'absorbance' : 'epsilon',
    ...(checked.absorbanceLimit ? { absorbanceLimit: checked.absorbanceLimit } : {}),
  });
}

/** Highest visible absorbance below which a curve shows noise, not a colour. */
const LEAST_VISIBLE = 0.005;

/** Highest absorbance from 380 to 780 nm. */
function visiblePeak({ x, value }: { x: Float64Array; value: Float64Array }): number {
  let peak = 0;
  x.forEach((wavenumber, i) => {
    if (wavenumber >= 1e7 / 780 && wavenumber <= 1e7 / 380 && value[i]! > peak) peak = value[i]!;
  });
  return peak;
}

/** Colour of the solution at a highest visible absorbance of 1, "#rrggbb"; null where the curve gives none. */
export function colourOf(
  curve: { x: Float64Array; value: Float64Array },
  { technique, yUnit }: Pick<Checked, 'technique' | 'yUnit'>,
): string | null {
  if (technique !== 'solution') return null;
  const quantity = storedQuantity(technique, yUnit);
  if (quantity === 'absorbance' && visiblePeak(curve) < LEAST_VISIBLE) return null;
  // At a dilution to absorbance 1 only the shape counts, so that absorbance serves where ε is not known.
  const shape = quantity === 'absorbance' ? curve.value : epsilonOf(curve.value, quantity, null);
  return shape && (colourOfSolution({ x: curve.x, epsilon: shape })?.hex ?? null);
}
