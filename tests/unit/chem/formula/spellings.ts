import fc from 'fast-check';
import { ligands } from '#src/chem/ligands/index.ts';

/** A mononuclear complex, before anybody writes it down. */
export interface Complex {
  metal: string;
  parts: readonly (readonly [symbol: string, count: number])[];
  charge: number;
}

const metals = 'Ti V Cr Mn Fe Co Ni Cu Mo Ru Rh Os Ir Pt W Re Y Au Pd Zn'.split(' ');
const symbols = ligands.map((l) => l.abbreviation);

/** Any metal with any ligands of the library, likely or not. */
export const complexes: fc.Arbitrary<Complex> = fc.record({
  metal: fc.constantFrom(...metals),
  parts: fc.uniqueArray(fc.tuple(fc.constantFrom(...symbols), fc.integer({ min: 1, max: 6 })), {
    minLength: 1,
    maxLength: 4,
    selector: ([symbol]) => symbol,
  }),
  charge: fc.integer({ min: -4, max: 4 }),
});

/** The complex as it would be written without any thought. */
export function plainly({ metal, parts, charge }: Complex): string {
  return `[${metal}${parts.map(([symbol, n]) => `(${symbol})${n === 1 ? '' : n}`).join('')}]${chargeText(charge)}`;
}

function chargeText(charge: number): string {
  return charge === 0 ? '' : `${Math.abs(charge)}${charge > 0 ? '+' : '-'}`;
}

/** Drawn numbers that say which of its ways each writer takes. */
export const whims = fc.array(fc.nat({ max: 9973 }), { minLength: 24, maxLength: 24 });

/** The complex as somebody may write it: order, synonyms, split counts, brackets, alphabet of digits, style of charge. */
export function somehow({ metal, parts, charge }: Complex, whim: readonly number[]): string {
  let next = 0;
  const draw = (n: number) => whim[next++ % whim.length]! % n;
  const written = parts
    .flatMap(([symbol, n]): [string, number][] =>
      n > 1 && draw(3) === 0
        ? [
            [symbol, 1],
            [symbol, n - 1],
          ]
        : [[symbol, n]],
    )
    .map(([symbol, n]) => ({ text: ligandText(spelling(symbol, draw), n, draw), order: draw(9973) }))
    .sort((a, b) => a.order - b.order)
    .map(({ text }) => text);
  const after = [written.join(''), ''];
  // Ligands before the metal tell of no bridge as long as there is one metal.
  if (draw(4) === 0) after.reverse();
  const [behind, before] = after as [string, string];
  const inside = before === '' ? `${metal}${behind}` : `${before}${metal}`;
  return `[${digits(inside, draw(2) === 1)}]${styled(charge, draw)}`;
}

function spelling(symbol: string, draw: (n: number) => number): string {
  const { synonyms } = ligands.find((l) => l.abbreviation === symbol)!;
  // pz and im are written for two ligands each; their like are left to the tests of questions.
  const plain = [symbol, ...synonyms.filter((s) => !/^(pz|im|[^(]*\).*)$/.test(s))];
  return plain[draw(plain.length)]!;
}

function ligandText(symbol: string, n: number, draw: (n: number) => number): string {
  const count = n === 1 ? '' : String(n);
  return draw(5) === 0 ? `({${symbol}})${count}` : `(${symbol})${count}`;
}

const SUBSCRIPTS = '₀₁₂₃₄₅₆₇₈₉';

function digits(text: string, lowered: boolean): string {
  return lowered ? text.replace(/(?<=[A-Z][a-z]?|\))\d/g, (d) => SUBSCRIPTS[Number(d)]!) : text;
}

function styled(charge: number, draw: (n: number) => number): string {
  if (charge === 0) return '';
  const [size, sign] = [Math.abs(charge), charge > 0 ? '+' : '-'];
  const raised = `${size === 1 ? '' : '⁰¹²³⁴'[size]}${charge > 0 ? '⁺' : '⁻'}`;
  const styles = [
    `${size}${sign}`,
    `${sign}${size}`,
    `^${size}${sign}`,
    `^{${size}${sign}}`,
    `(${size}${sign})`,
    raised,
    sign.repeat(size),
    ` ${size}${sign}`,
    `${size}${charge > 0 ? '+' : '−'}`,
  ];
  return styles[draw(styles.length)]!;
}
