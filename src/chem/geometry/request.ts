import { DomainError } from '../errors.ts';
import type { IsomerRequest } from './enumerate-isomers.ts';
import type { LigandSlot } from './ligand-slot.ts';

/** What a reading of a formula knows of a ligand. */
export interface ReadLigand {
  abbreviation: string;
  count: number;
  /** Donor atoms in the order of the chain; `N` and `N'` where two of an element are not equivalent. */
  donors: string[];
  /** Vertices it takes; a hapto ligand takes one at its centroid, whatever its number of donors. */
  denticity: number;
  /** Pairs of donors joined by a chelate ring; by default neighbours in the list. */
  bite?: [number, number][];
  span?: LigandSlot['span'];
  planar?: boolean;
}

/**
 * The isomers to ask for, from the ligands of a formula.
 *
 * Monodentates are labelled by their abbreviation, donors of chelates by their atom; where several kinds of ligand
 * bring the same donor atom by a chelate, the abbreviation is added (`N(en)`, `N(bpy)`), since such donors differ.
 *
 * @throws {DomainError} `out-of-range`, field `ligands`, where a chelate's donors do not match its denticity
 */
export function isomerRequest(geometry: string, ligands: readonly ReadLigand[]): IsomerRequest {
  const chelates = ligands.filter(({ denticity }) => denticity > 1);
  const bringers = (donor: string): number => chelates.filter(({ donors }) => donors.includes(donor)).length;
  return { geometry, ligands: ligands.map((ligand) => toSlot(ligand, (donor) => bringers(donor) > 1)) };
}

function toSlot(ligand: ReadLigand, isShared: (donor: string) => boolean): LigandSlot {
  const { abbreviation, count, donors, denticity, bite, span, planar } = ligand;
  if (denticity === 1) return { label: abbreviation, donors: 1, count };
  if (donors.length !== denticity) {
    const detail = `${abbreviation} lists ${donors.length} donors but its denticity is ${denticity}`;
    throw new DomainError('out-of-range', detail, 'ligands');
  }
  return {
    label: abbreviation,
    donors: denticity,
    count,
    pattern: donors.map((donor) => (isShared(donor) ? `${donor}(${abbreviation})` : donor)),
    ...(bite && bite.length > 0 && { links: bite }),
    ...(span && { span }),
    ...(planar !== undefined && { planar }),
  };
}
