import { DomainError } from '../errors.ts';
import { findGeometry } from '../geometry/catalogue.ts';
import {
  add,
  apply,
  cross,
  length,
  type Matrix3,
  multiply,
  scale,
  subtract,
  transpose,
  type Vector3,
} from '../geometry/vector.ts';
import { eigenvectors } from './eigenvectors.ts';
import { finiteGroup } from './finite-group.ts';
import { axesAbout } from './from-coordinates/on-a-line.ts';
import { IDENTITY } from './matrices.ts';
import { form, inner, type Springs, springMatrix, stretchShare, unit } from './mode-springs.ts';
import { type Skeleton, skeletonModes } from './vibrations.ts';

/** Atoms that a group keeps exactly, in its setting. */
export interface PlacedAtoms {
  /** Schoenflies symbol: `Oh`, `Dinfh`. */
  group: string;
  /** Rows: x, y and z of the labels in the frame of the atoms. */
  frame: Matrix3;
  /** About the point that every operation leaves alone; any unit of length. */
  positions: readonly Vector3[];
  /** Pairs of bound atoms, by index. */
  bonds: readonly (readonly [number, number])[];
}

/** One vibration as displacements; those of one set differ by how the operations mix them. */
export interface ModeVector {
  irrep: string;
  /** Counted from 0 among the sets of this irrep, the stiffest first. */
  set: number;
  /** Counted from 0 within the set. */
  partner: number;
  /** Displacement of each atom; their squares add up to 1 over all atoms. */
  vectors: Vector3[];
  /** Share of the bonds' lengthening in what the model's springs hold, 0 to 1. */
  stretch: number;
}

/** Most atoms whose displacements are worked out. */
export const MOST_DRAWN_ATOMS = 40;

/**
 * Placed atoms of a skeleton of metal and donors; the metal comes first, bonds have length 1.
 *
 * @throws DomainError as `vibrations`
 */
export function placeSkeleton(skeleton: Skeleton): PlacedAtoms {
  const { modes, setting } = skeletonModes(skeleton);
  const { vertices } = findGeometry(skeleton.geometry)!;
  return {
    group: modes.group,
    frame: setting?.frame ?? IDENTITY,
    positions: [[0, 0, 0], ...vertices],
    bonds: vertices.map((_, i) => [0, i + 1] as const),
  };
}

/**
 * Displacement vectors of all vibrations of placed atoms, orthonormal, sorted by irrep.
 *
 * The projection operator of each irrep, (d/h) Σ χ(g) g over the displacements, with translations and rotations taken
 * out, spans what symmetry fixes. Where an irrep occurs more than once, or has partners to choose, equal masses held by
 * plain springs and the axes of the labels settle it: the mixture of stretch and bend is that of the model.
 *
 * @throws DomainError `too-large` beyond 40 atoms, `unsupported` for a group without a table
 * @see E. B. Wilson, J. C. Decius, P. C. Cross, Molecular Vibrations, 1955, ch. 6
 */
export function modeVectors(atoms: PlacedAtoms): ModeVector[] {
  const { positions, frame } = atoms;
  if (positions.length > MOST_DRAWN_ATOMS) {
    throw new DomainError(
      'too-large',
      `At most ${MOST_DRAWN_ATOMS} atoms can be drawn in motion; these are ${positions.length}.`,
      'coordinates',
    );
  }
  const line = LINES[atoms.group];
  const group = finiteGroup(line?.group ?? atoms.group);
  if (!group) throw new DomainError('unsupported', `${atoms.group} has no table of operations here.`, 'group');
  const images = group.operations.map((m) => multiply(transpose(frame), multiply(m, frame)));
  const moves = images.map((m) => ({ m, to: positions.map((p) => indexAt(positions, apply(m, p))) }));
  const rigid = rigidMotions(positions);
  const springs = springMatrix(positions, atoms.bonds, frame);
  return group.irreps.flatMap((irrep) => {
    const name = line ? line.irreps[irrep.label] : irrep.label;
    const weights = group.operations.map((m) => irrep.characters[group.classOfMatrix(m)!]!);
    const factor = (irrep.pair ? irrep.dimension / 2 : irrep.dimension) / group.order;
    const project = (u: readonly number[]): number[] => {
      const sum = u.map(() => 0);
      moves.forEach(({ m, to }, g) => {
        if (weights[g] === 0) return;
        to.forEach((j, i) => {
          const moved = apply(m, [u[3 * i]!, u[3 * i + 1]!, u[3 * i + 2]!]);
          for (let k = 0; k < 3; k++) sum[3 * j + k]! += factor * weights[g]! * moved[k]!;
        });
      });
      return rigid.reduce((rest, t) => minus(rest, t, inner(rest, t)), sum);
    };
    const basis = spanOf(
      Array.from({ length: 3 * positions.length }, (_, k) => project(unit(3 * positions.length, k))),
    );
    // Irreps that stand for none of the line have no modes on it.
    if (basis.length === 0 || name === undefined) return [];
    return setsOf(basis, springs, irrep.dimension).map(({ vector, set, partner }) => ({
      irrep: name,
      set,
      partner,
      vectors: toVectors(vector),
      stretch: stretchShare(vector, springs),
    }));
  });
}

