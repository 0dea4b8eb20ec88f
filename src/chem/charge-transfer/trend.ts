import { dElectronCount } from '../electrons.ts';
import type { Ligand } from '../ligands/index.ts';
import { lmctEstimate } from './lmct.ts';
import { type ChargeTransferGeometry, metalElectronegativity } from './metal-electronegativity.ts';

/** A line of a trend plot: one ion with one ligand after the other, or one ligand with one ion after the other. */
export interface LmctTrend {
  ion: { element: string; oxidationState: number };
  points: { ligand: string; wavenumber: number }[];
}

/**
 * LMCT estimates of several ions with several ligands, for plotting one against the other. Field and spin pairing are
 * left out, so that the lines compare ligands; a pair without tabulated values is left out of its line.
 */
export function lmctTrend(
  ions: readonly { element: string; oxidationState: number }[],
  ligands: readonly Ligand[],
  geometry: ChargeTransferGeometry,
): LmctTrend[] {
  return ions.flatMap((ion) => {
    const metal = metalElectronegativity(ion.element, ion.oxidationState, geometry);
    const dCount = dElectronCount(ion.element, ion.oxidationState);
    if (!metal || dCount === null) return [];
    const into = { ...ion, dCount, geometry, spin: null, metal };
    const points = ligands
      .map((ligand) => lmctEstimate(ligand, into))
      .filter((estimate) => estimate !== null)
      .map(({ ligand, wavenumber }) => ({ ligand, wavenumber }));
    return [{ ion, points }];
  });
}
