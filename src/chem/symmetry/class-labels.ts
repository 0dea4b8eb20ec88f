import type { Matrix3, Vector3 } from '../geometry/vector.ts';
import type { SymbolParts } from './generators.ts';
import { type OperationKind, operationKind } from './matrices.ts';

/** The label of a class and where the class stands in the table. */
export interface LabelledClass {
  label: string;
  /** Indices of its operations. */
  members: number[];
  rank: number;
}

/**
 * Labels the classes of a group in its standard setting and puts them in the order of the table: E, rotations by
 * falling order, i, rotation-reflections, mirrors.
 *
 * @param classes - indices into `operations`
 */
export function labelClasses(
  parts: SymbolParts,
  operations: readonly Matrix3[],
  classes: readonly number[][],
): LabelledClass[] {
  return classes
    .map((members) =>
      labelled(
        parts,
        members,
        members.map((g) => operationKind(operations[g]!)),
      ),
    )
    .sort((a, b) => a.rank - b.rank);
}

function labelled(parts: SymbolParts, members: number[], kinds: readonly OperationKind[]): LabelledClass {
  const { proper, axis, angle } = kinds.reduce((best, k) => (sum(k.axis) > sum(best.axis) + 1e-6 ? k : best));
  if (!axis) return { label: proper ? 'E' : 'i', members, rank: proper ? 0 : 1000 };
  if (!proper && (angle < 1e-6 || angle > 2 * Math.PI - 1e-6)) return mirror(parts, members, kinds);
  const [n, power] = lowest(kinds, proper);
  if (proper && n === 2) return halfTurn(parts, members, kinds);
  const label = `${proper ? 'C' : 'S'}${n}${power === 1 ? '' : `^${power}`}`;
  return { label, members, rank: (proper ? 100 : 1100) + (20 - n) * 20 + power };
}

const sum = (axis: Vector3 | null): number => (axis ? axis[0] + axis[1] + axis[2] : -10);

/** Order n of the axis and the least power k among those operations of the class that turn about the leading axis. */
function lowest(kinds: readonly OperationKind[], proper: boolean): [number, number] {
  const most = Math.max(...kinds.map((k) => sum(k.axis)));
  const candidates = kinds.filter((k) => sum(k.axis) > most - 1e-6).map(({ angle }) => fraction(angle));
  const pairs = candidates.map(([k, n]): [number, number] => [n, !proper && n % 2 === 1 && k % 2 === 0 ? k + n : k]);
  return pairs.reduce((a, b) => (b[1] < a[1] ? b : a));
}

/** k and n of an angle 2πk/n in lowest terms. */
function fraction(angle: number): [number, number] {
  for (let n = 1; n <= 16; n++) {
    const k = (angle * n) / (2 * Math.PI);
    if (Math.abs(k - Math.round(k)) < 1e-6) return [Math.round(k), n];
  }
  throw new Error(`an angle of ${angle} belongs to no point group in the list`);
}

const along = (kinds: readonly OperationKind[], direction: number): boolean =>
  kinds.some(({ axis }) => axis && Math.abs(Math.abs(axis[direction]!) - 1) < 1e-6);

/** D2 and D2h, and C2v for its mirrors, tell axes and planes apart by letters. */
const lettered = ({ family, n, suffix }: SymbolParts): boolean =>
  n === 2 && ((family === 'D' && suffix !== 'd') || suffix === 'v');

function halfTurn(parts: SymbolParts, members: number[], kinds: readonly OperationKind[]): LabelledClass {
  if (parts.family === 'D' && lettered(parts)) {
    const letter = along(kinds, 2) ? 'z' : along(kinds, 1) ? 'y' : 'x';
    return { label: `C2(${letter})`, members, rank: 800 + 'zyx'.indexOf(letter) };
  }
  const prime = along(kinds, 2) ? '' : parts.family !== 'D' || along(kinds, 0) ? "'" : "''";
  return { label: `C2${prime}`, members, rank: 800 + prime.length };
}

function mirror(parts: SymbolParts, members: number[], kinds: readonly OperationKind[]): LabelledClass {
  if (lettered(parts)) {
    const letters = along(kinds, 2) ? 'xy' : along(kinds, 1) ? 'xz' : 'yz';
    return { label: `sigma(${letters})`, members, rank: 1800 + ['xy', 'xz', 'yz'].indexOf(letters) };
  }
  const kind = mirrorKind(parts, kinds);
  return { label: kind ? `sigma_${kind}` : 'sigma', members, rank: 1800 + ['h', 'v', 'd'].indexOf(kind) };
}

function mirrorKind({ family, suffix }: SymbolParts, kinds: readonly OperationKind[]): 'h' | 'v' | 'd' | '' {
  if (family === 'I') return '';
  if (suffix === 'd') return 'd';
  if (along(kinds, 2)) return 'h';
  // The plane xz has its normal along y; it is σv where there is a choice.
  return family === 'O' || !along(kinds, 1) ? 'd' : 'v';
}
