import { type FieldGeometry, type Spin, type SpinChoice, spinChoices } from '../electrons.ts';

/** Where the electron of an LMCT transition goes, and what becomes of the spin. */
export interface AcceptorLevel {
  /** `t2g`, `eg`, `e`, `t2`; `x2-y2` in a square plane. */
  orbital: string;
  /** Whether it lies above the level to which the metal's electronegativity refers, by one field splitting. */
  raisedByField: boolean;
  unpairedBefore: number;
  unpairedAfter: number;
  configuration: string;
}

const SIZES: Record<string, number> = { t2g: 3, eg: 2, e: 2, t2: 3 };

/**
 * The lowest level of dⁿ that can take one more electron, with the spin it then has.
 *
 * In an octahedron that is t2g as long as it has a hole, else eg, one Δ higher. A tetrahedron's tabulated values refer
 * to the lowest level with a hole itself; a square plane's to the empty x² − y².
 *
 * @param spin - the state among those that dⁿ has there; ignored where there is one only
 * @returns null for d¹⁰, which can take none
 */
export function acceptorLevel(dCount: number, geometry: FieldGeometry, spin: Spin | null): AcceptorLevel | null {
  if (dCount >= 10) return null;
  const choice = spinState(dCount, geometry, spin);
  if (!choice) return null;
  if (geometry === 'SP-4') {
    const before = choice.unpaired;
    return {
      orbital: 'x2-y2',
      raisedByField: false,
      unpairedBefore: before,
      unpairedAfter: dCount <= 8 ? before + 1 : before - 1,
      configuration: choice.configuration,
    };
  }
  const levels = [...choice.configuration.matchAll(/(t2g|eg|e|t2)(\d)(?=\s|$)/g)].map(([, orbital, held]) => ({
    orbital: orbital!,
    held: Number(held),
    size: SIZES[orbital!]!,
  }));
  const taker = levels.find(({ held, size }) => held < 2 * size)!;
  return {
    orbital: taker.orbital,
    raisedByField: taker.orbital === 'eg',
    unpairedBefore: choice.unpaired,
    unpairedAfter: choice.unpaired + (taker.held < taker.size ? 1 : -1),
    configuration: choice.configuration,
  };
}

/** The spin state asked for, or the only one; where nothing is said, high in a tetrahedron, whose field is weak, else low. */
function spinState(dCount: number, geometry: FieldGeometry, spin: Spin | null): SpinChoice | undefined {
  const choices = spinChoices(dCount, geometry);
  return choices.find((choice) => choice.spin === spin) ?? (geometry === 'T-4' ? choices.at(-1) : choices[0]);
}
