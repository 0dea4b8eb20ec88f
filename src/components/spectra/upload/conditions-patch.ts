import type { Difference } from '#src/components/ui/Conflict.tsx';
import type { SpectrumPatch, SpectrumRecord } from '#src/contracts/spectra.ts';
import { type ConditionsDraft, conditionsInput, conditionsOf } from './conditions-draft.ts';

const CLEARABLE = [
  'solvent',
  'phase',
  'concentration',
  'concentrationUncertainty',
  'pathLength',
  'pathLengthUncertainty',
  'temperature',
  'bandwidth',
  'cell',
  'polarisation',
  'operator',
  'measuredAt',
  'notes',
] as const;
const MEDIUM = ['pH', 'ionicStrength', 'electrolyte', 'atmosphere', 'age'] as const;
const UNCERTAINTIES = ['concentrationUncertainty', 'pathLengthUncertainty'] as const;

const same = (a: unknown, b: unknown) => JSON.stringify(a ?? null) === JSON.stringify(b ?? null);

/** What of the typed conditions differs from the record: null where a value is to be cleared. */
export function conditionsPatch(spectrum: SpectrumRecord, draft: ConditionsDraft): SpectrumPatch {
  const was = conditionsInput(conditionsOf(spectrum)) as Record<string, unknown>;
  const now = conditionsInput(draft) as Record<string, unknown>;
  const patch: Record<string, unknown> = {};
  for (const name of ['title', 'technique', 'visibility'] as const)
    if (now[name] !== undefined && !same(now[name], was[name])) patch[name] = now[name];
  for (const name of CLEARABLE) if (!same(now[name], was[name])) patch[name] = now[name] ?? null;
  const [before, after] = [was.medium, now.medium] as (Record<string, unknown> | undefined)[];
  const medium: Record<string, unknown> = {};
  for (const name of MEDIUM) if (!same(after?.[name], before?.[name])) medium[name] = after?.[name] ?? null;
  if (Object.keys(medium).length > 0) patch.medium = medium;
  // What is on record is standard; with another k both uncertainties were typed anew.
  if (draft.k !== '1') for (const name of UNCERTAINTIES) if (now[name] !== undefined) patch[name] = now[name];
  if (UNCERTAINTIES.some((name) => typeof patch[name] === 'number')) patch.k = now.k;
  return patch as SpectrumPatch;
}

const NAMES: Record<string, string> = {
  title: 'Title',
  technique: 'Technique',
  visibility: 'Seen by',
  solvent: 'Solvent',
  phase: 'Phase',
  concentration: 'Concentration',
  concentrationUncertainty: 'u(c)',
  pathLength: 'Path length',
  pathLengthUncertainty: 'u(l)',
  temperature: 'Temperature',
  bandwidth: 'Bandwidth',
  cell: 'Cell',
  polarisation: 'Polarisation',
  operator: 'Operator',
  measuredAt: 'Measured on',
  notes: 'Notes',
  medium: 'Medium',
};

const text = (value: unknown): string => {
  if (value === null || value === undefined) return '';
  if (Array.isArray(value)) return value.map((one) => text(one)).join(', ');
  if (typeof value === 'object') return Object.values(value).map(text).filter(Boolean).join(', ');
  return String(value);
};

/** What differs between the record as it is now and what was typed. */
export function conditionDifferences(present: SpectrumRecord, draft: ConditionsDraft): Difference[] {
  const patch = conditionsPatch(present, draft);
  const now = conditionsInput(conditionsOf(present)) as Record<string, unknown>;
  return Object.entries(patch)
    .filter(([name]) => name in NAMES)
    .map(([name, mine]) => ({ name: NAMES[name]!, present: text(now[name]), mine: text(mine) }));
}
