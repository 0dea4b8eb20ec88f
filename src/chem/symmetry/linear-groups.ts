import type { Matrix3 } from '../geometry/vector.ts';
import { negative, operationKind } from './matrices.ts';

/** An irrep of C∞v or D∞h: Λ, for Λ = 0 the sign under a mirror through the axis, and in D∞h the parity. */
export interface LinearIrrep {
  lambda: number;
  sign: 1 | -1 | 0;
  parity: 'g' | 'u' | '';
}

const letters = ['Sigma', 'Pi', 'Delta', 'Phi', 'Gamma', 'H', 'I', 'K', 'L', 'M', 'N', 'O', 'Q'];

/** Symbols of the linear groups. */
export const linearSymbols: readonly string[] = ['Cinfv', 'Dinfh'];

/** `Sigma_g+`, `Pi_u`, `Delta`. Λ beyond the letters reads `Lambda13_g`. */
export function linearLabel({ lambda, sign, parity }: LinearIrrep): string {
  const letter = letters[lambda] ?? `Lambda${lambda}`;
  return `${letter}${parity && `_${parity}`}${sign === 0 ? '' : sign > 0 ? '+' : '-'}`;
}

/** The irrep that a label names in this group, or null. */
export function readLinearLabel(symbol: string, label: string): LinearIrrep | null {
  const [, name = '', parity = '', mark = ''] = /^([A-Z][a-z]*\d*?)(?:_([gu]))?([+-]?)$/.exec(label) ?? [];
  const lambda = letters.indexOf(name);
  if (lambda < 0 || (parity !== '') !== (symbol === 'Dinfh') || (mark !== '') !== (lambda === 0)) return null;
  return { lambda, sign: mark === '+' ? 1 : mark === '-' ? -1 : 0, parity: parity as LinearIrrep['parity'] };
}

const timesParity = (a: LinearIrrep['parity'], b: LinearIrrep['parity']): LinearIrrep['parity'] =>
  a === '' ? '' : a === b ? 'g' : 'u';

const pair = (lambda: number, parity: LinearIrrep['parity']): LinearIrrep => ({ lambda, sign: 0, parity });

/** Λ ⊗ Λ′ is |Λ − Λ′| and Λ + Λ′; Σ+ and Σ− both where they are equal. */
export function linearProduct(a: LinearIrrep, b: LinearIrrep): LinearIrrep[] {
  const parity = timesParity(a.parity, b.parity);
  if (a.lambda === 0 && b.lambda === 0) return [{ lambda: 0, sign: (a.sign * b.sign) as 1 | -1, parity }];
  if (a.lambda === 0 || b.lambda === 0) return [pair(a.lambda + b.lambda, parity)];
  const sum = pair(a.lambda + b.lambda, parity);
  if (a.lambda !== b.lambda) return [pair(Math.abs(a.lambda - b.lambda), parity), sum];
  return [{ lambda: 0, sign: 1, parity }, { lambda: 0, sign: -1, parity }, sum];
}

/** Symmetric or antisymmetric square or cube. */
export function linearPower({ lambda, sign, parity }: LinearIrrep, power: 2 | 3, symmetric: boolean): LinearIrrep[] {
  const even = parity && (power === 2 ? 'g' : parity);
  if (lambda === 0) return symmetric ? [{ lambda, sign: power === 2 ? 1 : sign, parity: even }] : [];
  if (power === 3) return symmetric ? [pair(lambda, even), pair(3 * lambda, even)] : [];
  return symmetric
    ? [{ lambda: 0, sign: 1, parity: even }, pair(2 * lambda, even)]
    : [{ lambda: 0, sign: -1, parity: even }];
}

/** Character of an operation whose axis is z, across z, or a mirror through or across z. */
export function linearCharacter({ lambda, sign, parity }: LinearIrrep, m: Matrix3): number {
  const flips = m[2][2] < 0;
  // In D∞h what turns the axis round is i times what does not; C∞v has no such operations.
  const kept = flips ? negative(m) : m;
  const factor = flips && parity === 'u' ? -1 : 1;
  const { proper, angle } = operationKind(kept);
  if (lambda === 0) return factor * (proper ? 1 : sign);
  return factor * (proper ? 2 * Math.cos(lambda * angle) : 0);
}

/** What a free-ion term of even parity becomes on a line: Λ from 0 to L, Σ+ for even L and Σ− for odd. */
export function linearSplitting(symbol: string, l: number): LinearIrrep[] {
  const parity = symbol === 'Dinfh' ? 'g' : '';
  return Array.from({ length: l + 1 }, (_, lambda) =>
    lambda === 0 ? { lambda, sign: l % 2 === 0 ? 1 : -1, parity } : pair(lambda, parity),
  );
}

const functionsOf: Record<string, string[]> = {
  'Sigma+': ['z', 'x2+y2', 'z2'],
  'Sigma-': ['Rz'],
  Pi: ['x', 'y', 'Rx', 'Ry', 'xz', 'yz'],
  Delta: ['x2-y2', 'xy'],
};

/** The irreps that a table prints, to Λ = 3, with their functions. */
export function linearTable(symbol: string): { irrep: LinearIrrep; label: string; functions: string[] }[] {
  const bare: LinearIrrep[] = [
    { lambda: 0, sign: 1, parity: '' },
    { lambda: 0, sign: -1, parity: '' },
    pair(1, ''),
    pair(2, ''),
    pair(3, ''),
  ];
  const parities: LinearIrrep['parity'][] = symbol === 'Dinfh' ? ['g', 'u'] : [''];
  return parities.flatMap((parity) =>
    bare.map((irrep) => {
      const functions = functionsOf[linearLabel(irrep)] ?? [];
      const odd = (name: string): boolean => ['x', 'y', 'z'].includes(name);
      const kept = functions.filter((name) => parity === '' || odd(name) === (parity === 'u'));
      const full = { ...irrep, parity };
      return { irrep: full, label: linearLabel(full), functions: kept };
    }),
  );
}

/** Sorts by parity, then Λ, then Σ+ before Σ−. */
export const linearRank = ({ lambda, sign, parity }: LinearIrrep): number =>
  (parity === 'u' ? 1000 : 0) + 2 * lambda + (sign < 0 ? 1 : 0);
