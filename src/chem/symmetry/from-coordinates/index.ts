import { DomainError } from '../../errors.ts';
import { add, length, scale, subtract, type Vector3 } from '../../geometry/vector.ts';
import { requireFinite } from '../groups.ts';
import { linearVibrations } from '../linear-vibrations.ts';
import { modesOfAtoms } from '../modes-of-atoms.ts';
import { schoenflies } from '../point-group.ts';
import type { SkeletonVibrations } from '../vibrations.ts';
import { bondsBetween, donorsAmong } from './bonds.ts';
import { findOperations } from './find-operations.ts';
import { axesAbout, onALine } from './on-a-line.ts';

/** An atom with its place in Å, in any frame. */
export interface Atom {
  /** Element symbol; atoms of one symbol are alike, other texts tell atoms apart as well. */
  element: string;
  x: number;
  y: number;
  z: number;
}

/** Symmetry and normal modes of atoms as given. */
export interface CoordinateVibrations extends Omit<SkeletonVibrations, 'stretches'> {
  /** Null, with `bends`, where an atom has no known radius, so that bonds cannot be told. */
  stretches: SkeletonVibrations['stretches'] | null;
  /** Pairs of bound atoms, by index. */
  bonds: [number, number][] | null;
  /** Axes of the labels as unit vectors in the frame of the atoms, and the point they go through. */
  orientation: { x: Vector3; y: Vector3; z: Vector3; centre: Vector3 };
  /** Atoms that operations carry into each other, by index. */
  orbits: number[][];
  /** The atoms where the group keeps them exactly, in the frame given. */
  coordinates: Atom[];
  /** How far in Å that moved them. */
  deviation: { largest: number; rms: number };
  /** The tolerance used, in Å. */
  tolerance: number;
}

export const DEFAULT_TOLERANCE = 0.1;
export const LARGEST_TOLERANCE = 0.5;
export const MOST_ATOMS = 150;
/** Nearest that two atoms may stand, in Å: below every bond, and above what a tolerance could confuse. */
const LEAST_DISTANCE = 0.4;

/**
 * Point group of atoms within a tolerance, its orientation, and all their vibrations.
 *
 * The group is the largest one whose exact arrangement lies within the tolerance (see `findOperations`). Where the
 * labels leave a choice of axes, they go through donors as in the ideal skeletons.
 *
 * @param atoms - two or more, with their places in Å
 * @param tolerance - in Å
 * @throws DomainError `empty`, `too-large`, `out-of-range` or `unsupported` on `coordinates` or `tolerance`
 */
export function vibrationsOfAtoms(atoms: readonly Atom[], tolerance: number = DEFAULT_TOLERANCE): CoordinateVibrations {
  const places = checked(atoms, tolerance);
  const centre = scale(
    places.reduce((sum, p) => add(sum, p), [0, 0, 0]),
    1 / places.length,
  );
  const kinds = atoms.map(({ element }) => element);
  const positions = places.map((p) => subtract(p, centre));
  const bonds = bondsBetween(kinds, places);
  const rest = { bonds, tolerance };
  const placed = (to: readonly Vector3[]): Atom[] =>
    to.map((p, i) => {
      const [x, y, z] = add(p, centre);
      return { element: kinds[i]!, x, y, z };
    });

  const line = onALine({ kinds, positions }, tolerance);
  if (line) {
    const { direction, group, largest, rms } = line;
    const modes = linearVibrations(group, atoms.length);
    return {
      ...modes,
      ...rest,
      ...(bonds ? {} : { stretches: null, bends: null }),
      orientation: { ...axesAbout(direction), centre: add(centre, line.middle) },
      orbits: orbitsOf(line.images.map((image) => [image])),
      coordinates: placed(line.positions),
      deviation: { largest, rms },
    };
  }
  const found = findOperations({ kinds, positions }, tolerance);
  const group = requireListed(schoenflies(found.matrices));
  const donors = donorsAmong(kinds, bonds ?? []);
  const guides = donors.length > 0 ? donors.map((i) => found.positions[i]!) : found.positions;
  const { modes, setting } = modesOfAtoms(group, found.matrices, {
    positions: found.positions,
    bonds: bonds ?? [],
    guides: guides.filter((p) => length(p) > 1e-3),
  });
  const [x, y, z] = setting.frame;
  return {
    ...modes,
    ...rest,
    ...(bonds ? {} : { stretches: null, bends: null }),
    orientation: { x, y, z, centre },
    orbits: orbitsOf(positions.map((_, i) => found.operations.map(({ permutation }) => permutation[i]!))),
    coordinates: placed(found.positions),
    deviation: { largest: found.largest, rms: found.rms },
  };
}

function checked(atoms: readonly Atom[], tolerance: number): Vector3[] {
  const refuse = (code: 'empty' | 'too-large' | 'out-of-range' | 'unsupported', text: string): DomainError =>
    new DomainError(code, text, 'coordinates');
  if (!(tolerance > 0 && tolerance <= LARGEST_TOLERANCE)) {
    throw new DomainError(
      'out-of-range',
      `The tolerance must be above 0 and at most ${LARGEST_TOLERANCE} Å, not ${tolerance}.`,
      'tolerance',
    );
  }
  if (atoms.length === 0) throw refuse('empty', 'There are no atoms.');
  if (atoms.length === 1)
    throw refuse('unsupported', 'One atom has every symmetry and no vibration; give two or more.');
  if (atoms.length > MOST_ATOMS) {
    throw refuse('too-large', `At most ${MOST_ATOMS} atoms can be judged at once; these are ${atoms.length}.`);
  }
  const places = atoms.map(({ x, y, z }): Vector3 => [x, y, z]);
  places.forEach((p, i) => {
    if (!p.every(Number.isFinite)) throw refuse('out-of-range', `Atom ${i + 1} has no place: ${p.join(', ')}.`);
    const near = places.findIndex((q, j) => j < i && length(subtract(p, q)) < LEAST_DISTANCE);
    if (near >= 0) {
      throw refuse('out-of-range', `Atoms ${near + 1} and ${i + 1} stand less than ${LEAST_DISTANCE} Å apart.`);
    }
  });
  return places;
}

function requireListed(symbol: string) {
  try {
    return requireFinite(symbol, 'coordinates');
  } catch {
    throw new DomainError(
      'unsupported',
      `The atoms have the group ${symbol}, which has an axis beyond the eightfold and no table here.`,
      'coordinates',
    );
  }
}

/** Sets of atoms that share an image; `images[i]` are those of atom i. */
function orbitsOf(images: readonly (readonly number[])[]): number[][] {
  const least = images.map((own, i) => Math.min(i, ...own));
  return [...new Set(least)].map((first) => least.flatMap((x, i) => (x === first ? [i] : [])));
}
