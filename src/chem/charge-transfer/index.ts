import { dElectronCount, type Spin } from '../electrons.ts';
import { DomainError } from '../errors.ts';
import { findLigand, type Ligand, nearestLigand } from '../ligands/index.ts';
import { type LmctEstimate, lmctEstimate, USUAL_ERROR } from './lmct.ts';
import { type ChargeTransferGeometry, metalElectronegativity } from './metal-electronegativity.ts';
import { judgeMlct, type MlctJudgement } from './mlct.ts';

export { ELECTRONEGATIVITY_SCALE, type LmctEstimate, lmctEstimate } from './lmct.ts';
export {
  type ChargeTransferGeometry,
  type MetalElectronegativity,
  metalElectronegativity,
} from './metal-electronegativity.ts';
export { judgeMlct, type MlctJudgement } from './mlct.ts';
export { spinPairingInD, spinPairingParameter } from './spin-pairing.ts';
export { type LmctTrend, lmctTrend } from './trend.ts';

export interface ChargeTransferRequest {
  element: string;
  oxidationState: number;
  /** Polyhedral symbol; estimates are tabulated for OC-6, T-4 and SP-4. */
  geometry: string;
  /** Abbreviations or formulae of the library; one named twice is told once. */
  ligands: readonly string[];
  spin?: Spin | null | undefined;
  /** cm⁻¹ */
  delta?: number | undefined;
  /** cm⁻¹ */
  B?: number | undefined;
}

export interface ChargeTransfer {
  /** By rising energy. */
  lmct: LmctEstimate[];
  mlct: MlctJudgement[];
  /** What kind of estimate this is, its usual error, what was left out and why. */
  reasons: string[];
}

const GEOMETRIES: readonly string[] = ['OC-6', 'T-4', 'SP-4'];
const isTabulated = (geometry: string): geometry is ChargeTransferGeometry => GEOMETRIES.includes(geometry);

/**
 * What charge-transfer bands an ion with these ligands can have: LMCT estimated from optical electronegativities, MLCT
 * judged as plausible or not.
 *
 * @throws {DomainError} `unknown-symbol` for a ligand that is not in the library, `out-of-range` for an oxidation state
 *   that the element cannot have with 0 to 10 d electrons
 */
export function chargeTransfer(request: ChargeTransferRequest): ChargeTransfer {
  const { element, oxidationState } = request;
  const dCount = dElectronCount(element, oxidationState);
  if (dCount === null)
    throw new DomainError(
      'out-of-range',
      `${element} has no d-electron count in oxidation state ${oxidationState}`,
      'oxidationState',
    );
  const named = [...new Map(request.ligands.map((text, i) => [text, readLigand(text, i)])).values()];
  const ligands = [...new Map(named.map((ligand) => [ligand.abbreviation, ligand])).values()];
  const { lmct, reasons } = estimates(request, dCount, ligands);
  return { lmct, mlct: ligands.map((l) => judgeMlct(l, { element, oxidationState, dCount })), reasons };
}

function readLigand(text: string, index: number): Ligand {
  const found = findLigand(text);
  if (found) return found;
  const near = nearestLigand(text);
  throw new DomainError(
    'unknown-symbol',
    `ligand ${text} unknown${near ? `; did you mean ${near}?` : ''}`,
    `ligands/${index}`,
  );
}

function estimates(
  { element, oxidationState, geometry, spin = null, delta, B }: ChargeTransferRequest,
  dCount: number,
  ligands: readonly Ligand[],
): Pick<ChargeTransfer, 'lmct' | 'reasons'> {
  const none = (...reasons: string[]) => ({ lmct: [], reasons });
  if (dCount === 10) return none('A d¹⁰ ion has no d–d band and no LMCT into the d shell: it is full.');
  const d0 = dCount === 0 ? ['A d⁰ ion has no d–d and no MLCT band: its colour is LMCT or of the ligands.'] : [];
  const ion = `${element} in oxidation state ${oxidationState}`;
  if (!isTabulated(geometry))
    return none(
      ...d0,
      `Optical electronegativities are tabulated for ${GEOMETRIES.join(', ')}: no LMCT estimate for ${geometry}.`,
    );
  const metal = metalElectronegativity(element, oxidationState, geometry);
  if (!metal) return none(...d0, `No optical electronegativity is known for ${ion} in ${geometry}: no LMCT estimate.`);

  const into = { element, oxidationState, dCount, geometry, spin, metal, delta, B };
  const found = ligands.map((ligand) => lmctEstimate(ligand, into)).filter((estimate) => estimate !== null);
  const lmct = found.sort((a, b) => a.wavenumber - b.wavenumber);
  const known = new Set(lmct.map(({ ligand }) => ligand));
  const unknown = ligands.map((l) => l.abbreviation).filter((name) => !known.has(name));
  return {
    lmct,
    reasons: [
      ...d0,
      ...(lmct.length > 0 ? [kindOfEstimate(ion, metal.value, metal.source), ...leftOut(lmct)] : []),
      ...(unknown.length > 0 ? [`No optical electronegativity is known for ${unknown.join(', ')}.`] : []),
    ],
  };
}

const kindOfEstimate = (ion: string, chi: number, source: string): string =>
  `Estimated from optical electronegativities, 30 000 cm⁻¹ times their difference, with ${chi} for ${ion} (${source}). ` +
  `Such estimates usually err by ${USUAL_ERROR} cm⁻¹ or more.`;

function leftOut(lmct: readonly LmctEstimate[]): string[] {
  const raised = lmct.find(({ terms }) => terms.field !== 0);
  const unpaired = lmct.some(({ terms }) => terms.spinPairing === null);
  return [
    ...(raised
      ? [
          raised.terms.field === null
            ? `The lower level is full, so that the electron goes into ${raised.acceptor}: Δ must be added and was not given.`
            : `The lower level is full, so that the electron goes into ${raised.acceptor}: Δ is added.`,
        ]
      : []),
    ...(unpaired ? ['The change of spin pairing is left out: give B to have it.'] : []),
    ...(lmct.some(({ wavenumber }) => wavenumber <= 0)
      ? ['An estimate at or below zero means that the ligand reduces the metal: such a complex hardly lives.']
      : []),
  ];
}
