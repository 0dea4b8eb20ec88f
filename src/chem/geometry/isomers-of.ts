import { DomainError } from '../errors.ts';
import { enumerateIsomers, type IsomerList, type IsomerRequest } from './enumerate-isomers.ts';
import { isomerRequest, type ReadLigand } from './request.ts';

/** Of a read entity, what its isomers hang on. */
export interface IsomerSubject {
  centres: readonly unknown[];
  ligands: readonly ReadLigand[];
}

/**
 * The isomers of an entity on a polyhedron, in the one order in which they are numbered wherever an index names one.
 *
 * @returns null where they are not to be counted: no geometry, several centres, or ligands that the enumeration does
 *   not bear (a complex of those is registered all the same, its isomer not stated)
 */
export function isomersOf(
  entity: IsomerSubject,
  geometry: string | null,
): { request: IsomerRequest; list: IsomerList } | null {
  if (geometry === null || entity.centres.length !== 1) return null;
  // The order of a formula's ligands is an accident of spelling.
  const ligands = [...entity.ligands].sort((a, b) => (a.abbreviation < b.abbreviation ? -1 : 1));
  try {
    const request = isomerRequest(geometry, ligands);
    return { request, list: enumerateIsomers(request) };
  } catch (error) {
    if (error instanceof DomainError) return null;
    throw error;
  }
}
