import { type ConfigurationSpace, configurationSpace } from './configuration-space.ts';
import { ANGULAR_MOMENTUM } from './d-orbitals.ts';
import { type Matrix, zeros } from './matrix.ts';
import { type SpinSpace, spinSpaces } from './spin-spaces.ts';

/** States |S, i, M⟩ of one spin S and one M, for every i of the spin's space: `offset` is the place of the first. */
export interface SpinComponents {
  space: SpinSpace;
  /** Twice M, from 2S down to −2S. */
  twiceM: number;
  offset: number;
}

/** All states of dⁿ with Σ l·s among them. */
export interface CoupledSpace {
  size: number;
  components: readonly SpinComponents[];
  /** Σ l·s per unit of ζ, size × size, row after row. */
  re: Float64Array;
  im: Float64Array;
}

/** Determinants of one M_S: a bit for each occupied spin-orbital, orbitals with spin up first. */
interface Sector {
  masks: number[];
  indexOf: Map<number, number>;
}

const known = new Map<number, CoupledSpace>();

/**
 * The whole space of dⁿ in states of definite S and M, built once for each n.
 *
 * The orbital part of a state is the same for all M: those beside the smallest |M| come from it by S₊ and S₋ with the
 * phases of Condon and Shortley, so that a rotation acts on i and on M apart.
 */
export function coupledSpace(n: number): CoupledSpace {
  const space = known.get(n) ?? build(n);
  known.set(n, space);
  return space;
}

function build(n: number): CoupledSpace {
  const sectors = new Map<number, Sector>();
  for (let ups = Math.max(0, n - 5); ups <= Math.min(5, n); ups++) sectors.set(2 * ups - n, sectorOf(ups, n - ups));
  const components: (SpinComponents & { states: Matrix })[] = [];
  let size = 0;
  for (const space of spinSpaces(n)) {
    for (const { twiceM, states } of ladder(space, configurationSpace(n), sectors)) {
      components.push({ space, twiceM, states, offset: size });
      size += space.basis.columns;
    }
  }
  const [re, im] = [new Float64Array(size * size), new Float64Array(size * size)];
  for (const from of components) {
    for (const change of [-2, 0, 2]) {
      const sector = sectors.get(from.twiceM + change);
      if (!sector) continue;
      const image = applied(coupling(change), sectors.get(from.twiceM)!, sector, from.states);
      for (const to of components) {
        if (to.twiceM !== from.twiceM + change) continue;
        project(re, size, to, from, image.re);
        project(im, size, to, from, image.im);
      }
    }
  }
  return { size, components: components.map(({ states: _, ...rest }) => rest), re, im };
}

function sectorOf(ups: number, downs: number): Sector {
  const count = (mask: number): number => mask.toString(2).replaceAll('0', '').length;
  const masks = Array.from({ length: 1024 }, (_, mask) => mask).filter(
    (mask) => count(mask & 31) === ups && count(mask >> 5) === downs,
  );
  return { masks, indexOf: new Map(masks.map((mask, i) => [mask, i])) };
}

/** The states of one spin for every M, each over the determinants of its sector. */
function ladder(
  { basis, multiplicity }: SpinSpace,
  space: ConfigurationSpace,
  sectors: ReadonlyMap<number, Sector>,
): { twiceM: number; states: Matrix }[] {
  const least = space.ups[0]!.length - space.downs[0]!.length;
  const first = { twiceM: least, states: intoSector(basis, space, sectors.get(least)!) };
  const all = [first];
  const step = (from: { twiceM: number; states: Matrix }, change: 2 | -2) => {
    const [S, M] = [(multiplicity - 1) / 2, from.twiceM / 2];
    const norm = Math.sqrt(S * (S + 1) - M * (M + change / 2));
    const [source, target] = [sectors.get(from.twiceM)!, sectors.get(from.twiceM + change)!];
    const { re } = applied(ladderTerms(change, 1 / norm), source, target, from.states);
    return { twiceM: from.twiceM + change, states: re };
  };
  while (all[0]!.twiceM < multiplicity - 1) all.unshift(step(all[0]!, 2));
  while (all.at(-1)!.twiceM > 1 - multiplicity) all.push(step(all.at(-1)!, -2));
  return all;
}

