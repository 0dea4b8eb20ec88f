import { DomainError } from '../errors.ts';
import { type FiniteGroup, finiteGroup } from './finite-group.ts';
import { finiteSymbols } from './generators.ts';
import { linearSymbols, linearTable } from './linear-groups.ts';
import { settingText } from './setting.ts';

/** An irrep of a character table, as shown. */
export interface Irrep {
  /** Mulliken label in plain text: `T2g`, `A1'`, `Sigma_g+`. */
  label: string;
  /** 2 for a complex-conjugate pair, which is one label E. */
  dimension: number;
  /** By class; text in the linear groups where it hangs on the angle: `2cos(2phi)`. */
  characters: (number | string)[];
  /** Of x, y, z, Rx, Ry, Rz and the quadratic functions, those that transform so: `x2-y2`. */
  functions: string[];
}

/** A character table. */
export interface PointGroup {
  symbol: string;
  /** Number of operations; null for the linear groups, which have no end of them. */
  order: number | null;
  centrosymmetric: boolean;
  /** Choice of axes that the labels hang on, in words. */
  setting: string;
  classes: { label: string; size: number | null }[];
  irreps: Irrep[];
}

/** How often an irrep occurs in a direct sum. */
export interface IrrepCount {
  irrep: string;
  count: number;
}

/** Every group in the list, with its order; null for the linear ones. */
export const groups: readonly { symbol: string; order: number | null }[] = [
  ...finiteSymbols.map((symbol) => ({ symbol, order: orderOf(symbol) })),
  ...linearSymbols.map((symbol) => ({ symbol, order: null })),
];

function orderOf(symbol: string): number {
  const cubic = { T: 12, Td: 24, Th: 24, O: 24, Oh: 48, I: 60, Ih: 120, C1: 1, Cs: 2, Ci: 2 }[symbol];
  const [, family, n, suffix] = /^([CDS])(\d)(\w?)$/.exec(symbol) ?? [];
  return cubic ?? Number(n) * (family === 'D' ? 2 : 1) * (suffix ? 2 : 1);
}

/** The character table of a group, or null when the symbol is not in the list. */
export function findGroup(symbol: string): PointGroup | null {
  if (linearSymbols.includes(symbol)) return linearGroup(symbol);
  const group = finiteGroup(symbol);
  if (!group) return null;
  return {
    symbol,
    order: group.order,
    centrosymmetric: group.centrosymmetric,
    setting: settingText(symbol),
    classes: group.classes.map(({ label, size }) => ({ label, size })),
    irreps: group.irreps.map(({ label, dimension, characters, functions }) => ({
      label,
      dimension,
      characters,
      functions,
    })),
  };
}

/**
 * The finite group with this symbol.
 *
 * @throws DomainError `unknown-symbol`, or `unsupported` for a linear group, on `field`
 */
export function requireFinite(symbol: string, field: string): FiniteGroup {
  const group = finiteGroup(symbol);
  if (group) return group;
  if (linearSymbols.includes(symbol)) {
    throw new DomainError('unsupported', `${symbol} is a linear group, and this needs a finite one.`, field);
  }
  throw new DomainError(
    'unknown-symbol',
    `No point group has the symbol “${symbol}”. Examples: Oh, D4h, C2v, Dinfh.`,
    field,
  );
}

function linearGroup(symbol: string): PointGroup {
  const central = symbol === 'Dinfh';
  const turns = ['E', '2C(phi)', 'sigma_v'];
  const more = central ? ['i', '2S(phi)', 'C2'] : [];
  const sizes: Record<string, number | null> = { E: 1, '2C(phi)': 2, i: 1, '2S(phi)': 2, sigma_v: null, C2: null };
  return {
    symbol,
    order: null,
    centrosymmetric: central,
    setting: settingText(symbol),
    classes: [...turns, ...more].map((label) => ({ label: label.replace(/^2/, ''), size: sizes[label] ?? null })),
    irreps: linearTable(symbol).map(({ irrep: { lambda, sign, parity }, label, functions }) => {
      const dimension = lambda === 0 ? 1 : 2;
      const angle = `${lambda > 1 ? lambda : ''}phi`;
      const plain = [dimension, lambda === 0 ? 1 : `2cos(${angle})`, sign];
      // S(φ) is i after a rotation by φ + π, so that its sign changes for odd Λ.
      const reverse = (parity === 'u' ? -1 : 1) * (lambda % 2 === 1 ? -1 : 1);
      const turned = [
        parity === 'u' ? -dimension : dimension,
        lambda === 0 ? reverse : `${reverse < 0 ? '-' : ''}2cos(${angle})`,
        (parity === 'u' ? -sign : sign) || 0,
      ];
      return { label, dimension, characters: central ? [...plain, ...turned] : plain, functions };
    }),
  };
}
