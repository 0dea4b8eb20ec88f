import type { CubicGeometry } from '#src/chem/ligand-field/index.ts';
import type { PathName } from '../worker/tasks.ts';

export type LevelsView = 'ground' | 'absolute' | 'orgel' | 'path' | 'trend';
export type TrendGeometry = 'OC-6' | 'T-4' | 'SP-4';

/** What the diagram page shows; all of it stands in the address. */
export interface LevelsState {
  view: LevelsView;
  /** d electrons */
  n: number;
  geometry: CubicGeometry;
  /** C/B */
  ratio: number;
  /** Largest Δ/B. */
  max: number;
  /** Largest E/B. */
  top: number;
  /** Place that is read out: Δ/B, Δ in B on both sides of an Orgel diagram, or 0 to 1 along a path. */
  at: number;
  path: PathName;
  /** Along a path, cm⁻¹. */
  B: number;
  sigma: number;
  pi: number;
  /** Of the trend. */
  trend: TrendGeometry;
}

export const START: LevelsState = {
  view: 'ground',
  n: 3,
  geometry: 'OC-6',
  ratio: 4.5,
  max: 40,
  top: 70,
  at: 20,
  path: 'tetragonal',
  B: 800,
  sigma: 7000,
  pi: 500,
  trend: 'OC-6',
};

type Numeric = 'n' | 'ratio' | 'max' | 'top' | 'at' | 'B' | 'sigma' | 'pi';

/** What each number may be. */
export const LIMITS: Record<Numeric, readonly [least: number, most: number]> = {
  n: [1, 9],
  ratio: [1, 12],
  max: [5, 100],
  top: [5, 150],
  at: [-100, 100],
  B: [50, 2000],
  sigma: [500, 20_000],
  pi: [-4000, 8000],
};
const CHOICES = {
  view: ['ground', 'absolute', 'orgel', 'path', 'trend'],
  geometry: ['OC-6', 'T-4', 'CU-8'],
  path: ['tetragonal', 'twist', 'flattening'],
  trend: ['OC-6', 'T-4', 'SP-4'],
} as const;

/** The state that an address tells; what it does not tell, or tells wrongly, is as at the start. */
export function stateOf(search: string): LevelsState {
  const query = new URLSearchParams(search);
  const state: Record<string, unknown> = { ...START };
  for (const [name, [least, most]] of Object.entries(LIMITS)) {
    const text = query.get(name);
    const value = Number(text);
    if (text === null || text.trim() === '' || !Number.isFinite(value)) continue;
    if (value < least || value > most || (name === 'n' && !Number.isInteger(value))) continue;
    state[name] = value;
  }
  for (const [name, choices] of Object.entries(CHOICES)) {
    const text = query.get(name);
    if (text !== null && (choices as readonly string[]).includes(text)) state[name] = text;
  }
  return state as unknown as LevelsState;
}

/** The address of a state, without what is as at the start: `?n=8&view=absolute`. */
export function addressOf(state: LevelsState): string {
  const query = new URLSearchParams();
  for (const name of Object.keys(START) as (keyof LevelsState)[])
    if (state[name] !== START[name]) query.set(name, String(state[name]));
  const text = query.toString();
  return text && `?${text}`;
}
