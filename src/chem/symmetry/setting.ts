import { symbolParts } from './generators.ts';
import { linearSymbols } from './linear-groups.ts';

/**
 * The choice of axes that the labels of a group hang on, as words that can follow a dash or stand in brackets.
 *
 * @param symbol - a group of the list
 * @returns for instance `z is the principal axis, x a C2′`
 */
export function settingText(symbol: string): string {
  if (linearSymbols.includes(symbol)) return 'z is the line';
  const { family, n, suffix } = symbolParts(symbol);
  if ('TOI'.includes(family)) {
    const axes = family === 'O' ? 'C4' : family === 'T' && suffix === 'd' ? 'S4' : 'C2';
    return `x, y and z are ${axes} axes`;
  }
  if (symbol === 'C1' || symbol === 'Ci') return 'any axes';
  if (symbol === 'Cs') return 'xy is the mirror';
  if (family === 'D' && n === 2 && suffix !== 'd')
    return 'x, y and z are the C2 axes; B1, B2, B3 keep those of z, y, x';
  if (family === 'D') return 'z is the principal axis, x a C2′';
  if (suffix === 'v') return `z is the principal axis, xz a ${n === 2 ? 'mirror' : 'σv'}`;
  return 'z is the principal axis';
}
