import type { FitCandidate } from '#src/chem/ligand-field/index.ts';

/** What the sliders tell, in cm⁻¹. */
export interface Sliders {
  delta: number;
  B: number;
  C: number;
  zeta: number;
  /** C goes with B, at this ratio; null where it goes its own way. */
  ratioCB: number | null;
}

export type SliderName = 'delta' | 'B' | 'C' | 'zeta';

export type SliderAction =
  | { kind: 'set'; name: SliderName; value: number }
  | { kind: 'tie'; tied: boolean }
  | { kind: 'candidate'; candidate: Pick<FitCandidate, 'delta' | 'B' | 'C'> }
  | { kind: 'reset'; to: Sliders };

export const RANGES: Record<SliderName, { least: number; most: number; step: number }> = {
  delta: { least: 0, most: 45_000, step: 10 },
  B: { least: 50, most: 1400, step: 1 },
  C: { least: 100, most: 7000, step: 5 },
  zeta: { least: 0, most: 5000, step: 10 },
};

const within = (name: SliderName, value: number): number => {
  const { least, most } = RANGES[name];
  return Number.isFinite(value) ? Math.min(Math.max(value, least), most) : least;
};

/** Sliders after an action. While C is tied it follows B; moving C itself unties it. */
export function moveSliders(state: Sliders, action: SliderAction): Sliders {
  switch (action.kind) {
    case 'set': {
      const next = { ...state, [action.name]: within(action.name, action.value) };
      if (action.name === 'C') return { ...next, ratioCB: null };
      return action.name === 'B' && state.ratioCB !== null ? { ...next, C: within('C', state.ratioCB * next.B) } : next;
    }
    case 'tie':
      return { ...state, ratioCB: action.tied ? state.C / state.B : null };
    case 'candidate': {
      const { delta, B, C } = action.candidate;
      const next = { ...state, delta: within('delta', delta ?? state.delta), B: within('B', B ?? state.B) };
      next.C = within('C', C ?? (state.ratioCB ?? state.C / state.B) * next.B);
      return { ...next, ratioCB: state.ratioCB === null ? null : next.C / next.B };
    }
    case 'reset':
      return action.to;
  }
}
