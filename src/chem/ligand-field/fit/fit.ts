import { DomainError } from '../../errors.ts';
import { ionFactors } from '../jorgensen.ts';
import type { CubicGeometry } from '../levels.ts';
import { type FreeIonRacah, freeIonRacah } from '../racah-b.ts';
import { assignments } from './assignments.ts';
import { candidateOf, type FitCandidate } from './candidate.ts';
import { type FitSpin, possibleGrounds } from './ground.ts';
import { plausibility, type Usual } from './plausibility.ts';
import type { Observation, Solution } from './solutions.ts';
import { type TargetTable, targetTable } from './targets.ts';

export interface FitRequest {
  /** d electrons, 1 to 9. */
  n: number;
  geometry: CubicGeometry;
  /** Symbol and oxidation state of the centre, for the free ion's B and C/B. */
  metal?: string | undefined;
  oxidationState?: number | undefined;
  /** Spin state; both are tried where it is not told. */
  spin?: FitSpin | undefined;
  /** C/B; where it is not told, the free ion's, else 4.5, unless the bands bear C. */
  ratioCB?: number | undefined;
  /** Maxima in cm⁻¹, with the level they end on (`4T2g`, `4T1g(P)`) where it is known, and their standard uncertainty. */
  bands: readonly { wavenumber: number; to?: string | undefined; uncertainty?: number | undefined }[];
}

export interface Fit {
  candidates: FitCandidate[];
}

const MOST_BANDS = 12;
const MOST_CANDIDATES = 12;
/** C/B where neither the request nor the table of free ions tells it; common practice. */
const USUAL_RATIO = 4.5;
/** Below this, in cm⁻¹, the fit has run to the bound: told only where there is nothing better. */
const LEAST_B = 1;
/** Solutions whose values agree to this share are one. */
const SAME = 1e-4;

/**
 * Δ and B (and C where the bands bear it) of a cubic complex by least squares over the complete dⁿ problem without
 * spin–orbit coupling; bands without a term are tried on all levels whose order is theirs. Candidates come best first:
 * by residuals, by spin selection, and by how usual β and the ground level are.
 *
 * @throws DomainError `out-of-range` (fields `n`, `ratioCB`, `bands`, `bands/…`), `unsupported` (`geometry`, `spin`),
 *   `unreadable` or `unknown-symbol` (`bands/…/to`)
 */
export function fit(request: FitRequest): Fit {
  const { n, geometry, spin, bands } = request;
  requireBands(bands);
  const freeIon = freeIonOf(request);
  const { ratioCB, ratioSource } = ratioOf(request, freeIon);
  const observations = observationsOf(bands);
  const usual = usualOf(request, freeIon);
  const refusals: DomainError[] = [];
  const found = possibleGrounds(n, geometry, spin, ratioCB).flatMap((ground) => {
    try {
      const table = targetTable(n, geometry, ground, ratioCB);
      const all = assignments(table, bands, observations, usual, request.ratioCB === undefined);
      return all.map((solution) => ({ table, solution, ...plausibility(n, table, solution, observations, usual) }));
    } catch (error) {
      // A term that one spin state lacks may be there in the other.
      if (!(error instanceof DomainError)) throw error;
      refusals.push(error);
      return [];
    }
  });
  if (found.length === 0) {
    throw (
      refusals[0] ??
      new DomainError(
        'out-of-range',
        bands.length < 2
          ? 'One band does not give both Δ and B here: add a second one.'
          : 'No assignment of these bands gives a Δ and a B: check the ion, the geometry and the bands.',
        'bands',
      )
    );
  }
  const sound = found.filter(({ solution: { B } }) => B === null || B >= LEAST_B);
  const ranked = (sound.length > 0 ? sound : found).sort((a, b) => a.score - b.score);
  const candidates = ranked
    .filter((one, i) => !ranked.slice(0, i).some((before) => isSame(before, one)))
    .slice(0, MOST_CANDIDATES)
    .map(({ table, solution, ...worth }) =>
      candidateOf(request, table, solution, observations, worth, freeIon, ratioSource),
    );
  return { candidates };
}

function requireBands(bands: FitRequest['bands']): void {
  if (bands.length === 0 || bands.length > MOST_BANDS) {
    throw new DomainError('out-of-range', `Give 1 to ${MOST_BANDS} bands, not ${bands.length}.`, 'bands');
  }
  bands.forEach(({ wavenumber, uncertainty }, i) => {
    const refuse = (name: string, value: number): never => {
      throw new DomainError('out-of-range', `${name} must be above 0, not ${value}.`, `bands/${i}/${name}`);
    };
    if (!(wavenumber > 0 && Number.isFinite(wavenumber))) refuse('wavenumber', wavenumber);
    if (uncertainty !== undefined && !(uncertainty > 0 && Number.isFinite(uncertainty)))
      refuse('uncertainty', uncertainty);
  });
}

function freeIonOf({ metal, oxidationState }: FitRequest): FreeIonRacah | null {
  return metal === undefined || oxidationState === undefined ? null : freeIonRacah(metal, oxidationState);
}

/** Share of an octahedral Δ that the same ligands give in a geometry; angular overlap model. */
const SHARE: Record<CubicGeometry, number> = { 'OC-6': 1, 'T-4': 4 / 9, 'CU-8': 8 / 9 };

function usualOf({ geometry, metal, oxidationState }: FitRequest, freeIon: FreeIonRacah | null): Usual {
  const ion = metal === undefined || oxidationState === undefined ? null : ionFactors(metal, oxidationState);
  return { freeIonB: freeIon?.B ?? null, delta: ion && SHARE[geometry] * ion.g };
}

function ratioOf(
  { ratioCB }: FitRequest,
  freeIon: FreeIonRacah | null,
): { ratioCB: number; ratioSource: FitCandidate['ratioSource'] } {
  if (ratioCB !== undefined) {
    if (ratioCB > 0 && ratioCB <= 20) return { ratioCB, ratioSource: 'given' };
    throw new DomainError('out-of-range', `ratioCB must be above 0 and at most 20, not ${ratioCB}.`, 'ratioCB');
  }
  if (freeIon?.ratioCB) return { ratioCB: freeIon.ratioCB, ratioSource: 'free ion' };
  return { ratioCB: USUAL_RATIO, ratioSource: 'assumed' };
}

/** Bands without an uncertainty weigh as much as the least certain of the others. */
function observationsOf(bands: FitRequest['bands']): Observation[] {
  const told = bands.map(({ uncertainty }) => uncertainty).filter((u) => u !== undefined);
  const largest = told.length > 0 ? Math.max(...told) : 1;
  return bands.map(({ wavenumber, uncertainty }) => ({
    wavenumber,
    weight: 1 / (uncertainty ?? largest) ** 2,
    certain: uncertainty !== undefined,
  }));
}

interface Rated {
  table: TargetTable;
  solution: Solution;
  score: number;
  remarks: string[];
}

function isSame(a: Rated, b: Rated): boolean {
  const near = (x: number | null, y: number | null): boolean =>
    x === y || (x !== null && y !== null && Math.abs(x - y) <= SAME * Math.abs(x));
  const { solution: p } = a;
  const { solution: q } = b;
  return (
    a.table.ground === b.table.ground &&
    p.targets.every((target, i) => target === q.targets[i]) &&
    near(p.delta, q.delta) &&
    near(p.B, q.B)
  );
}
