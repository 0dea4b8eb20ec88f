import type { SymbolParts } from './generators.ts';

/** What the labels hang on: the character of an irrep under single operations of the standard setting. */
export interface LabelProbe {
  /** Dimension, 2 for a complex-conjugate pair. */
  dimension: number;
  /** Under the principal operation about z; under C4 or S4 of a cubic group, C5 of I; 0 where there is none. */
  principal: number;
  /** Under the C2 along x, or where there is none the mirror xz; 0 where there is neither. */
  secondary: number;
  /** Under C2 about y, for D2. */
  halfTurnY: number;
  /** Under inversion, or 0 without. */
  inversion: number;
  /** Under the mirror xy, or 0 without. */
  horizontal: number;
}

/**
 * The principal operation of an axial group: Sm where it is not a rotation times i (S4, S8, and Dnd of even n, where
 * m is 2n), else Cm.
 */
export function principalOperation({ family, n, suffix }: SymbolParts): { order: number; improper: boolean } {
  if (family === 'S') return n % 4 === 0 ? { order: n, improper: true } : { order: n / 2, improper: false };
  const improper = family === 'D' && suffix === 'd' && n % 2 === 0;
  return { order: improper ? 2 * n : n, improper };
}

/**
 * Labels after R. S. Mulliken, J. Chem. Phys. 23 (1955) 1997 (from memory), for one group's irreps together, as a
 * number is left out where there is but one of its letter.
 *
 * @returns one label per probe, in plain text: `T2g`, `A1'`, `E3`
 */
export function mullikenLabels(parts: SymbolParts, probes: readonly LabelProbe[]): string[] {
  const bare = probes.map((probe) => ({
    letter: letterOf(parts, probe),
    number: numberOf(parts, probe),
    end: endOf(parts, probe),
  }));
  return bare.map(({ letter, number, end }) => {
    const alike = bare.filter((other) => other.letter === letter && other.end === end);
    return `${letter}${alike.length > 1 ? number : ''}${end}`;
  });
}

const isD2 = ({ family, n, suffix }: SymbolParts): boolean => family === 'D' && n === 2 && suffix !== 'd';
const isCubic = ({ family }: SymbolParts): boolean => 'TOI'.includes(family);

function letterOf(parts: SymbolParts, { dimension, principal, secondary }: LabelProbe): string {
  if (dimension > 1) return { 2: 'E', 3: 'T', 4: 'G', 5: 'H' }[dimension]!;
  if (isCubic(parts) || parts.n < 2) return 'A';
  return principal < 0 || (isD2(parts) && secondary < 0) ? 'B' : 'A';
}

function numberOf(parts: SymbolParts, probe: LabelProbe): number {
  const { dimension, principal, secondary, halfTurnY } = probe;
  if (dimension === 1) {
    if (isCubic(parts)) return principal > 0 ? 1 : 2;
    if (isD2(parts)) return principal > 0 ? 1 : halfTurnY > 0 ? 2 : 3;
    return secondary < 0 ? 2 : 1;
  }
  if (isCubic(parts)) return principal > 0 ? 1 : 2;
  // A pair Ek turns by k times the angle of the principal operation.
  const { order } = principalOperation(parts);
  const turns = Array.from({ length: Math.ceil(order / 2) }, (_, k) => 2 * Math.cos((2 * Math.PI * k) / order));
  return turns.findIndex((cosine) => Math.abs(cosine - principal) < 1e-6);
}

function endOf({ family, suffix }: SymbolParts, { inversion, horizontal }: LabelProbe): string {
  if (inversion !== 0) return inversion > 0 ? 'g' : 'u';
  if (horizontal === 0 || family === 'T' || (family === 'D' && suffix === 'd')) return '';
  return horizontal > 0 ? "'" : "''";
}

/** Sorts labels as tables do: A, B, E, T, G, H; g before u, ′ before ″; then by number. */
export function labelRank(label: string): number {
  const number = Number(/\d/.exec(label)?.[0] ?? 0);
  return (label.endsWith('u') || label.endsWith("''") ? 1000 : 0) + 'ABETGH'.indexOf(label[0]!) * 10 + number;
}
