import type { LigandReading } from '#src/chem/formula/index.ts';
import { estimateBeta, estimateDelta, freeIonRacah } from '#src/chem/ligand-field/index.ts';
import type { Sliders } from './slider-state.ts';

/** Where nothing is tabulated; common practice. */
const USUAL = { delta: 15_000, B: 800, beta: 0.8, ratioCB: 4.5 };

/** Where the sliders begin: at Δ from f·g and B from h·k where the tables have ion and ligands, else at usual values. */
export function firstSliders(
  { element, oxidationState }: { element: string; oxidationState: number | null },
  geometry: string,
  ligands: readonly Pick<LigandReading, 'abbreviation' | 'count' | 'denticity'>[],
): Sliders {
  const free = oxidationState === null ? null : freeIonRacah(element, oxidationState);
  const donors = ligands.map(({ abbreviation, count, denticity }) => ({ abbreviation, count: count * denticity }));
  const total = donors.reduce((sum, { count }) => sum + count, 0);
  const six = donors.map((donor) => ({ ...donor, count: (donor.count * 6) / total }));
  const asked = { element, oxidationState: oxidationState ?? 0, donors: six };
  const known = oxidationState !== null && total > 0 && [4, 6, 8].includes(total);
  const share = geometry === 'T-4' ? 4 / 9 : geometry === 'CU-8' ? 8 / 9 : 1;
  const delta = ((known && estimateDelta(asked)) || USUAL.delta) * share;
  const beta = (known && estimateBeta(asked)) || USUAL.beta;
  const B = Math.round(free ? beta * free.B : USUAL.B);
  const ratioCB = free?.ratioCB ?? USUAL.ratioCB;
  return { delta: Math.round(delta / 10) * 10, B, C: Math.round(ratioCB * B), zeta: 0, ratioCB };
}
