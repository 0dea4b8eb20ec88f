import type { Spin } from '../electrons.ts';
import type { Ligand } from '../ligands/index.ts';
import { type AcceptorLevel, acceptorLevel } from './acceptor-level.ts';
import { type ChargeTransferGeometry, type MetalElectronegativity, tabulatedSpin } from './metal-electronegativity.ts';
import { spinPairingInD, spinPairingParameter } from './spin-pairing.ts';

/** cm⁻¹ per unit of optical electronegativity. @see C. K. Jørgensen, Prog. Inorg. Chem. 12 (1970) 101 */
export const ELECTRONEGATIVITY_SCALE = 30_000;
/** By how much such estimates usually miss the observed band, in cm⁻¹ (common practice: several thousand). */
export const USUAL_ERROR = 3000;

/** Ion, field and spin state into which a ligand gives its electron. */
export interface Acceptor {
  element: string;
  oxidationState: number;
  dCount: number;
  geometry: ChargeTransferGeometry;
  spin: Spin | null;
  metal: MetalElectronegativity;
  /** Field splitting in cm⁻¹; without it no field term is given. */
  delta?: number | undefined;
  /** Racah parameter in cm⁻¹; without it no spin-pairing term is given. */
  B?: number | undefined;
}

/** An estimated ligand-to-metal band. */
export interface LmctEstimate {
  ligand: string;
  /** Which of the ligand's orbitals gives the electron. */
  orbital: 'pi' | 'sigma';
  acceptor: string;
  /** cm⁻¹, rounded to whole numbers. */
  wavenumber: number;
  /** nm; null where the estimate is no positive energy. */
  wavelength: number | null;
  /** cm⁻¹: what adds up to the wavenumber; null where a term was left out for want of Δ or B. */
  terms: { electronegativity: number; field: number | null; spinPairing: number | null };
  /** By how much such an estimate usually errs, cm⁻¹. */
  usualError: number;
}

/**
 * Energy of ligand-to-metal charge transfer from optical electronegativities:
 * 30 000 cm⁻¹ (χ(ligand) − χ(metal)), plus Δ where the electron must go into the upper level of an octahedron, plus the
 * change of spin-pairing energy.
 *
 * @returns null where the ligand has no tabulated value, or the d shell is full
 * @see C. K. Jørgensen, Prog. Inorg. Chem. 12 (1970) 101; A. B. P. Lever, Inorganic Electronic Spectroscopy, ch. 5
 */
export function lmctEstimate(ligand: Ligand, into: Acceptor): LmctEstimate | null {
  const values = ligand.opticalElectronegativity;
  const orbital = values?.pi !== undefined ? 'pi' : 'sigma';
  const chi = values?.[orbital];
  const spin = into.spin ?? tabulatedSpin(into.element, into.oxidationState, into.geometry);
  const level = acceptorLevel(into.dCount, into.geometry, spin);
  if (chi === undefined || !level) return null;
  const terms = {
    electronegativity: Math.round(ELECTRONEGATIVITY_SCALE * (chi - into.metal.value)),
    field: level.raisedByField ? (into.delta === undefined ? null : Math.round(into.delta)) : 0,
    spinPairing: into.B === undefined ? null : Math.round(pairingChange(into.dCount, level, into.B)),
  };
  const wavenumber = terms.electronegativity + (terms.field ?? 0) + (terms.spinPairing ?? 0);
  return {
    ligand: ligand.abbreviation,
    orbital,
    acceptor: level.orbital,
    wavenumber,
    wavelength: wavenumber > 0 ? Math.round(1e8 / wavenumber) / 10 : null,
    terms,
    usualError: USUAL_ERROR,
  };
}

const pairingChange = (dCount: number, { unpairedBefore, unpairedAfter }: AcceptorLevel, B: number): number =>
  spinPairingParameter(B) * (spinPairingInD(dCount + 1, unpairedAfter) - spinPairingInD(dCount, unpairedBefore));
