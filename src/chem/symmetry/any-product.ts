import { DomainError } from '../errors.ts';
import { doubleProduct, isDoubleLabel } from './double-products.ts';
import type { IrrepCount } from './groups.ts';
import { antisymmetricPower, directProduct, MOST_FACTORS, symmetricPower } from './products.ts';

/**
 * Reduces the direct product of irreps of a group, or of its double group where a label is one of that alone.
 *
 * @throws DomainError `unknown-symbol`, `empty` or `too-large`
 */
export function productOf(symbol: string, irreps: readonly string[]): IrrepCount[] {
  const double = irreps.some(isDoubleLabel) && irreps.length <= MOST_FACTORS;
  return double ? doubleProduct(symbol, irreps) : directProduct(symbol, irreps);
}

/**
 * The symmetric or antisymmetric part of a square or cube.
 *
 * @param irreps - the same label two or three times
 * @throws DomainError `out-of-range` on `irreps`; else as `directProduct`
 */
export function powerPart(
  symbol: string,
  irreps: readonly string[],
  part: 'symmetric' | 'antisymmetric',
): IrrepCount[] {
  const [first, ...rest] = irreps;
  const power = irreps.length;
  if (first === undefined || (power !== 2 && power !== 3) || rest.some((label) => label !== first)) {
    throw new DomainError(
      'out-of-range',
      `A product has a ${part} part when it is a square or a cube: give the same irrep two or three times.`,
      'irreps',
    );
  }
  return part === 'symmetric' ? symmetricPower(symbol, first, power) : antisymmetricPower(symbol, first, power);
}
