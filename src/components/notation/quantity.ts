import { DIGIT_SPACE, lowerRaised, MINUS, type Run, RunBuilder } from './runs.ts';

/** A number to be set: its standard uncertainty, its unit in plain text, and how many figures to show. */
export interface QuantityInput {
  value: number | null | undefined;
  /** Standard uncertainty in the unit of the value; shown with at most two figures (GUM 7.2.6). */
  uncertainty?: number | null | undefined;
  /** Plain text, such as `dm3 mol-1 cm-1`. */
  unit?: string | undefined;
  /** Brackets a value with its uncertainty although no unit is given here, because one follows. */
  bracketed?: boolean | undefined;
  /** Significant figures where no uncertainty tells; 4 by default. Integers keep all of theirs. */
  figures?: number | undefined;
}

/** What stands in place of a number that is not there. */
export const ABSENT = '–';

/** Groups the digits on both sides of the point by threes, with a narrow no-break space (ISO 80000-1, 7.3.1). */
export function groupDigits(plain: string): string {
  const [whole = '', fraction] = plain.replace('-', MINUS).split('.');
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, DIGIT_SPACE);
  if (fraction === undefined) return grouped;
  return `${grouped}.${fraction.length > 4 ? fraction.replace(/(\d{3})(?=\d)/g, `$1${DIGIT_SPACE}`) : fraction}`;
}

/** Decimal exponent of a number as it will be shown, after rounding to the figures asked. */
function exponentOf(value: number, figures: number): number {
  return value === 0 ? 0 : Number(value.toExponential(Math.max(0, figures - 1)).split('e')[1]);
}

/** Number of decimals that shows an uncertainty with two figures, or one where the second is a nought; may be negative. */
function decimalsFor(uncertainty: number): number {
  const [mantissa = '1', exponent = '0'] = uncertainty.toExponential(1).split('e');
  return (mantissa.endsWith('.0') ? 0 : 1) - Number(exponent);
}

/** Fixed decimals; negative ones round to tens, hundreds … */
function fixed(value: number, decimals: number): string {
  if (decimals >= 0) return value.toFixed(Math.min(decimals, 20));
  const step = 10 ** -decimals;
  return String(Math.round(value / step) * step);
}

function plainNumber(value: number, figures: number): string {
  if (Number.isInteger(value)) return String(value);
  return fixed(value, Math.max(0, figures - 1 - exponentOf(value, figures)));
}

/**
 * A number as text: grouped digits, true minus, four significant figures unless told otherwise. No powers of ten.
 * NaN, infinite and absent values give an en dash.
 */
export function formatNumber(value: number | null | undefined, figures = 4): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return ABSENT;
  return groupDigits(plainNumber(value, figures));
}

/**
 * Sets a quantity: `(21 550 ± 60) cm−1`, `6.6 × 10−4`, `(6.60 ± 0.05) × 10−4`. Powers of ten are used below 10⁻³ and
 * from 10⁷ on. The value is rounded to the last place of its uncertainty.
 */
export function parseQuantity({ value, uncertainty, unit, bracketed, figures = 4 }: QuantityInput): Run[] {
  if (value === null || value === undefined || !Number.isFinite(value)) return [{ text: ABSENT, style: 'normal' }];
  const out = new RunBuilder();
  const u = uncertainty && Number.isFinite(uncertainty) && uncertainty > 0 ? uncertainty : null;
  const exponent = exponentOf(value, figures);
  const power = value !== 0 && (exponent < -3 || exponent >= 7) ? exponent : 0;
  const scale = (x: number) => (power === 0 ? x : Number(`${x.toPrecision(15)}e${-power}`) || x / 10 ** power);

  if (u === null) out.add(groupDigits(power ? scaled(value, figures) : plainNumber(value, figures)));
  else {
    const decimals = decimalsFor(scale(u));
    const pair = `${groupDigits(fixed(scale(value), decimals))} ± ${groupDigits(fixed(scale(u), decimals))}`;
    out.add(power || unit || bracketed ? `(${pair})` : pair);
  }
  if (power) out.add(' × 10').add(groupDigits(String(power)), 'sup');
  if (unit) out.add(unit === '%' ? DIGIT_SPACE : '\u00a0').addAll(parseUnit(unit));
  return out.runs;
}

const scaled = (value: number, figures: number) => value.toExponential(Math.max(0, figures - 1)).split('e')[0]!;

/**
 * Sets a unit: `dm3 mol-1 cm-1` with its exponents raised and the factors kept on one line. `cm⁻¹` is taken too.
 * A multiplication is a space (ISO 80000-1, 7.2.2), as in the plain text.
 */
export function parseUnit(unit: string): Run[] {
  const out = new RunBuilder();
  for (const [i, factor] of unit
    .trim()
    .split(/[\s·]+/)
    .entries()) {
    if (i > 0) out.add('\u00a0');
    const found = /^(.*?[\p{L}°%])\^?([-−]?\d+)$/u.exec(lowerRaised(factor));
    if (!found) out.add(factor);
    else out.add(found[1]!).add(found[2]!.replace('-', MINUS), 'sup');
  }
  return out.runs;
}

const ROMAN = ['0', 'I', 'II', 'III', 'IV', 'V', 'VI', 'VII', 'VIII', 'IX'];

/**
 * An element with its oxidation state, `Co(III)`, `Cr(0)`, `Fe(−II)`. A fraction is written in Arabic figures with its
 * sign, `Fe(+2.5)`; an unknown state leaves the symbol alone.
 *
 * @see IUPAC, Recommendations 2005, IR-5.4.2.2: Roman numerals, nought as 0, a minus sign for negative states
 */
export function oxidationStateText(element: string, state: number | null | undefined): string {
  if (state === null || state === undefined) return element;
  const roman = ROMAN[Math.abs(state)];
  if (roman === undefined) return `${element}(${state < 0 ? MINUS : '+'}${Math.abs(state)})`;
  return `${element}(${state < 0 ? MINUS : ''}${roman})`;
}

const SPOKEN_UNITS: Record<string, string> = {
  'dm3 mol-1 cm-1': 'cubic decimetres per mole and centimetre',
  'cm-1': 'per centimetre',
  'g mol-1': 'grams per mole',
  'mol dm-3': 'moles per cubic decimetre',
  nm: 'nanometres',
  eV: 'electronvolts',
  K: 'kelvin',
};

/** A unit read aloud; units that are not among the common ones are spelled as they stand. */
export function unitLabel(unit: string): string {
  return SPOKEN_UNITS[unit] ?? unit;
}
