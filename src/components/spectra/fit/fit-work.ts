import { FIRST_STATE, type FitState, type FitStep } from '#src/chem/spectra/fit/fit-steps.ts';

/** Steps that one fit may have: as many as the record of it holds. */
export const MOST_STEPS = 200;

/** The steps made so far, each with what it came to; those from `done` on were taken back and can be made again. */
export interface FitWork {
  entries: { step: FitStep; state: FitState }[];
  done: number;
}

export const NO_WORK: FitWork = { entries: [], done: 0 };

/** What the fit has come to. */
export const stateOf = ({ entries, done }: FitWork): FitState => entries[done - 1]?.state ?? FIRST_STATE;

/** The steps in effect, as they are stored. */
export const stepsOf = ({ entries, done }: FitWork): FitStep[] => entries.slice(0, done).map(({ step }) => step);

const isSame = (a: FitStep | undefined, b: FitStep): boolean =>
  (a?.operation === 'range' && b.operation === 'range') ||
  (a?.operation === 'set' && b.operation === 'set' && a.parameters.component === b.parameters.component);

/**
 * One step more; what was taken back before it is gone.
 *
 * @param joined - whether a component or a range set again right after it was set makes one step with it, as a row of key
 *   strokes does
 */
export function made(work: FitWork, step: FitStep, state: FitState, joined = false): FitWork {
  const kept = work.entries.slice(0, work.done);
  const last = kept.at(-1)?.step;
  const joins = joined && isSame(last, step);
  const told = joins ? ({ ...step, parameters: { ...last?.parameters, ...step.parameters } } as FitStep) : step;
  const entries = [...(joins ? kept.slice(0, -1) : kept), { step: told, state }];
  return { entries, done: entries.length };
}

export const undone = (work: FitWork): FitWork => ({ ...work, done: Math.max(0, work.done - 1) });
export const redone = (work: FitWork): FitWork => ({ ...work, done: Math.min(work.entries.length, work.done + 1) });
export const isFull = ({ done }: FitWork): boolean => done >= MOST_STEPS;
