import { findElement } from './elements.ts';

/** Fields for which spin states are told apart. */
export type FieldGeometry = 'OC-6' | 'T-4' | 'SP-4';
export type Spin = 'low' | 'intermediate' | 'high';

export interface SpinChoice {
  spin: Spin;
  unpaired: number;
  /** One-electron orbitals with their electrons: `t2g3 eg0`, `e2 t21`. */
  configuration: string;
  /** √(n(n+2)) in Bohr magnetons. */
  spinOnlyMoment: number;
  /** Ground term with the group it is labelled in; null where the field is not cubic. */
  groundTerm: { label: string; group: 'Oh' | 'Td' } | null;
  /** Ligand-field stabilisation in Δ (Δo or Δt), pairing energy left out; null where the field is not cubic. */
  lfseInDelta: number | null;
  /** Pairs beyond those of the high-spin state. */
  extraPairs: number;
}

/**
 * d-electron count of a centre: group number − oxidation state.
 *
 * @returns null for a symbol without group, or where the count would leave 0 to 10
 * @see common practice; the s electrons count as d electrons in a complex
 */
export function dElectronCount(symbol: string, oxidationState: number): number | null {
  const group = findElement(symbol)?.group;
  if (group === undefined || group === null) return null;
  const count = group - oxidationState;
  return count >= 0 && count <= 10 ? count : null;
}

/** Spin-only magnetic moment √(n(n+2)) in Bohr magnetons of n unpaired electrons. */
export function spinOnlyMoment(unpaired: number): number {
  return Math.sqrt(unpaired * (unpaired + 2));
}

/** A level of degenerate orbitals, lowest first, with its energy in Δ. */
interface Level {
  label: string;
  size: number;
  energy: number;
}

const LEVELS: Record<'OC-6' | 'T-4', readonly [Level, Level]> = {
  'OC-6': [
    { label: 't2g', size: 3, energy: -0.4 },
    { label: 'eg', size: 2, energy: 0.6 },
  ],
  'T-4': [
    { label: 'e', size: 2, energy: -0.6 },
    { label: 't2', size: 3, energy: 0.4 },
  ],
};

/**
 * The spin states a dⁿ centre can take in a field, most paired first; one entry where there is no choice.
 *
 * Octahedra and tetrahedra: high spin fills singly before it pairs, low spin fills the lower level first. Square
 * planes: five single levels, of which the topmost (x²−y²) is left empty as long as it can be (low), the rest being
 * filled by Hund's rule (intermediate) or all five (high).
 *
 * @param dCount - whole number 0 to 10; a fractional or missing count has no spin states: `[]`
 */
export function spinChoices(dCount: number | null, geometry: FieldGeometry): SpinChoice[] {
  if (dCount === null || !Number.isInteger(dCount) || dCount < 0 || dCount > 10) return [];
  return geometry === 'SP-4' ? squarePlanarChoices(dCount) : cubicChoices(dCount, geometry);
}

function cubicChoices(dCount: number, geometry: 'OC-6' | 'T-4'): SpinChoice[] {
  const levels = LEVELS[geometry];
  const high = fillByHund(dCount, levels);
  const lowFirst = Math.min(dCount, 2 * levels[0].size);
  const low: [number, number] = [lowFirst, dCount - lowFirst];
  const choice = (spin: Spin, [lower, upper]: [number, number]): SpinChoice => {
    const unpaired = unpairedIn(lower, levels[0].size) + unpairedIn(upper, levels[1].size);
    const highUnpaired = unpairedIn(high[0], levels[0].size) + unpairedIn(high[1], levels[1].size);
    return {
      spin,
      unpaired,
      configuration: `${levels[0].label}${lower} ${levels[1].label}${upper}`,
      spinOnlyMoment: spinOnlyMoment(unpaired),
      groundTerm: cubicGroundTerm(lower, upper, unpaired, geometry),
      lfseInDelta: lower * levels[0].energy + upper * levels[1].energy + 0,
      extraPairs: (highUnpaired - unpaired) / 2,
    };
  };
  const highChoice = choice('high', high);
  const lowChoice = choice('low', low);
  return lowChoice.unpaired === highChoice.unpaired ? [highChoice] : [lowChoice, highChoice];
}

/** Electrons in the lower and the upper level when all five orbitals take one before any takes two. */
function fillByHund(dCount: number, [lower]: readonly [Level, Level]): [number, number] {
  const single = Math.min(dCount, 5);
  const paired = dCount - single;
  const inLower = Math.min(single, lower.size) + Math.min(paired, lower.size);
  return [inLower, dCount - inLower];
}

function unpairedIn(electrons: number, size: number): number {
  return electrons <= size ? electrons : 2 * size - electrons;
}

/**
 * Ground term of t^m e^n with the greatest spin its level filling allows. Each set alone gives an A (empty, half full,
 * full), a T or an E; in every ground configuration at least one of the two is an A, so the product is one irrep.
 */
function cubicGroundTerm(
  lower: number,
  upper: number,
  unpaired: number,
  geometry: 'OC-6' | 'T-4',
): { label: string; group: 'Oh' | 'Td' } {
  const [t, e] = geometry === 'OC-6' ? [lower, upper] : [upper, lower];
  const orbital = productWithA(TERM_OF_T[t] ?? 'A1', TERM_OF_E[e] ?? 'A1');
  return geometry === 'OC-6'
    ? { label: `${unpaired + 1}${orbital}g`, group: 'Oh' }
    : { label: `${unpaired + 1}${orbital}`, group: 'Td' };
}

/** Orbital irrep of the highest-spin state of t2 filled with 0 to 6, and of e filled with 0 to 4, electrons. */
const TERM_OF_T = ['A1', 'T2', 'T1', 'A2', 'T1', 'T2', 'A1'];
const TERM_OF_E = ['A1', 'E', 'A2', 'E', 'A1'];

/** Product of two irreps of O or Td, one of them A1 or A2. */
function productWithA(a: string, b: string): string {
  const [one, other] = a.startsWith('A') ? [a, b] : [b, a];
  if (one === 'A1') return other;
  return { A1: 'A2', A2: 'A1', T1: 'T2', T2: 'T1' }[other] ?? other;
}

function squarePlanarChoices(dCount: number): SpinChoice[] {
  const unpairedWith = (orbitals: number) => (dCount <= orbitals ? dCount : Math.max(2 * orbitals - dCount, 0));
  const high = dCount <= 5 ? dCount : 10 - dCount;
  const choices = new Map<number, SpinChoice>();
  const add = (spin: Spin, unpaired: number, configuration: string) => {
    if (choices.has(unpaired)) return;
    const extraPairs = (high - unpaired) / 2;
    choices.set(unpaired, {
      spin,
      unpaired,
      configuration,
      spinOnlyMoment: spinOnlyMoment(unpaired),
      groundTerm: null,
      lfseInDelta: null,
      extraPairs,
    });
  };
  add('high', high, `d${dCount}, ${high} unpaired`);
  if (dCount <= 8) {
    const intermediate = unpairedWith(4);
    if (intermediate < high) {
      add(
        intermediate <= 1 ? 'low' : 'intermediate',
        intermediate,
        `d${dCount}, x2-y2 empty, ${intermediate} unpaired`,
      );
      const low = dCount % 2;
      if (low < intermediate) add('low', low, `d${dCount}, x2-y2 empty, ${low} unpaired`);
    }
  }
  return [...choices.values()].sort((a, b) => a.unpaired - b.unpaired);
}
