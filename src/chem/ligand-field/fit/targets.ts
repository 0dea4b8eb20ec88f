import { DomainError } from '../../errors.ts';
import { BlockSweep } from '../block-sweep.ts';
import { blockMatrix, blockParents, type CubicBlock, cubicBlocks, type Strengths } from '../cubic-blocks.ts';
import { termLetter } from '../free-ion.ts';
import { type CubicGeometry, cubicSetting, irrepName } from '../levels.ts';
import { symmetricEigen } from '../symmetric-eigen.ts';
import type { Ground } from './ground.ts';

/** A level above the ground on which a band may end. */
export interface Target {
  block: CubicBlock;
  /** Place among the levels of its block, from 0. */
  root: number;
  /** `4T1g`. */
  term: string;
  /** Letter of the free-ion term that it rises from, null where that cannot be told. */
  parent: string | null;
  spinAllowed: boolean;
}

/** Δ/B of the scan, evenly spaced in its logarithm: from next to no field to beyond the strongest known. */
export const SCAN = Array.from({ length: 141 }, (_, i) => 0.2 * 1000 ** (i / 140));

/** Everything above one ground level, for one C/B, with energies over the scan in units of B. */
export interface TargetTable {
  ground: Ground;
  sign: 1 | -1;
  ratioCB: number;
  /** Highest multiplicity of dⁿ. */
  highest: number;
  targets: Target[];
  /** Energy above the ground in B: `energies[target][point of the scan]`. */
  energies: Float64Array[];
}

export function targetTable(n: number, geometry: CubicGeometry, ground: Ground, ratioCB: number): TargetTable {
  const { group, sign } = cubicSetting(geometry);
  const blocks = cubicBlocks(n);
  const tables = blocks.map((block) => scanOf(block, sign, ratioCB));
  const origin = tables[blocks.indexOf(ground.block)]!;
  const targets: Target[] = [];
  const energies: Float64Array[] = [];
  blocks.forEach((block, b) => {
    const parents = blockParents(block, 1, ratioCB);
    parents.forEach((parent, root) => {
      if (block === ground.block && root === 0) return;
      targets.push({
        block,
        root,
        term: `${block.multiplicity}${irrepName(block, group)}`,
        parent: parent === null ? null : termLetter(parent),
        spinAllowed: block.multiplicity === ground.block.multiplicity,
      });
      energies.push(Float64Array.from(SCAN, (_, i) => tables[b]![i]![root]! - origin[i]![0]!));
    });
  });
  return { ground, sign, ratioCB, highest: blocks[0]!.multiplicity, targets, energies };
}

function scanOf(block: CubicBlock, sign: 1 | -1, ratioCB: number): Float64Array[] {
  const sweep = new BlockSweep(block, sign, 1, ratioCB);
  return SCAN.map((x) => {
    const values = new Float64Array(sweep.size);
    sweep.energies(x, values);
    return values;
  });
}

/**
 * `4T1g(F)` for terms of the highest spin, or of quartets beside a sextet, that are traced to a free-ion term and occur
 * more than once; others are told by the term alone, as terms of low spin seldom keep to one free-ion term.
 */
export function targetName({ term, parent, block }: Target, { ground, targets, highest }: TargetTable): string {
  const times = targets.filter((other) => other.term === term).length + (ground.label === term ? 1 : 0);
  const usual = block.multiplicity === highest || (highest === 6 && block.multiplicity === 4);
  return times > 1 && parent && usual ? `${term}(${parent})` : term;
}

interface LevelDerivatives {
  energy: number;
  /** By Δ, B and C, after Hellmann and Feynman. */
  gradient: [number, number, number];
}

/** Energies of targets above the ground, with their derivatives by Δ (of the geometry), B and C. */
export function targetEnergies(
  { ground, sign }: Pick<TargetTable, 'ground' | 'sign'>,
  targets: readonly Target[],
  { delta, B, C }: Strengths,
): LevelDerivatives[] {
  const blocks = new Map<CubicBlock, LevelDerivatives[]>();
  const levelsOf = (block: CubicBlock): LevelDerivatives[] => {
    const known = blocks.get(block) ?? blockDerivatives(block, sign, { delta, B, C });
    blocks.set(block, known);
    return known;
  };
  const origin = levelsOf(ground.block)[0]!;
  return targets.map(({ block, root }) => {
    const level = levelsOf(block)[root]!;
    const [a, b, c] = level.gradient;
    return {
      energy: level.energy - origin.energy,
      gradient: [a - origin.gradient[0], b - origin.gradient[1], c - origin.gradient[2]],
    };
  });
}

