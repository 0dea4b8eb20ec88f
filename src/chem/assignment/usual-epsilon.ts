/** What decides the usual strength of a band. */
export interface IntensityFacts {
  kind: 'd-d' | 'charge-transfer';
  spinAllowed: boolean;
  /** Whether the site has a centre of inversion, none, or is a tetrahedron, where d and p orbitals mix most. */
  site: 'centrosymmetric' | 'acentric' | 'tetrahedral';
  /** Row of the metal: 4 for 3d, 5 for 4d, 6 for 5d. */
  period: number;
}

/** Usual limits of the molar absorption coefficient, dm³ mol⁻¹ cm⁻¹; soft by a factor of about three either way. */
export interface UsualEpsilon {
  from: number;
  to: number;
  /** Geometric mean of the limits. */
  typical: number;
  source: string;
}

const SHRIVER = 'Shriver & Atkins, Inorganic Chemistry, 5th ed., Oxford 2010, ch. 20 (from memory)';
const LEVER = 'A. B. P. Lever, Inorganic Electronic Spectroscopy, 2nd ed., Elsevier 1984, ch. 4 (from memory)';

/** Spin–orbit coupling lends spin-forbidden bands of heavy metals what 3d ions do not have. */
const SPIN_FORBIDDEN: Record<number, readonly [number, number]> = { 4: [0.001, 1], 5: [0.1, 50], 6: [1, 500] };

/** Usual limits of ε of a band of this kind. */
export function usualEpsilon({ kind, spinAllowed, site, period }: IntensityFacts): UsualEpsilon {
  if (kind === 'charge-transfer') return spinAllowed ? limits(1000, 50_000, SHRIVER) : limits(10, 1000, LEVER);
  if (!spinAllowed) {
    const [from, to] = SPIN_FORBIDDEN[Math.min(6, Math.max(4, period))]!;
    // Without a centre the Laporte rule no longer takes its share.
    return site === 'centrosymmetric' ? limits(from, to, SHRIVER) : limits(from, 10 * to, LEVER);
  }
  if (site === 'tetrahedral') return limits(100, 1000, SHRIVER);
  return site === 'acentric' ? limits(10, 1000, LEVER) : limits(1, 100, SHRIVER);
}

const limits = (from: number, to: number, source: string): UsualEpsilon => ({
  from,
  to,
  typical: Math.sqrt(from * to),
  source,
});
