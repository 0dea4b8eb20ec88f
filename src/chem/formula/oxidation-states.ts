import { findElement } from '../elements.ts';

// Element: common states / all states met in isolated compounds. N. N. Greenwood & A. Earnshaw, Chemistry of the
// Elements, 2nd ed. 1997, tables of oxidation states of each group (from memory); Ir(IX) only as a gas-phase ion.
const STATES = `
Sc 3/0 1 2 3;Ti 3 4 2/-2 -1 0 1 2 3 4;V 3 4 5 2/-3 -1 0 1 2 3 4 5;Cr 3 6 2/-4 -2 -1 0 1 2 3 4 5 6
Mn 2 3 4 7 6/-3 -2 -1 0 1 2 3 4 5 6 7;Fe 3 2/-2 -1 0 1 2 3 4 5 6;Co 3 2/-1 0 1 2 3 4 5;Ni 2 3/-1 0 1 2 3 4
Cu 2 1/0 1 2 3 4;Zn 2/1 2;Y 3/2 3;Zr 4 3/-2 0 1 2 3 4;Nb 5 4 3/-3 -1 0 1 2 3 4 5
Mo 6 5 4 3 2/-4 -2 -1 0 1 2 3 4 5 6;Tc 7 5 4/-3 -1 0 1 2 3 4 5 6 7;Ru 2 3 4/-2 0 1 2 3 4 5 6 7 8
Rh 3 1/-1 0 1 2 3 4 5 6;Pd 2 4/0 1 2 3 4;Ag 1/0 1 2 3;Cd 2/1 2;Hf 4/-2 0 1 2 3 4;Ta 5/-3 -1 0 1 2 3 4 5
W 6 5 4/-4 -2 -1 0 1 2 3 4 5 6;Re 3 5 7 4 1/-3 -1 0 1 2 3 4 5 6 7;Os 2 3 4 6 8/-4 -2 0 1 2 3 4 5 6 7 8
Ir 3 1 4/-3 -1 0 1 2 3 4 5 6 8 9;Pt 2 4/-2 0 1 2 3 4 5 6;Au 3 1/-1 0 1 2 3 5;Hg 2/1 2`;

interface States {
  common: readonly number[];
  known: readonly number[];
}

const table: ReadonlyMap<string, States> = new Map(
  STATES.trim()
    .split(/[;\n]/)
    .map((row) => {
      const [, symbol = '', common = '', known = ''] = /^(\S+) ([^/]*)\/(.*)$/.exec(row.trim()) ?? [];
      return [symbol, { common: common.split(' ').map(Number), known: known.split(' ').map(Number) }] as const;
    }),
);

/** Oxidation states met most often, usual first; +3 for the f block. */
export function commonStates(symbol: string): readonly number[] {
  return table.get(symbol)?.common ?? (findElement(symbol)?.block === 'f' ? [3] : []);
}

export type Plausibility = 'usual' | 'rare' | 'implausible' | 'impossible';

/** Facts about the ligands that make an extreme state believable. */
export interface LigandField {
  /** A ligand that takes electrons back, or a hydride or carbanion, is present. */
  acceptor: boolean;
  /** A chelating N-heterocycle such as bpy is present. */
  diimine: boolean;
  /** Oxide, fluoride, nitride, peroxide or sulfide is present. */
  strongDonor: boolean;
  /** Every ligand is neutral. */
  allNeutral: boolean;
}

/**
 * How believable a state is. Impossible: above the group number, or more than ten d electrons. Implausible: in no
 * isolated compound; zero or negative without an acceptor bound by C, P, As, S or H (N-heterocycles take up the electrons themselves); five and above in the 3d row without oxide or fluoride;
 * above the usual states (at most 4) with neutral ligands alone. Fractional states are judged by their neighbours.
 */
export function plausibility(symbol: string, state: number, field: LigandField): Plausibility {
  const element = findElement(symbol);
  const states = table.get(symbol);
  if (!element || element.group === null || !states) return state === 3 ? 'usual' : 'rare';
  if (state > element.group || element.group - state > 10) return 'impossible';
  const neighbours = [Math.floor(state), Math.ceil(state)];
  if (!neighbours.every((s) => states.known.includes(s))) return 'implausible';
  if (state <= 0 && !field.acceptor) return 'implausible';
  if (element.period === 4 && state >= 5 && !field.strongDonor) return 'implausible';
  if (field.allNeutral && state > Math.min(4, Math.max(...states.common))) return 'implausible';
  return neighbours.every((s) => states.common.includes(s)) ? 'usual' : 'rare';
}

/** `Fe(III)`, `Ni(0)`, `Re(-I)`; a fraction in digits. */
export function stateLabel(symbol: string, state: number): string {
  if (!Number.isInteger(state)) return `${symbol}(${state > 0 ? '+' : ''}${Number(state.toFixed(2))})`;
  const roman =
    ['0', 'I', 'II', 'III', 'IV', 'V', 'VI', 'VII', 'VIII', 'IX', 'X'][Math.abs(state)] ?? String(Math.abs(state));
  return `${symbol}(${state < 0 ? '-' : ''}${roman})`;
}
