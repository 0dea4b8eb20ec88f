import { groups } from '#src/chem/symmetry/index.ts';

export interface GroupFamily {
  name: string;
  symbols: string[];
}

const FAMILIES: readonly [name: string, pattern: RegExp][] = [
  ['No axis', /^C(1|s|i)$/],
  ['Cn', /^C\d$/],
  ['Cnv', /^C\dv$/],
  ['Cnh', /^C\dh$/],
  ['S2n', /^S\d$/],
  ['Dn', /^D\d$/],
  ['Dnh', /^D\dh$/],
  ['Dnd', /^D\dd$/],
  ['Cubic', /^[TO][dh]?$/],
  ['Icosahedral', /^I/],
  ['Linear', /inf/],
];

/** Every group, sorted into families; a group belongs to the first that fits. */
export const groupFamilies: readonly GroupFamily[] = FAMILIES.map(([name, pattern], i) => ({
  name,
  symbols: groups
    .map(({ symbol }) => symbol)
    .filter((symbol) => pattern.test(symbol) && !FAMILIES.slice(0, i).some(([, earlier]) => earlier.test(symbol))),
}));
