import { choicesOf, descend } from './descent.ts';
import { finiteGroup } from './finite-group.ts';
import { finiteSymbols } from './generators.ts';
import { type IrrepCount, requireFinite } from './groups.ts';
import { linearSymbols } from './linear-groups.ts';
import { type Direction, dipoleBetween, directions, perDirection } from './selection-rules.ts';
import type { Term } from './term-label.ts';

/** What becomes of a transition in a subgroup. */
export interface LowerGroup {
  group: string;
  /** Which of several ways the subgroup lies in the group; null where there is but one. */
  along: string | null;
  /** Terms that the two become, each once. */
  from: string[];
  to: string[];
  /** Polarisations, along the axes of the subgroup, that some pair of these terms allows. */
  dipole: Record<Direction, boolean>;
}

/**
 * The subgroups in which a transition that the dipole forbids gains a polarisation, from high to low.
 *
 * @returns `[]` for a linear group, whose subgroups have no end, and where every polarisation is open already
 */
export function lowerGroups(symbol: string, from: Term, to: Term): LowerGroup[] {
  if (linearSymbols.includes(symbol)) return [];
  if (directions.every((d) => dipoleBetween(symbol, from.irrep, to.irrep)[d])) return [];
  const { order } = requireFinite(symbol, 'group');
  const found = finiteSymbols.flatMap((lower) => {
    const own = finiteGroup(lower)!;
    if (own.order >= order || order % own.order !== 0 || own.order < 2 || own.centrosymmetric) return [];
    const ways = choicesOf(requireFinite(symbol, 'group'), own);
    return ways.map(({ label }) => {
      const { maps } = descend(symbol, lower, [from.irrep, to.irrep], label);
      const [start, end] = [maps[0]!.terms, maps[1]!.terms];
      return {
        order: own.order,
        group: lower,
        along: ways.length > 1 ? label : null,
        from: termsOf(from, start),
        to: termsOf(to, end),
        dipole: perDirection((d) => start.some((a) => end.some((b) => dipoleBetween(lower, a.irrep, b.irrep)[d]))),
      };
    });
  });
  return found
    .filter(({ dipole }) => directions.some((d) => dipole[d]))
    .sort((a, b) => b.order - a.order)
    .map(({ order: _, ...entry }) => entry);
}

const termsOf = ({ multiplicity }: Term, terms: readonly IrrepCount[]): string[] =>
  terms.map(({ irrep }) => `${multiplicity}${irrep}`);
