import type { Composition } from '../elements.ts';
import { DomainError } from '../errors.ts';
import { ELECTRON_MASS } from './exact-mass.ts';
import { nuclidesOf } from './nuclides.ts';

/** A peak of an isotope pattern. */
export interface IsotopePeak {
  /** m/z in Da for an ion, mass in Da for a neutral molecule. */
  mass: number;
  /** Part of all molecules, 0 to 1. */
  share: number;
  /** Height over the highest peak, 0 to 100 %. */
  percent: number;
}

export interface PatternOptions {
  /** Charge of the ion; 0 (default) for the neutral molecule. */
  charge?: number;
  /** Peaks nearer than this become one at their mean mass. Da, default 0.01. */
  width?: number;
  /** Peaks below this part of the highest are left out. Default 0.001. */
  threshold?: number;
}

/** Mass and share of a set of molecules; sorted by mass. */
interface Line {
  mass: number;
  share: number;
}

/** Shares that no sum of them could bring back to a visible peak. */
const NEGLIGIBLE = 1e-11;
/** As many atoms as a pattern is computed for. */
const MAX_ATOMS = 5000;

/**
 * Isotope pattern of a composition: the distributions of the elements, each raised to its number of atoms by repeated
 * squaring, folded together. Lines nearer than `width` are merged at their mean, negligible ones dropped on the way.
 *
 * @returns peaks by rising mass
 * @throws {DomainError} field `composition`: `out-of-range` for a count that is no whole number above zero, `too-large`
 *   for more than 5000 atoms, `unsupported` for an element without natural isotopic composition
 */
export function isotopePattern(composition: Readonly<Composition>, options: PatternOptions = {}): IsotopePeak[] {
  const { charge = 0, width = 0.01, threshold = 0.001 } = options;
  checkComposition(composition);
  const carriers = Math.max(1, Math.abs(charge));
  let lines: Line[] = [{ mass: -charge * ELECTRON_MASS, share: 1 }];
  for (const [symbol, count] of Object.entries(composition)) {
    const element = nuclidesOf(symbol).filter((n) => n.abundance > 0);
    const single = element.map(({ mass, abundance }) => ({ mass, share: abundance }));
    lines = fold(lines, power(single, count, width * carriers), width * carriers);
  }
  const highest = lines.reduce((most, line) => Math.max(most, line.share), 0);
  return lines
    .filter((line) => line.share >= threshold * highest)
    .map(({ mass, share }) => ({ mass: mass / carriers, share, percent: (100 * share) / highest }));
}

function checkComposition(composition: Readonly<Composition>): void {
  let atoms = 0;
  for (const [symbol, count] of Object.entries(composition)) {
    if (!Number.isInteger(count) || count < 1)
      throw new DomainError(
        'out-of-range',
        `${count} atoms of ${symbol}: whole numbers above zero are needed`,
        'composition',
      );
    if (nuclidesOf(symbol).length === 0)
      throw new DomainError('unsupported', `${symbol} has no natural isotopic composition`, 'composition');
    atoms += count;
  }
  if (atoms === 0) throw new DomainError('out-of-range', 'The composition is empty', 'composition');
  if (atoms > MAX_ATOMS)
    throw new DomainError('too-large', `${atoms} atoms; patterns are computed for up to ${MAX_ATOMS}`, 'composition');
}

function power(base: readonly Line[], exponent: number, width: number): Line[] {
  let result: Line[] = [{ mass: 0, share: 1 }];
  let square = [...base];
  for (let left = exponent; left > 0; left = Math.floor(left / 2)) {
    if (left % 2 === 1) result = fold(result, square, width);
    if (left > 1) square = fold(square, square, width);
  }
  return result;
}

function fold(a: readonly Line[], b: readonly Line[], width: number): Line[] {
  const all: Line[] = [];
  for (const x of a) {
    for (const y of b) {
      const share = x.share * y.share;
      if (share > NEGLIGIBLE) all.push({ mass: x.mass + y.mass, share });
    }
  }
  all.sort((x, y) => x.mass - y.mass);
  return merge(all, width);
}

function merge(sorted: readonly Line[], width: number): Line[] {
  const merged: Line[] = [];
  for (const line of sorted) {
    const last = merged.at(-1);
    if (!last || line.mass - last.mass > width) {
      merged.push({ ...line });
      continue;
    }
    const share = last.share + line.share;
    last.mass += ((line.mass - last.mass) * line.share) / share;
    last.share = share;
  }
  return merged;
}
