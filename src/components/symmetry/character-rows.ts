import { finiteGroup } from '#src/chem/symmetry/finite-group.ts';
import type { DoubleGroup, PointGroup } from '#src/chem/symmetry/index.ts';
import { parseCharacter } from '#src/components/notation/symmetry.ts';

/** A row of a character table as it is drawn. */
export interface CharacterRow {
  label: string;
  /** Number or numbers after Bethe; null without the double group. */
  bethe: string | null;
  /** Two complex-conjugate irreps in one row. */
  pair: boolean;
  /** Of the double group alone. */
  spinor: boolean;
  characters: (number | string)[];
  /** x, y, z and rotations. */
  linear: string[];
  quadratic: string[];
}

export interface CharacterRows {
  order: number | null;
  /** Whether rows have numbers after Bethe. */
  bethe: boolean;
  classes: { label: string; size: number | null }[];
  rows: CharacterRow[];
}

const isLinearFunction = (name: string): boolean => /^R?[xyz]$/.test(name);

/** Rows and columns of a character table, with those of the double group where it is given. */
export function characterRows(group: PointGroup, double: DoubleGroup | null): CharacterRows {
  const pairs = new Set(finiteGroup(group.symbol)?.irreps.flatMap(({ label, pair }) => (pair ? [label] : [])) ?? []);
  const functions = new Map(group.irreps.map((irrep) => [irrep.label, irrep.functions]));
  const irreps = double
    ? double.irreps.map(({ label, bethe, pair, spinor, characters }) => ({ label, bethe, pair, spinor, characters }))
    : group.irreps.map(({ label, characters }) => ({
        label,
        bethe: null,
        pair: pairs.has(label),
        spinor: false,
        characters,
      }));
  return {
    order: double?.order ?? group.order,
    bethe: double !== null,
    classes: (double ?? group).classes.map(({ label, size }) => ({ label, size })),
    rows: irreps.map((irrep) => {
      const own = functions.get(irrep.label) ?? [];
      return {
        ...irrep,
        linear: own.filter(isLinearFunction),
        quadratic: own.filter((name) => !isLinearFunction(name)),
      };
    }),
  };
}

/** The table with tabs between, for elsewhere. */
export function charactersText(symbol: string, { classes, rows }: CharacterRows): string {
  const exact = (value: number | string): string =>
    parseCharacter(value)
      .map(({ text }) => text)
      .join('');
  const head = [symbol, ...classes.map(({ label, size }) => `${size === null || size === 1 ? '' : size}${label}`)];
  const body = rows.map(({ label, characters, linear, quadratic }) => [
    label,
    ...characters.map(exact),
    linear.join(', '),
    quadratic.join(', '),
  ]);
  return [[...head, 'linear', 'quadratic'], ...body].map((line) => line.join('\t')).join('\n');
}