function blockDerivatives(block: CubicBlock, sign: 1 | -1, { delta, B, C }: Strengths): LevelDerivatives[] {
  const { values, vectors } = symmetricEigen(blockMatrix(block, { delta: sign * delta, B, C }));
  const n = values.length;
  const expectation = (data: Float64Array, k: number): number => {
    let sum = 0;
    for (let i = 0; i < n; i++) {
      const vi = vectors.data[i * n + k]!;
      for (let j = 0; j < n; j++) sum += vi * data[i * n + j]! * vectors.data[j * n + k]!;
    }
    return sum;
  };
  return values.map((energy, k) => ({
    energy,
    gradient: [sign * expectation(block.field.data, k), expectation(block.B.data, k), expectation(block.C.data, k)],
  }));
}

/** What a person may write for the end of a band: `4T2g`, `4T1g(P)`. */
const WRITTEN = /^([1-9])([A-Z]\d?[gu]?)(?:\(([A-Z])\))?$/;

/**
 * The targets that bands with a written term end on. A term with its parent names one level; a term alone stands for its
 * lowest level not yet named, in rising order of the bands.
 *
 * @param bands - wavenumber and term of those bands that have one, with their place in the request
 * @returns place of the target by place of the band
 * @throws DomainError `unreadable` or `unknown-symbol` (field `bands/…/to`)
 */
export function readTargets(
  table: TargetTable,
  bands: readonly { place: number; wavenumber: number; to: string }[],
): Map<number, number> {
  const chosen = new Map<number, number>();
  const read = bands.map((band) => ({ ...band, ...readTerm(band.to, band.place) }));
  const inOrder = [...read].sort(
    (a, b) => Number(a.parent === undefined) - Number(b.parent === undefined) || a.wavenumber - b.wavenumber,
  );
  for (const { place, term, parent, to } of inOrder) {
    const fitting = [...table.targets.keys()].filter((t) => {
      const target = table.targets[t]!;
      return target.term === term && (parent === undefined || target.parent === parent);
    });
    const free = fitting.find((t) => ![...chosen.values()].includes(t));
    if (free === undefined) throw noSuchTarget(table, to, term, place, fitting.length);
    chosen.set(place, free);
  }
  return chosen;
}

function readTerm(to: string, place: number): { term: string; parent: string | undefined } {
  const [, multiplicity, irrep, parent] = WRITTEN.exec(to.replace(/\s/g, '')) ?? [];
  if (!multiplicity || !irrep) {
    throw new DomainError('unreadable', `“${to}” is no term: write it like 4T2g or 4T1g(P).`, `bands/${place}/to`);
  }
  return { term: `${multiplicity}${irrep}`, parent };
}

function noSuchTarget(table: TargetTable, to: string, term: string, place: number, levels: number): DomainError {
  const { ground, targets } = table;
  const parents = targets.filter((target) => target.term === term).map(({ parent }) => parent);
  const message =
    levels > 0
      ? `There ${levels === 1 ? 'is' : 'are'} ${levels} level${levels === 1 ? '' : 's'} ${to} above the ground ${ground.label}, and more bands than that name it.`
      : parents.length > 0
        ? `No level ${term} above the ground ${ground.label} can be traced to the term in brackets of “${to}”: leave the brackets out.`
        : ground.label === term
          ? `${to} is the ground level, and there is none of that name above it.`
          : `There is no level ${to} above the ground ${ground.label}. Spin-allowed ones are ${allowed(targets)}.`;
  return new DomainError('unknown-symbol', message, `bands/${place}/to`);
}

function allowed(targets: readonly Target[]): string {
  const names = [...new Set(targets.filter(({ spinAllowed }) => spinAllowed).map(({ term }) => term))];
  return names.length > 0 ? names.join(', ') : 'none';
}
