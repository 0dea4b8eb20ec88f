import type { SelectionRules } from './selection-rules.ts';

/** The order of ε that transitions of a kind show, in dm³ mol⁻¹ cm⁻¹. */
export interface ExpectedEpsilon {
  from: number;
  to: number;
  /** What the range is for, in words. */
  basis: string;
}

/**
 * The order of the molar absorption coefficient to expect of a transition that follows certain rules.
 *
 * Ranges of experience, not of theory: B. N. Figgis, M. A. Hitchman, Ligand Field Theory and Its Applications, 2000;
 * A. B. P. Lever, Inorganic Electronic Spectroscopy, 2nd ed., 1984 (from memory).
 */
export function expectedEpsilon(rules: SelectionRules): ExpectedEpsilon {
  const { spinAllowed, laporteAllowed, mechanism, spinOrbit } = rules;
  const range = (from: number, to: number, basis: string): ExpectedEpsilon => ({ from, to, basis });
  if (spinAllowed) {
    if (mechanism === 'allowed') {
      return laporteAllowed
        ? range(1000, 50_000, 'spin-allowed and Laporte-allowed, as charge transfer is')
        : range(10, 1000, 'a spin-allowed d–d transition without a centre of inversion; charge transfer is stronger');
    }
    if (mechanism === 'vibronic') return range(1, 100, 'spin-allowed, with intensity from vibrations');
    return range(0, 1, 'no electric dipole mechanism judged here');
  }
  if (spinOrbit.allowed === false && spinOrbit.order === null) return range(0, 0.001, 'joined by nothing judged here');
  const weak = (spinOrbit.order ?? 1) > 1;
  if (laporteAllowed) return range(weak ? 0.1 : 1, weak ? 10 : 1000, 'spin-forbidden, Laporte-allowed');
  if (spinOrbit.allowed) {
    return range(
      weak ? 0.001 : 0.1,
      weak ? 0.1 : 10,
      'spin-forbidden, without a centre of inversion, by spin–orbit coupling',
    );
  }
  return range(0.001, weak ? 0.1 : 1, 'spin-forbidden, with intensity from spin–orbit coupling and vibrations');
}
