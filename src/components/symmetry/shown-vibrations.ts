import { DomainError } from '#src/chem/errors.ts';
import { findGeometry } from '#src/chem/geometry/index.ts';
import { subtract } from '#src/chem/geometry/vector.ts';
import { type Vibration, vibrations, vibrationsOfAtoms } from '#src/chem/symmetry/index.ts';
import {
  lineFrame,
  MOST_DRAWN_ATOMS,
  type ModeVector,
  modeVectors,
  type PlacedAtoms,
  placeSkeleton,
} from '#src/chem/symmetry/mode-vectors.ts';
import { readAtoms } from './read-atoms.ts';
import type { SymmetryState } from './symmetry-address.ts';

/** All that the drawing of vibrations needs. */
export interface ShownVibrations {
  placed: PlacedAtoms;
  /** Name of each atom. */
  labels: string[];
  vibrations: Vibration[];
  /** Empty where there are too many atoms to draw. */
  modes: ModeVector[];
  axes: string;
  /** What is to be known beside the result: how far atoms were moved, or that there are too many to draw. */
  notes: string[];
}

/** Short names of donors, with a number where several share one. */
function numbered(names: readonly string[]): string[] {
  const seen = new Map<string, number>();
  return names.map((name) => {
    const nth = (seen.get(name) ?? 0) + 1;
    seen.set(name, nth);
    return names.filter((other) => other === name).length > 1 ? `${name}${nth}` : name;
  });
}

/** Labels of the sites of a geometry: as many as it has, A where none is told. */
export function sitesOf(geometry: string, donors: readonly string[]): string[] {
  return (findGeometry(geometry)?.vertices ?? []).map((_, i) => donors[i] ?? donors.at(-1) ?? 'A');
}

/** Vibrations of the skeleton or the atoms of a state, or in words why there are none. */
export function shownVibrations(
  state: Pick<SymmetryState, 'geometry' | 'donors' | 'atoms' | 'tolerance'>,
): { shown: ShownVibrations; error: null } | { shown: null; error: string } {
  try {
    if (state.atoms.trim() === '') return { shown: ofSkeleton(state), error: null };
    const read = readAtoms(state.atoms);
    return read.atoms
      ? { shown: ofAtoms(read.atoms, state.tolerance), error: null }
      : { shown: null, error: read.error };
  } catch (error) {
    if (error instanceof DomainError) return { shown: null, error: error.message };
    throw error;
  }
}

function ofSkeleton({ geometry, donors }: Pick<SymmetryState, 'geometry' | 'donors'>): ShownVibrations {
  const sites = sitesOf(geometry, donors);
  const skeleton = { geometry, sites };
  const { vibrations: listed, axes } = vibrations(skeleton);
  const placed = placeSkeleton(skeleton);
  return {
    placed,
    labels: ['M', ...numbered(sites)],
    vibrations: listed,
    modes: modeVectors(placed),
    axes,
    notes: [],
  };
}

function ofAtoms(atoms: Parameters<typeof vibrationsOfAtoms>[0], tolerance: number): ShownVibrations {
  const found = vibrationsOfAtoms(atoms, tolerance);
  const { orientation, group } = found;
  const line = group.includes('inf');
  const placed: PlacedAtoms = {
    group,
    frame: line ? lineFrame(orientation.z) : [orientation.x, orientation.y, orientation.z],
    positions: found.coordinates.map(({ x, y, z }) => subtract([x, y, z], orientation.centre)),
    bonds: found.bonds ?? [],
  };
  const many = atoms.length > MOST_DRAWN_ATOMS;
  const { largest, rms } = found.deviation;
  return {
    placed,
    labels: numbered(atoms.map(({ element }) => element)),
    vibrations: found.vibrations,
    modes: many ? [] : modeVectors(placed),
    axes: found.axes,
    notes: [
      `Within ${tolerance} Å; atoms were moved by at most ${largest.toFixed(3)} Å (root mean square ${rms.toFixed(3)} Å) to where the group keeps them exactly.`,
      ...(found.bonds === null ? ['An element has no known radius, so bonds are not told.'] : []),
      ...(many ? [`More than ${MOST_DRAWN_ATOMS} atoms are counted, not drawn.`] : []),
    ],
  };
}

/** How a vibration is named in the address: `T1u.0.2`. */
export const modeKey = ({ irrep, set, partner }: Pick<ModeVector, 'irrep' | 'set' | 'partner'>): string =>
  `${irrep}.${set}.${partner}`;

/** What a vibration does to bonds and angles, in words. */
export function motionWord({ stretch }: Pick<ModeVector, 'stretch'>): string {
  if (stretch > 0.9) return 'stretch';
  if (stretch > 0.5) return 'mostly stretch';
  return stretch > 0.1 ? 'mostly bend' : 'bend';
}

/** A displacement as a text: the atoms that move, each with its direction along x, y and z of the labels. */
export function displacementText({ vectors }: ModeVector, { placed, labels }: ShownVibrations): string {
  const moving = vectors.flatMap((vector, i) => {
    const parts = placed.frame
      .map((axis) => axis[0] * vector[0] + axis[1] * vector[1] + axis[2] * vector[2])
      .map((share, k) => ({ share, name: 'xyz'[k]! }))
      .filter(({ share }) => Math.abs(share) > 0.02)
      .map(({ share, name }) => `${share < 0 ? '−' : '+'}${Math.abs(share).toFixed(2)} ${name}`);
    return parts.length > 0 ? [`${labels[i]} ${parts.join(' ')}`] : [];
  });
  return moving.join('; ');
}
