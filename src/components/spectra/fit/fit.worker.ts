import type { FitState, FitStep } from '#src/chem/spectra/fit/fit-steps.ts';
import { applyStep, type FitCurve } from '#src/chem/spectra/fit/replay.ts';

export interface FitQuestion {
  curve: FitCurve;
  from: FitState;
  steps: FitStep[];
}
/** The state after each step, or what stands against one of them. */
export type FitAnswer = { states: FitState[] } | { refused: string };

/** Steps made away from the page, which stays at hand meanwhile. */
self.onmessage = ({ data: { curve, from, steps } }: MessageEvent<FitQuestion>) => {
  let answer: FitAnswer;
  try {
    let state = from;
    answer = {
      states: steps.map((step) => {
        state = applyStep(curve, state, step);
        return state;
      }),
    };
  } catch (error) {
    answer = { refused: error instanceof Error ? error.message : String(error) };
  }
  self.postMessage(answer);
};
