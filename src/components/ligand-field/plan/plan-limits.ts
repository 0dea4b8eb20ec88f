import type { DilutionLimits } from '#src/chem/planning/index.ts';

/** Limits as they are typed. Concentrations in mmol dm⁻³, paths in cm. */
export interface TypedLimits {
  low: string;
  high: string;
  paths: string;
  highest: string;
  lowest: string;
}

export const USUAL_TYPED: TypedLimits = {
  low: '0.2',
  high: '1.0',
  paths: '0.1, 0.2, 0.5, 1, 2, 4, 5, 10',
  highest: '100',
  lowest: '0.001',
};

/** Decimal point or comma alone; blanks do not matter. */
const number = (text: string): number => (text.trim() === '' ? Number.NaN : Number(text.trim()));

/** The limits that were typed, or for each field that cannot be used what is wrong with it. */
export function readLimits(
  typed: TypedLimits,
): { limits: DilutionLimits; errors: null } | { limits: null; errors: Partial<Record<keyof TypedLimits, string>> } {
  const errors: Partial<Record<keyof TypedLimits, string>> = {};
  const positive = (name: keyof TypedLimits): number => {
    const value = number(typed[name]);
    if (!(value > 0 && Number.isFinite(value))) errors[name] = 'Give a number above 0, with a decimal point.';
    return value;
  };
  const [low, high, highest, lowest] = [positive('low'), positive('high'), positive('highest'), positive('lowest')];
  const paths = typed.paths
    .split(/[,;\s]+/)
    .filter((part) => part !== '')
    .map(Number);
  if (paths.length === 0 || !paths.every((path) => path > 0 && Number.isFinite(path)))
    errors.paths = 'Give path lengths in cm with commas between, such as 0.1, 1, 10.';
  if (!errors.low && !errors.high && low >= high) errors.high = 'The highest absorbance must be above the lowest.';
  if (!errors.highest && !errors.lowest && lowest >= highest)
    errors.highest = 'The highest concentration must be above the lowest.';
  if (Object.keys(errors).length > 0) return { limits: null, errors };
  return {
    limits: { absorbance: [low, high], paths, highest: highest / 1000, lowest: lowest / 1000 },
    errors: null,
  };
}