/** Finite groups that tell the modes of atoms on a line apart, as z is the line. */
const LINES: Record<string, { group: string; irreps: Record<string, string> }> = {
  Dinfh: { group: 'D4h', irreps: { A1g: 'Sigma_g+', A2u: 'Sigma_u+', Eg: 'Pi_g', Eu: 'Pi_u' } },
  Cinfv: { group: 'C4v', irreps: { A1: 'Sigma+', E: 'Pi' } },
};

/** x, y and z of the labels of atoms on a line. */
export const lineFrame = (direction: Vector3): Matrix3 => {
  const { x, y, z } = axesAbout(direction);
  return [x, y, z];
};

const indexAt = (positions: readonly Vector3[], place: Vector3): number =>
  positions.reduce(
    (best, p, i) => (length(subtract(p, place)) < length(subtract(positions[best]!, place)) ? i : best),
    0,
  );

const minus = (a: readonly number[], b: readonly number[], times: number): number[] =>
  a.map((x, k) => x - times * b[k]!);

const toVectors = (u: readonly number[]): Vector3[] =>
  Array.from({ length: u.length / 3 }, (_, i) => [u[3 * i]!, u[3 * i + 1]!, u[3 * i + 2]!]);

/** Translations and rotations of equal masses, orthonormal; a line has no rotation about itself. */
function rigidMotions(positions: readonly Vector3[]): number[][] {
  const centre = scale(positions.reduce(add), 1 / positions.length);
  const axes: Vector3[] = [...IDENTITY];
  const shifts = axes.map((axis) => positions.flatMap(() => axis));
  const turns = axes.map((axis) => positions.flatMap((p) => cross(axis, subtract(p, centre))));
  return spanOf([...shifts, ...turns]);
}

/** An orthonormal basis of what vectors span, by Gram and Schmidt, the longest remainder first. */
function spanOf(vectors: readonly (readonly number[])[]): number[][] {
  const basis: number[][] = [];
  let rest = vectors.map((v) => [...v]);
  const size = Math.max(1, ...rest.map((v) => Math.sqrt(inner(v, v))));
  while (rest.length > 0) {
    const longest = rest.reduce((a, b) => (inner(b, b) > inner(a, a) + 1e-9 ? b : a));
    const norm = Math.sqrt(inner(longest, longest));
    if (norm < 1e-6 * size) break;
    const next = longest.map((x) => x / norm);
    basis.push(next);
    rest = rest.map((v) => minus(v, next, inner(v, next))).filter((v) => inner(v, v) > 1e-12);
  }
  return basis;
}

/** Splits what one irrep spans into sets of partners, the stiffest first. */
function setsOf(basis: readonly number[][], { all, axes }: Springs, dimension: number) {
  const stiff = rotated(basis, all);
  return Array.from({ length: basis.length / dimension }, (_, set) => {
    const members = stiff.slice(set * dimension, (set + 1) * dimension);
    return rotated(members, axes).map((vector, partner) => ({ vector: upright(vector), set, partner }));
  }).flat();
}

/** The same span by the eigenvectors of a form within it, the greatest value first. */
function rotated(basis: readonly number[][], matrix: readonly (readonly number[])[]): number[][] {
  const applied = basis.map((u) => matrix.map((row) => inner(row, u)));
  const within = basis.map((u) => applied.map((v) => inner(u, v)));
  return eigenvectors(within)
    .map((weights) => basis[0]!.map((_, k) => weights.reduce((sum, w, i) => sum + w * basis[i]![k]!, 0)))
    .map((vector) => ({ vector, value: form(matrix, vector) }))
    .sort((a, b) => b.value - a.value)
    .map(({ vector }) => vector);
}

/** Of the two signs, the one whose greatest component is positive. */
function upright(u: readonly number[]): number[] {
  const greatest = u.reduce((best, x) => (Math.abs(x) > Math.abs(best) + 1e-6 ? x : best), 0);
  return u.map((x) => (Math.abs(x) < 1e-12 ? 0 : greatest < 0 ? -x : x));
}
