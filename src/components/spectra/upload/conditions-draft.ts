import type { SpectrumMetadata, SpectrumRecord } from '#src/contracts/spectra.ts';
import { numberText, readNumber } from './read-number.ts';

export type Technique = SpectrumRecord['technique'];
export type ConcentrationUnit = 'mol' | 'mmol' | 'umol';

/** Conditions of a measurement as they are typed. Empty texts are what was not told. */
export interface ConditionsDraft {
  title: string;
  technique: Technique;
  /** Parts in per cent of the volume; one part needs none. */
  solvents: { name: string; percent: string }[];
  concentration: string;
  concentrationUncertainty: string;
  concentrationUnit: ConcentrationUnit;
  pathLength: string;
  pathLengthUncertainty: string;
  k: '1' | '2' | '3';
  temperature: string;
  phase: string;
  pH: string;
  ionicStrength: string;
  electrolyte: string;
  atmosphere: string;
  age: string;
  bandwidth: string;
  cell: string;
  polarisation: string;
  operator: string;
  measuredAt: string;
  notes: string;
  visibility: 'programme' | 'lab';
}

export const emptyConditions: ConditionsDraft = {
  title: '',
  technique: 'solution',
  solvents: [{ name: '', percent: '' }],
  concentration: '',
  concentrationUncertainty: '',
  concentrationUnit: 'mol',
  pathLength: '1',
  pathLengthUncertainty: '',
  k: '1',
  temperature: '',
  phase: '',
  pH: '',
  ionicStrength: '',
  electrolyte: '',
  atmosphere: '',
  age: '',
  bandwidth: '',
  cell: '',
  polarisation: '',
  operator: '',
  measuredAt: '',
  notes: '',
  visibility: 'programme',
};

/** Parts of a mole in the unit of the field. */
export const UNIT_FACTOR: Record<ConcentrationUnit, number> = { mol: 1, mmol: 1e-3, umol: 1e-6 };
export const UNIT_TEXT: Record<ConcentrationUnit, string> = { mol: 'mol dm⁻³', mmol: 'mmol dm⁻³', umol: 'µmol dm⁻³' };

const POSITIVE = [
  'concentration',
  'concentrationUncertainty',
  'pathLength',
  'pathLengthUncertainty',
  'temperature',
  'bandwidth',
] as const;
const TEXTS = ['title', 'cell', 'polarisation', 'operator', 'measuredAt', 'notes'] as const;
const MEDIUM_TEXTS = ['electrolyte', 'atmosphere', 'age'] as const;
const NO_NUMBER = 'Write a number, such as 0.005 or 5e-3';

export type ConditionErrors = Partial<Record<keyof ConditionsDraft, string>>;

/** What cannot be sent as it is typed, field by field. */
export function conditionErrors(draft: ConditionsDraft): ConditionErrors {
  const errors: ConditionErrors = {};
  for (const name of POSITIVE) {
    const value = readNumber(draft[name]);
    if (value === null) continue;
    if (Number.isNaN(value)) errors[name] = NO_NUMBER;
    else if (value <= 0) errors[name] = 'It must be more than nought';
  }
  for (const name of ['pH', 'ionicStrength'] as const) {
    const value = readNumber(draft[name]);
    if (value !== null && Number.isNaN(value)) errors[name] = NO_NUMBER;
  }
  if (!errors.ionicStrength && (readNumber(draft.ionicStrength) ?? 0) < 0)
    errors.ionicStrength = 'It is never negative';
  const pH = readNumber(draft.pH);
  if (!errors.pH && pH !== null && (pH < -3 || pH > 17)) errors.pH = 'From −3 to 17';
  const parts = namedSolvents(draft);
  if (parts.length > 1) {
    const shares = parts.map(({ percent }) => readNumber(percent));
    if (shares.some((share) => share === null || !(share > 0))) errors.solvents = 'Give the share of every part, in %';
    else {
      const sum = shares.reduce((total: number, share) => total + (share ?? 0), 0);
      if (Math.abs(sum - 100) > 2)
        errors.solvents = `The shares add up to ${Number(sum.toPrecision(4))} %, not to 100 %`;
    }
  }
  return errors;
}

const namedSolvents = ({ solvents }: Pick<ConditionsDraft, 'solvents'>) =>
  solvents.filter(({ name }) => name.trim() !== '');

/** Names of the solvents told, for the checks and cautions that look at them. */
export const solventNames = (draft: Pick<ConditionsDraft, 'solvents'>): string[] =>
  namedSolvents(draft).map(({ name }) => name.trim());

