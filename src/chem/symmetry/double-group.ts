import { betheLabels } from './bethe-labels.ts';
import { classAlgebra, multiplicationTable } from './class-algebra.ts';
import { requireFinite } from './groups.ts';
import { linearSymbols } from './linear-groups.ts';
import { barred, lift, momentumCharacter, multiplySpin, type SpinRotation, spinMark } from './spin-rotation.ts';

/** An irrep of a double group; a complex-conjugate pair counts as one. */
export interface DoubleIrrep {
  /** After Bethe, as numbered by Koster: `Γ8+`; both numbers of a pair: `Γ5,Γ6`. */
  bethe: string;
  /** `T2g`, or for the half-integer ones by the least j that holds it: `E1/2g`, `G3/2u`. */
  label: string;
  /** Changes sign under a full turn: what an odd number of electrons has. */
  spinor: boolean;
  dimension: number;
  pair: boolean;
  /** By class. */
  characters: number[];
}

/** A double group: each operation twice, the second time after a full turn R. */
export interface DoubleGroup {
  /** Symbol of the point group. */
  symbol: string;
  order: number;
  /** `operation`: class of the point group under the operation, by place in its table. */
  classes: { label: string; size: number; operation: number; representative: SpinRotation }[];
  /** Class of each element, for checks: `elements[i]` lies in `classOf[i]`. */
  elements: SpinRotation[];
  classOf: number[];
  irreps: DoubleIrrep[];
}

const known = new Map<string, DoubleGroup>();

/**
 * The double group of any finite point group, generated at first use.
 *
 * Spin turns by quaternions and does not see inversion, so that a mirror is the half-turn about its normal.
 *
 * @throws DomainError `unknown-symbol`, or `unsupported` for a linear group, on `group`
 * @see H. Bethe, Ann. Phys. 395 (1929) 133; G. F. Koster et al., Properties of the Thirty-Two Point Groups, 1963
 */
export function doubleGroup(symbol: string): DoubleGroup {
  const group = known.get(symbol) ?? generateDoubleGroup(symbol);
  known.set(symbol, group);
  return group;
}

/** The table of a double group as shown; null for the linear groups. */
export function doubleTable(symbol: string) {
  if (linearSymbols.includes(symbol)) return null;
  const { order, classes, irreps } = doubleGroup(symbol);
  return {
    order,
    classes: classes.map(({ label, size }) => ({ label, size })),
    irreps: irreps.map(({ pair: _, ...irrep }) => irrep),
  };
}

/** Generates a double group anew. Errors as `doubleGroup`. */
export function generateDoubleGroup(symbol: string): DoubleGroup {
  const group = requireFinite(symbol, 'group');
  const lifts = group.operations.map(lift);
  const elements = [...lifts, ...lifts.map(barred)];
  const algebra = classAlgebra(multiplicationTable(elements, multiplySpin, spinMark));
  const order = group.order;

  const bare = algebra.classes.map((members, old) => {
    const operation = group.classOfMatrix(group.operations[members[0]! % order]!)!;
    const name = group.classes[operation]!.label;
    // Of two classes over one the unmarked holds the lift of its representative; where both lifts are alike, there is
    // but one class.
    const first = group.operations.indexOf(group.classes[operation]!.representative);
    const over = !members.includes(first);
    return { old, operation, over, label: `${over ? 'R' : ''}${over && name === 'E' ? '' : name}`, members };
  });
  const placed = bare.sort((a, b) => a.operation - b.operation || Number(a.over) - Number(b.over));
  const place = algebra.classes.map((_, old) => placed.findIndex((entry) => entry.old === old));
  const classOf = algebra.classOf.map((c) => place[c]!);
  const classes = placed.map(({ label, members, operation }) => ({
    label,
    size: members.length,
    operation,
    representative: elements[members[0]!]!,
  }));
  const rows = algebra.characters.map((row) => placed.map(({ old }) => row[old]!));
  const irreps = namedIrreps(symbol, classes, rows);
  return { symbol, order: 2 * order, classes, elements, classOf, irreps };
}

function namedIrreps(symbol: string, classes: DoubleGroup['classes'], rows: readonly number[][]): DoubleIrrep[] {
  const group = requireFinite(symbol, 'group');
  const inner = (a: readonly number[], b: readonly number[]): number =>
    classes.reduce((sum, { size }, c) => sum + size * a[c]! * b[c]!, 0) / (2 * group.order);
  const full = classes.findIndex(({ label }) => label === 'R');
  const single = group.irreps.map(({ label, dimension, pair, characters }) => ({
    label,
    spinor: false,
    dimension,
    pair,
    characters: classes.map(({ operation }) => characters[operation]!),
  }));
  const spinors = rows
    .filter((row) => row[full]! < 0)
    .map((characters) => {
      const dimension = characters[0]!;
      const end = group.centrosymmetric ? (parityOf(classes, characters) > 0 ? 'g' : 'u') : '';
      const even = classes.map(({ representative: { parity } }, c) => (end === 'u' ? parity : 1) * characters[c]!);
      const twiceJ = leastMomentum((multiplicity) =>
        inner(
          even,
          classes.map(({ representative }) => momentumCharacter(multiplicity, representative)),
        ),
      );
      const letter = { 1: 'A', 2: 'E', 4: 'G', 6: 'I' }[dimension]!;
      const label = `${letter}${twiceJ}/2${end}`;
      return { label, spinor: true, dimension, pair: inner(characters, characters) > 1.5, characters, twiceJ, end };
    })
    .sort(
      (a, b) =>
        a.end.localeCompare(b.end) || Math.max(2, a.dimension) - Math.max(2, b.dimension) || a.twiceJ - b.twiceJ,
    )
    .map(({ twiceJ: _, end: __, ...irrep }) => irrep);
  const all = [...single, ...spinors];
  const labels = betheLabels(symbol, all);
  return all.map((irrep, k) => ({ bethe: labels[k]!, ...irrep }));
}

/** Character of inversion, whose turn is none. */
function parityOf(classes: DoubleGroup['classes'], characters: readonly number[]): number {
  return characters[classes.findIndex(({ label }) => label === 'i')]!;
}

/** Twice the least half-integer j whose states hold an irrep. */
function leastMomentum(holds: (multiplicity: number) => number): number {
  for (let twiceJ = 1; twiceJ < 40; twiceJ += 2) if (holds(twiceJ + 1) > 0.25) return twiceJ;
  throw new Error('no angular momentum holds this irrep');
}
