import { asc, eq } from 'drizzle-orm';
import { type TransitionTable, transitionTable } from '../../chem/symmetry/index.ts';
import { centres } from '../../db/schema/index.ts';
import type { ComplexAccess } from '../access/records.ts';
import { database } from '../database.ts';

/** The transitions of one centre. */
interface CentreTransitions extends TransitionTable {
  element: string;
  dCount: number | null;
  geometry: string | null;
}

/**
 * All d–d transitions of a complex from the ground term of each of its centres.
 *
 * @param spin - in place of the spin state of the record
 */
export async function complexTransitions(
  { complex }: ComplexAccess,
  spin?: 'low' | 'intermediate' | 'high',
): Promise<{ accession: string; centres: CentreTransitions[] }> {
  const { db } = await database();
  const rows = await db.select().from(centres).where(eq(centres.complexId, complex.id)).orderBy(asc(centres.ordinal));
  // Isomers and the effective group are told of the whole complex, which is its centre where there is but one.
  const single = rows.length === 1;
  return {
    accession: complex.accession,
    centres: rows.map(({ element, dCount, geometry, geometryBasis, spinState }) => {
      const table = transitionTable({
        dCount,
        geometry,
        spin: spin ?? spinState,
        sites: single ? complex.sites : null,
        chelates: (single && complex.chelates) || [],
        effectiveGroup: single ? complex.effectiveGroup : null,
      });
      const notes = [
        ...(geometryBasis === 'assumed' && geometry ? [`The geometry ${geometry} is assumed, not found.`] : []),
        ...(single ? [] : ['There are several centres, each judged by itself: coupling between them is left out.']),
        ...table.notes,
      ];
      return { element, dCount, geometry, ...table, notes };
    }),
  };
}