function intoSector(basis: Matrix, { ups, downs }: ConfigurationSpace, { indexOf, masks }: Sector): Matrix {
  const states = zeros(masks.length, basis.columns);
  const mask = (up: readonly number[], down: readonly number[]): number =>
    [...up, ...down.map((orbital) => orbital + 5)].reduce((bits, orbital) => bits | (1 << orbital), 0);
  ups.forEach((up, u) => {
    downs.forEach((down, d) => {
      const row = u * downs.length + d;
      const values = basis.data.subarray(row * basis.columns, (row + 1) * basis.columns);
      states.data.set(values, indexOf.get(mask(up, down))! * basis.columns);
    });
  });
  return states;
}

/** One term of a one-electron operator: takes an electron from spin-orbital q to p. */
interface Term {
  p: number;
  q: number;
  re: number;
  im: number;
}

/** S₊ (change of 2M by 2) or S₋, times a factor. */
function ladderTerms(change: 2 | -2, factor: number): Term[] {
  return Array.from({ length: 5 }, (_, p) =>
    change > 0 ? { p, q: p + 5, re: factor, im: 0 } : { p: p + 5, q: p, re: factor, im: 0 },
  );
}

/** The part of l·s that changes 2M by so much; l = i·a, s half of Pauli's matrices. */
function coupling(change: number): Term[] {
  const [x, y, z] = ANGULAR_MOMENTUM as [Matrix, Matrix, Matrix];
  const pairs = Array.from({ length: 25 }, (_, k) => ({ p: Math.floor(k / 5), q: k % 5, k }));
  const terms = pairs.flatMap(({ p, q, k }): Term[] => {
    if (change === 0) {
      const half = z.data[k]! / 2;
      return [
        { p, q, re: 0, im: half },
        { p: p + 5, q: q + 5, re: 0, im: -half },
      ];
    }
    return change > 0
      ? [{ p, q: q + 5, re: y.data[k]! / 2, im: x.data[k]! / 2 }]
      : [{ p: p + 5, q, re: -y.data[k]! / 2, im: x.data[k]! / 2 }];
  });
  return terms.filter(({ re, im }) => Math.abs(re) + Math.abs(im) > 1e-12);
}

function applied(terms: readonly Term[], source: Sector, target: Sector, states: Matrix): { re: Matrix; im: Matrix } {
  const { columns } = states;
  const [re, im] = [zeros(target.masks.length, columns), zeros(target.masks.length, columns)];
  source.masks.forEach((mask, from) => {
    for (const { p, q, ...factor } of terms) {
      if (!(mask & (1 << q))) continue;
      const rest = mask & ~(1 << q);
      if (rest & (1 << p)) continue;
      const sign = parity(mask & ((1 << q) - 1)) * parity(rest & ((1 << p) - 1));
      const to = target.indexOf.get(rest | (1 << p))!;
      for (let k = 0; k < columns; k++) {
        const value = sign * states.data[from * columns + k]!;
        re.data[to * columns + k] = re.data[to * columns + k]! + factor.re * value;
        im.data[to * columns + k] = im.data[to * columns + k]! + factor.im * value;
      }
    }
  });
  return { re, im };
}

/** −1 for an odd number of bits. */
function parity(bits: number): number {
  let odd = bits;
  odd ^= odd >> 8;
  odd ^= odd >> 4;
  odd ^= odd >> 2;
  odd ^= odd >> 1;
  return odd & 1 ? -1 : 1;
}

/** Writes ⟨to|image of from⟩ where it belongs. */
function project(
  all: Float64Array,
  size: number,
  to: SpinComponents & { states: Matrix },
  from: SpinComponents,
  image: Matrix,
): void {
  const [rows, columns] = [to.states.columns, image.columns];
  for (let d = 0; d < image.rows; d++) {
    for (let i = 0; i < rows; i++) {
      const factor = to.states.data[d * rows + i]!;
      if (factor === 0) continue;
      const at = (to.offset + i) * size + from.offset;
      for (let j = 0; j < columns; j++) all[at + j] = all[at + j]! + factor * image.data[d * columns + j]!;
    }
  }
}
