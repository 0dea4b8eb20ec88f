import { type Candidate, type CentredAtoms, candidateKey, candidateOperations } from './candidates.ts';
import { type Symmetrised, symmetrise } from './symmetrise.ts';

type Operation = Omit<Candidate, 'misfit'>;

/** Operations that keep atoms within a tolerance, with the atoms where the operations keep them exactly. */
export interface FoundOperations extends Symmetrised {
  operations: Operation[];
}

/** Shares of the tolerance that atoms may be moved by: all of them together, and one. */
const RMS_SHARE = 0.85;
const SINGLE_SHARE = 1.25;

/** Whether atoms moved by so much count as having been there. */
export const withinTolerance = ({ rms, largest }: { rms: number; largest: number }, tolerance: number): boolean =>
  rms <= RMS_SHARE * tolerance && largest <= SINGLE_SHARE * tolerance;

/** First candidates that a search starts from, when the candidates are no group. */
const MOST_STARTS = 12;
/** Rounds of averaging that tell how far atoms must move, if not to the last digit. */
const ROUNDS_TO_JUDGE = 4;
/** Order of Ih, above which no group of atoms off one line goes. */
const LARGEST_ORDER = 120;

/**
 * The largest group whose exact arrangement lies within a tolerance of the atoms: root mean square shift at most 0.85,
 * shift of one atom at most 1.25 of the tolerance.
 *
 * All operations that nearly hold are tried together, as in an arrangement near one group they are that group. Where
 * they are not (the arrangement lies near two), groups are grown from the best operations first.
 *
 * @param atoms - not on one line
 * @param tolerance - in the unit of the positions
 */
export function findOperations(atoms: CentredAtoms, tolerance: number): FoundOperations {
  const candidates = candidateOperations(atoms, 3 * tolerance);
  const known = new Set(candidates.map(candidateKey));
  const attempt = (generators: readonly Operation[]): Operation[] | null => {
    const operations = closureWithin(generators, known, atoms.positions.length);
    const near = operations && withinTolerance(symmetrise(atoms.positions, operations, ROUNDS_TO_JUDGE), tolerance);
    return near ? operations : null;
  };
  const operations = attempt(candidates) ?? grownGroup(candidates, attempt);
  return { ...symmetrise(atoms.positions, operations), operations };
}

/** The largest group that grows from one of the best candidates by taking in others, best first. */
function grownGroup(
  candidates: readonly Operation[],
  attempt: (generators: readonly Operation[]) => Operation[] | null,
): Operation[] {
  const holds = (group: readonly Operation[], { permutation, proper }: Operation): boolean =>
    group.some((op) => op.proper === proper && op.permutation.every((j, i) => j === permutation[i]));
  let best = attempt([])!;
  for (const start of candidates.slice(0, MOST_STARTS)) {
    let grown = best.length > 1 && holds(best, start) ? null : attempt([start]);
    if (!grown) continue;
    for (const next of candidates) {
      if (!holds(grown, next)) grown = attempt([...grown, next]) ?? grown;
    }
    if (grown.length > best.length) best = grown;
  }
  return best;
}

/** All products of some operations; null where one is no candidate. */
function closureWithin(
  generators: readonly Operation[],
  known: ReadonlySet<string>,
  atoms: number,
): Operation[] | null {
  const identity = { permutation: Array.from({ length: atoms }, (_, i) => i), proper: true };
  const found = new Map([[candidateKey(identity), identity as Operation]]);
  // A Map visits what is added while it is walked.
  for (const first of found.values()) {
    for (const then of generators) {
      const product = {
        permutation: first.permutation.map((j) => then.permutation[j]!),
        proper: first.proper === then.proper,
      };
      const key = candidateKey(product);
      if (found.has(key)) continue;
      if (!known.has(key) || found.size >= LARGEST_ORDER) return null;
      found.set(key, product);
    }
  }
  return [...found.values()];
}
