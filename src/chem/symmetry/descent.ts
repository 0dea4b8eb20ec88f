import { DomainError } from '../errors.ts';
import type { Matrix3 } from '../geometry/vector.ts';
import { multiply, transpose } from '../geometry/vector.ts';
import { type Embedding, embeddings } from './embedding.ts';
import type { FiniteGroup } from './finite-group.ts';
import { type IrrepCount, requireFinite } from './groups.ts';
import { linearCharacter, linearLabel, linearSymbols, linearTable } from './linear-groups.ts';
import { matrixKey } from './matrices.ts';
import { irrepOfGroup, reduce, requireLinear } from './products.ts';

/** What irreps of a group become in a subgroup. */
export interface Descent {
  maps: { irrep: string; terms: IrrepCount[] }[];
  /** Ways to choose the subgroup that are not alike, by the classes its axes and mirrors come from; the first is the default. */
  choices: string[];
  /** Which of `choices` the maps are for. */
  along: string;
}

/**
 * Restricts irreps to a subgroup.
 *
 * Where the subgroup lies in the group in several ways that no operation of the group carries into each other, `along`
 * names one. The subgroup keeps the axes of the group where it can.
 *
 * @param irreps - labels in `from`; all of its irreps when left out
 * @param along - one of the `choices` of an earlier answer, or a class that only one choice names: D4h to D2h through
 *   `C2''`
 * @throws DomainError `unknown-symbol`; `unsupported` when `to` is no subgroup of `from`; `out-of-range` on `along`
 */
export function descend(from: string, to: string, irreps?: readonly string[], along?: string): Descent {
  if (linearSymbols.includes(from)) return descendLinear(from, to, irreps, along);
  const [group, subgroup] = [requireFinite(from, 'from'), requireFinite(to, 'to')];
  const ways = choicesOf(group, subgroup);
  if (ways.length === 0) throw new DomainError('unsupported', `${to} is not a subgroup of ${from}.`, 'to');
  const chosen = choose(ways, along);
  const labels = irreps ?? group.irreps.map(({ label }) => label);
  return {
    maps: labels.map((irrep) => {
      const { characters } = irrepOfGroup(group, irrep, 'irreps');
      return {
        irrep,
        terms: reduce(
          subgroup,
          chosen.classes.map((c) => characters[c]!),
        ),
      };
    }),
    choices: ways.map(({ label }) => label),
    along: chosen.label,
  };
}

/** A way in which a subgroup lies in a group. */
interface Choice {
  label: string;
  /** Class of the group that each class of the subgroup lies in. */
  classes: number[];
}

const known = new Map<string, readonly Choice[]>();

/** The ways in which a subgroup lies in a group, one of each set that the group's operations carry into each other. */
export function choicesOf(group: FiniteGroup, subgroup: FiniteGroup): readonly Choice[] {
  const pair = `${group.symbol} ${subgroup.symbol}`;
  const ways = known.get(pair) ?? findChoices(group, subgroup);
  known.set(pair, ways);
  return ways;
}

function findChoices(group: FiniteGroup, subgroup: FiniteGroup): Choice[] {
  const seen = new Set<string>();
  const ways = embeddings(subgroup, group.operations).filter((way) => {
    if (seen.has(setKey(way.images))) return false;
    for (const g of group.operations) seen.add(setKey(way.images.map((m) => multiply(g, multiply(m, transpose(g))))));
    return true;
  });
  const fusions = ways.map((way) => fusion(group, subgroup, way));
  return fusions.map((classes) => ({ classes, label: choiceLabel(group, fusions, classes) }));
}

const setKey = (matrices: readonly Matrix3[]): string => matrices.map(matrixKey).sort().join('|');

function fusion(group: FiniteGroup, subgroup: FiniteGroup, { images }: Embedding): number[] {
  return subgroup.classes.map(({ representative }) => {
    const index = subgroup.operations.indexOf(representative);
    return group.classOfMatrix(images[index]!)!;
  });
}

/** The classes of the group that this choice meets and not every choice does; all but E where there is but one choice. */
function choiceLabel(group: FiniteGroup, fusions: readonly number[][], classes: readonly number[]): string {
  const met = [...new Set(classes)].sort((a, b) => a - b).filter((c) => c > 0);
  const telling = met.filter((c) => !fusions.every((other) => other.includes(c)));
  const shown = telling.length > 0 ? telling : met;
  return shown.map((c) => group.classes[c]!.label).join(', ') || 'E';
}

function choose(ways: readonly Choice[], along: string | undefined): Choice {
  if (along === undefined) return ways[0]!;
  const exact = ways.find(({ label }) => label === along);
  const naming = ways.filter(({ label }) => label.split(', ').includes(along));
  const found = exact ?? naming[0];
  if (found) return found;
  const listed = ways.map(({ label }) => label).join('; ');
  throw new DomainError('out-of-range', `There is no choice “${along}” here. The choices are: ${listed}.`, 'along');
}

/** From a linear group, the subgroup keeping z. */
function descendLinear(from: string, to: string, irreps?: readonly string[], along?: string): Descent {
  if (along !== undefined && along !== 'z') {
    throw new DomainError(
      'out-of-range',
      'From a linear group the subgroup keeps z; there is no other choice.',
      'along',
    );
  }
  const labels = irreps ?? linearTable(from).map(({ label }) => label);
  const read = labels.map((irrep) => ({ irrep, linear: requireLinear(from, irrep, 'irreps') }));
  const answer = (terms: (linear: (typeof read)[number]['linear']) => IrrepCount[]): Descent => ({
    maps: read.map(({ irrep, linear }) => ({ irrep, terms: terms(linear) })),
    choices: ['z'],
    along: 'z',
  });
  if (to === from) return answer((linear) => [{ irrep: linearLabel(linear), count: 1 }]);
  // A mirror through the axis keeps its sign in C∞v.
  if (to === 'Cinfv') return answer((linear) => [{ irrep: linearLabel({ ...linear, parity: '' }), count: 1 }]);
  const subgroup = requireFinite(to, 'to');
  const axial = subgroup.operations.every((m) => Math.abs(Math.abs(m[2][2]) - 1) < 1e-6);
  const polar = subgroup.operations.every((m) => m[2][2] > 0);
  if (!axial || (from === 'Cinfv' && !polar)) {
    throw new DomainError('unsupported', `${to} is not a subgroup of ${from}, or not one that keeps z.`, 'to');
  }
  return answer((linear) =>
    reduce(
      subgroup,
      subgroup.classes.map(({ representative }) => linearCharacter(linear, representative)),
    ),
  );
}