type Told = Pick<
  SpectrumMetadata,
  | 'title'
  | 'technique'
  | 'solvent'
  | 'medium'
  | 'phase'
  | 'concentration'
  | 'concentrationUncertainty'
  | 'pathLength'
  | 'pathLengthUncertainty'
  | 'k'
  | 'temperature'
  | 'bandwidth'
  | 'cell'
  | 'polarisation'
  | 'operator'
  | 'measuredAt'
  | 'notes'
  | 'visibility'
>;

/** Conditions as they are sent: only what was told, in the units of the interface. Call it when there are no errors. */
export function conditionsInput(draft: ConditionsDraft): Told {
  const told: Record<string, unknown> = { technique: draft.technique, visibility: draft.visibility };
  for (const name of TEXTS) if (draft[name].trim() !== '') told[name] = draft[name].trim();
  if (draft.phase !== '') told.phase = draft.phase;
  for (const name of POSITIVE) {
    const value = readNumber(draft[name]);
    if (value !== null) told[name] = name.startsWith('concentration') ? inMoles(value, draft) : value;
  }
  if ('concentrationUncertainty' in told || 'pathLengthUncertainty' in told) told.k = Number(draft.k);
  const medium: Record<string, unknown> = {};
  for (const name of MEDIUM_TEXTS) if (draft[name].trim() !== '') medium[name] = draft[name].trim();
  for (const name of ['pH', 'ionicStrength'] as const) {
    const value = readNumber(draft[name]);
    if (value !== null) medium[name] = value;
  }
  if (Object.keys(medium).length > 0) told.medium = medium;
  const [only, ...others] = namedSolvents(draft);
  if (only) told.solvent = others.length === 0 ? only.name.trim() : shares([only, ...others]);
  return told as Told;
}

/** Nine digits are more than anybody weighs; more would only show how a product of two numbers is rounded. */
const inMoles = (value: number, { concentrationUnit }: ConditionsDraft) =>
  Number((value * UNIT_FACTOR[concentrationUnit]).toPrecision(9));

const shares = (parts: ConditionsDraft['solvents']) =>
  parts.map(({ name, percent }) => ({
    name: name.trim(),
    volumeFraction: Number(((readNumber(percent) ?? 0) / 100).toPrecision(9)),
  }));

/** The conditions of a spectrum on record, as a form holds them. */
export function conditionsOf(spectrum: SpectrumRecord): ConditionsDraft {
  const { medium, solvent } = spectrum;
  const [only, ...others] = solvent;
  return {
    title: spectrum.title,
    technique: spectrum.technique,
    solvents: !only
      ? [{ name: '', percent: '' }]
      : [only, ...others].map(({ name, volumeFraction }) => ({
          name,
          percent: others.length === 0 ? '' : numberText(100 * volumeFraction),
        })),
    concentration: numberText(spectrum.concentration),
    concentrationUncertainty: numberText(spectrum.concentrationUncertainty),
    concentrationUnit: 'mol',
    pathLength: numberText(spectrum.pathLength),
    pathLengthUncertainty: numberText(spectrum.pathLengthUncertainty),
    k: '1',
    temperature: numberText(spectrum.temperature),
    phase: spectrum.phase ?? '',
    pH: numberText(medium.pH),
    ionicStrength: numberText(medium.ionicStrength),
    electrolyte: medium.electrolyte ?? '',
    atmosphere: medium.atmosphere ?? '',
    age: medium.age ?? '',
    bandwidth: numberText(spectrum.bandwidth),
    cell: spectrum.cell ?? '',
    polarisation: spectrum.polarisation ?? '',
    operator: spectrum.operator ?? '',
    measuredAt: spectrum.measuredAt?.slice(0, 10) ?? '',
    notes: spectrum.notes ?? '',
    visibility: spectrum.visibility,
  };
}

/** Techniques whose ordinate becomes a molar absorption coefficient. */
export const givesEpsilon = (technique: Technique): boolean => technique === 'solution' || technique === 'transmission';

/** What still bars a molar absorption coefficient, in a sentence; null where nothing does. */
export function epsilonNeeds(draft: ConditionsDraft, yUnit: string | null): string | null {
  if (yUnit === 'epsilon' || yUnit === 'log-epsilon') return null;
  if (!givesEpsilon(draft.technique)) return null;
  const known = (text: string) => (readNumber(text) ?? 0) > 0;
  const missing = [
    known(draft.concentration) ? null : 'concentration',
    known(draft.pathLength) ? null : 'path length',
  ].filter((part) => part !== null);
  return missing.length === 0 ? null : `ε needs the ${missing.join(' and the ')}; without it only A is shown.`;
}
