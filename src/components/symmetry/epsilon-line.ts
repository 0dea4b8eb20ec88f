import { type UsualEpsilon, usualEpsilon } from '#src/chem/assignment/usual-epsilon.ts';
import { findElement } from '#src/chem/elements.ts';
import { groupDigits } from '#src/components/notation/quantity.ts';
import type { BandRecord } from '#src/contracts/spectra.ts';
import type { ArgumentLine } from './argument.ts';

const CHARGE_TRANSFER = ['LMCT', 'MLCT', 'intervalence', 'metal-metal', 'interligand'];
/** Limits are soft by about this factor either way. */
const SOFT = 3;

/** What the usual strength of a band hangs on. */
export interface ClassFacts {
  bandClass: BandRecord['assignment']['class'];
  spinAllowed: boolean;
  element: string;
  geometry: string | null;
  centrosymmetric: boolean;
}

/** Usual limits of ε of a class, or null for a class that has none: intraligand bands may have any strength. */
export function usualOf({
  bandClass,
  spinAllowed,
  element,
  geometry,
  centrosymmetric,
}: ClassFacts): UsualEpsilon | null {
  const kind = bandClass === 'd-d' ? bandClass : CHARGE_TRANSFER.includes(bandClass) ? 'charge-transfer' : null;
  if (kind === null) return null;
  const site = geometry === 'T-4' ? 'tetrahedral' : centrosymmetric ? 'centrosymmetric' : 'acentric';
  return usualEpsilon({ kind, spinAllowed, site, period: findElement(element)?.period ?? 4 });
}

const figures = (value: number): string => groupDigits(String(Number(value.toPrecision(3))));

/** Whether the measured ε lies in the usual range of its class. `epsilon` is undefined where there is no band. */
export function epsilonLine(epsilon: number | null | undefined, usual: UsualEpsilon | null): ArgumentLine {
  const topic = 'Strength';
  const unit = { unit: 'dm3 mol-1 cm-1' };
  if (usual === null) {
    return { topic, verdict: null, pieces: ['bands of this class have no usual range of ', 'ε to compare with.'] };
  }
  const range = [`${figures(usual.from)} to ${figures(usual.to)} `, unit];
  if (epsilon === undefined)
    return { topic, verdict: null, pieces: ['the usual range of ε of such a band is ', ...range, '.'] };
  if (epsilon === null) {
    return {
      topic,
      verdict: null,
      pieces: ['no ε is measured for this band; the usual range of its class is ', ...range, '.'],
    };
  }
  const said = `ε of ${figures(epsilon)} `;
  if (epsilon >= usual.from && epsilon <= usual.to) {
    return { topic, verdict: null, pieces: [`${said}lies in the usual range of its class, `, ...range, '.'] };
  }
  const above = epsilon > usual.to;
  const near = above ? epsilon <= SOFT * usual.to : epsilon >= usual.from / SOFT;
  return {
    topic,
    verdict: null,
    pieces: [
      `${said}lies ${near ? 'a little ' : 'far '}${above ? 'above' : 'below'} the usual range of its class, `,
      ...range,
      near ? ', whose limits are soft.' : ': look at the assignment, the concentration and what overlaps.',
    ],
  };
}
