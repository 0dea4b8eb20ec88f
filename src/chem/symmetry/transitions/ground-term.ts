import { type Spin, type SpinChoice, spinChoices } from '../../electrons.ts';
import type { Geometry } from '../../geometry/catalogue.ts';
import { findGroup } from '../groups.ts';
import { dOrbitals } from '../splitting.ts';
import type { Term } from '../term-label.ts';

/** The ground term of a centre in the group of its ideal polyhedron, or why there is none to tell. */
export type GroundTerm = { term: Term; spin: Spin; reason: null } | { term: null; spin: null; reason: string };

/**
 * Orbital that lies highest, with the metal's ligands as the polyhedron has them; common practice of ligand-field
 * theory (J. K. Burdett, Molecular Shapes, 1980; from memory).
 */
const HIGHEST: Record<string, string> = {
  'SP-4': 'x2-y2',
  'SPY-5': 'x2-y2',
  'TBPY-5': 'z2',
  'PBPY-7': 'z2',
  'HBPY-8': 'z2',
};

const unknown = (reason: string): GroundTerm => ({ term: null, spin: null, reason });

/**
 * Ground term of dⁿ, 1 to 9, in an ideal polyhedron.
 *
 * In cubic fields the filling of t2 and e settles it. Elsewhere it is told where one orbital lies far above the rest
 * and the others are empty of choice: a hole in it, four others filled, each once or twice; and for the half-filled
 * shell, which is totally symmetric anywhere.
 *
 * @param spin - null while it is not stated
 */
export function groundTermIn(geometry: Geometry, n: number, spin: Spin | null): GroundTerm {
  const { symbol, group } = geometry;
  if (symbol === 'OC-6' || symbol === 'T-4') return cubicGround(spinChoices(n, symbol), spin, (irrep) => irrep);
  // The cube splits d orbitals as the tetrahedron does, and has a centre.
  if (symbol === 'CU-8') return cubicGround(spinChoices(n, 'T-4'), spin, (irrep) => `${irrep}g`);
  const symmetric = findGroup(group)!.irreps[0]!.label;
  if (n === 5 && spin === 'high') return { term: { multiplicity: 6, irrep: symmetric }, spin, reason: null };
  const top = HIGHEST[symbol];
  const irrep = top && dOrbitals(group).find(({ orbital }) => orbital === top)?.irrep;
  if (irrep) {
    const hole = irrep.charAt(0).toUpperCase() + irrep.slice(1);
    if (n === 9) return { term: { multiplicity: 2, irrep: hole }, spin: 'high', reason: null };
    if (n === 8 && spin === 'low') return { term: { multiplicity: 1, irrep: symmetric }, spin, reason: null };
    if (n === 4 && spin === 'high') return { term: { multiplicity: 5, irrep: hole }, spin, reason: null };
  }
  const stated = spin === null ? 'The spin state is not stated, and the' : 'The';
  return unknown(
    `${stated} order of the d levels in ${symbol} does not follow from symmetry alone, so that the ground term of d${n} is not known.`,
  );
}

function cubicGround(choices: readonly SpinChoice[], spin: Spin | null, named: (irrep: string) => string): GroundTerm {
  const choice = choices.length === 1 ? choices[0] : choices.find((each) => each.spin === spin);
  if (!choice?.groundTerm) {
    const states = choices.map((each) => each.spin).join(' or ');
    return unknown(`The spin state is not stated: it may be ${states}, and the ground term hangs on it.`);
  }
  const [, multiplicity, irrep] = /^(\d)(.+)$/.exec(choice.groundTerm.label)!;
  return { term: { multiplicity: Number(multiplicity), irrep: named(irrep!) }, spin: choice.spin, reason: null };
}
