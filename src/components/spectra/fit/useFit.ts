import { useMemo, useState } from 'react';
import { FIRST_STATE, type FitStep } from '#src/chem/spectra/fit/fit-steps.ts';
import { applyStep, type FitCurve, treated } from '#src/chem/spectra/fit/replay.ts';
import { useDraft } from '#src/components/ui/useDraft.ts';
import type { FitHistory, SpectrumRecord } from '#src/contracts/spectra.ts';
import type { FetchedCurve } from '../page/curves.ts';
import { type FitWork, isFull, MOST_STEPS, made, NO_WORK, redone, stateOf, stepsOf, undone } from './fit-work.ts';
import { useFitWorker } from './useFitWorker.ts';

interface Kept {
  work: FitWork;
  /** nm, as typed; null where it is not told. */
  wavelengthCheck: number | null;
  refractiveIndex: number;
  /** The curve that the steps were made on. */
  points: number;
  quantity: string;
}
const NOTHING: Kept = { work: NO_WORK, wavelengthCheck: null, refractiveIndex: 1, points: 0, quantity: '' };

const IN_WORKER = new Set<FitStep['operation']>(['find', 'refine']);

/** The fit of a spectrum while a person works on it; its steps outlive a reload. */
export function useFit(spectrum: Pick<SpectrumRecord, 'id' | 'fit'>, curve: FetchedCurve) {
  const { draft, change, clear } = useDraft<Kept>(`fit:${spectrum.id}`, NOTHING);
  const { ask, cancel, isBusy, isSlow } = useFitWorker();
  const [problem, setProblem] = useState<Error | null>(null);
  const fitCurve = useMemo((): FitCurve => {
    const y = curve.y.map((value) => value ?? Number.NaN);
    return { x: Float64Array.from(curve.x), y: Float64Array.from(y), signed: curve.quantity === 'delta-epsilon' };
  }, [curve]);
  const isOfThisCurve =
    draft.work.entries.length === 0 || (draft.points === curve.x.length && draft.quantity === curve.quantity);
  const work = isOfThisCurve ? draft.work : NO_WORK;
  const state = stateOf(work);
  const shown = useMemo(() => treated(fitCurve, state), [fitCurve, state.range, state.smoothing, state.baseline]);

  const keep = (next: FitWork) => change({ work: next, points: curve.x.length, quantity: curve.quantity });
  const make = (step: FitStep, joined = false) => {
    setProblem(null);
    if (isFull(work))
      return setProblem(new Error(`A fit has at most ${MOST_STEPS} steps: take it over, or start anew.`));
    if (IN_WORKER.has(step.operation))
      return ask(
        { curve: fitCurve, from: state, steps: [step] },
        ([next]) => next && keep(made(work, step, next, joined)),
        setProblem,
      );
    cancel(); // what is being fitted would answer to a state that is gone
    try {
      keep(made(work, step, applyStep(fitCurve, state, step), joined));
    } catch (error) {
      setProblem(error as Error);
    }
  };
  /** Make the steps on this curve, one after another. */
  const replay = ({ steps, wavelengthCheck }: Pick<FitHistory, 'wavelengthCheck'> & { steps: FitStep[] }) => {
    setProblem(null);
    ask(
      { curve: fitCurve, from: FIRST_STATE, steps },
      (states) => {
        change({ wavelengthCheck });
        keep({ entries: steps.map((step, i) => ({ step, state: states[i]! })), done: steps.length });
      },
      setProblem,
    );
  };
  const go = (next: FitWork) => {
    cancel();
    setProblem(null);
    keep(next);
  };
  return {
    state,
    work,
    treated: shown,
    problem,
    isBusy,
    isSlow,
    cancel,
    make,
    undo: () => go(undone(work)),
    redo: () => go(redone(work)),
    restart: () => {
      cancel();
      setProblem(null);
      clear();
    },
    /** Steps made on another curve: before the conditions were mended, or as another quantity. */
    formerSteps: isOfThisCurve ? null : stepsOf(draft.work),
    replay,
    wavelengthCheck: draft.wavelengthCheck,
    refractiveIndex: draft.refractiveIndex,
    tell: (part: Partial<Pick<Kept, 'wavelengthCheck' | 'refractiveIndex'>>) => change(part),
    /** What is stored beside the bands. */
    history: (components: FitHistory['components']): FitHistory => ({
      points: curve.x.length,
      quantity: curve.quantity,
      wavelengthCheck: draft.wavelengthCheck,
      steps: stepsOf(work) as FitHistory['steps'],
      components,
    }),
  };
}

export type Fitting = ReturnType<typeof useFit>;
