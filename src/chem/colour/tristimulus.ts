import { DomainError } from '../errors.ts';
import { table } from './cie-tables.ts';

/** X, Y, Z with Y = 100 for the illuminant itself. */
export type Triple = [number, number, number];

const COUNT = table.d65.length;
const LAST_NM = table.firstNm + (COUNT - 1) * table.stepNm;

/** Wavelengths in nm at which colour is summed. */
export const wavelengths: readonly number[] = Array.from({ length: COUNT }, (_, i) => table.firstNm + i * table.stepNm);

function at(values: readonly number[], nm: number): number {
  if (!(nm >= table.firstNm && nm <= LAST_NM)) {
    throw new DomainError(
      'out-of-range',
      `the tables go from ${table.firstNm} to ${LAST_NM} nm; ${nm} is outside`,
      'wavelength',
    );
  }
  const place = (nm - table.firstNm) / table.stepNm;
  const i = Math.min(Math.floor(place), COUNT - 2);
  return values[i]! + (place - i) * (values[i + 1]! - values[i]!);
}

/**
 * Colour-matching functions x̄, ȳ, z̄ of the 2° observer, between the table's values by straight lines.
 *
 * @throws {DomainError} `out-of-range` outside 380–780 nm
 */
export function colourMatching(nm: number): Triple {
  const { xBarMillionths, yBarMillionths, zBarMillionths } = table;
  return [at(xBarMillionths, nm) / 1e6, at(yBarMillionths, nm) / 1e6, at(zBarMillionths, nm) / 1e6];
}

/** Relative spectral power of D65 (100 at 560 nm), between the table's values by straight lines. */
export function illuminantD65(nm: number): number {
  return at(table.d65, nm);
}

/**
 * Tristimulus values of what passes or reflects a fraction of D65 at each wavelength:
 * X = k Σ S·f·x̄ with k = 100 / Σ S·ȳ, 380–780 nm every 5 nm.
 *
 * @param fraction - transmittance or reflectance at a wavelength in nm
 * @see CIE 015:2018, section 7.1 (from memory)
 */
export function tristimulus(fraction: (nm: number) => number): Triple {
  const sum: Triple = [0, 0, 0];
  let white = 0;
  for (const nm of wavelengths) {
    const power = illuminantD65(nm);
    const [x, y, z] = colourMatching(nm);
    const light = power * fraction(nm);
    sum[0] += light * x;
    sum[1] += light * y;
    sum[2] += light * z;
    white += power * y;
  }
  return sum.map((value) => (100 * value) / white) as Triple;
}

/** D65 itself: 95.04, 100, 108.88. */
export const whiteD65: Triple = tristimulus(() => 1);

/** Chromaticity x, y of tristimulus values; that of D65 where there is no light at all. */
export function chromaticity([X, Y, Z]: Triple): [number, number] {
  const sum = X + Y + Z;
  return sum > 0 ? [X / sum, Y / sum] : chromaticity(whiteD65);
}
