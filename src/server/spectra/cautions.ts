import { eq } from 'drizzle-orm';
import { cautionsFor } from '#src/chem/cautions/index.ts';
import type { SpectrumRecord } from '#src/contracts/spectra.ts';
import { centres, complexLigands, preparations } from '#src/db/schema/index.ts';
import type { SpectrumAccess } from '#src/server/access/records.ts';
import { database } from '#src/server/database.ts';

const TECHNIQUES = {
  solution: 'solution absorption',
  reflectance: 'diffuse reflectance',
  transmission: 'transmission',
  emission: 'emission',
  'circular-dichroism': 'circular dichroism',
} as const;

/**
 * The usual cautions for this composition, measured in this way. None means that no rule matched, never "safe".
 *
 * The counter-ions of the preparation count for everybody who sees the spectrum: a caution is not held back.
 */
export async function cautionsOf(
  { complex, spectrum }: Pick<SpectrumAccess, 'complex' | 'spectrum'>,
  solvents: readonly { name: string }[],
): Promise<SpectrumRecord['cautions']> {
  const { db } = await database();
  const [ligands, metals, [preparation]] = await Promise.all([
    db
      .select({ abbreviation: complexLigands.abbreviation, count: complexLigands.count })
      .from(complexLigands)
      .where(eq(complexLigands.complexId, complex.id)),
    db
      .select({ element: centres.element, oxidationState: centres.oxidationState })
      .from(centres)
      .where(eq(centres.complexId, complex.id)),
    db
      .select({ counterIons: preparations.counterIons })
      .from(preparations)
      .where(eq(preparations.id, spectrum.preparationId ?? '')),
  ]);
  return cautionsFor({
    composition: complex.composition,
    ligands,
    metals,
    counterIons: (preparation?.counterIons ?? []).map(({ formula }) => formula),
    solvent: solvents.map(({ name }) => name),
    technique: TECHNIQUES[spectrum.technique],
    ...(spectrum.temperature === null ? {} : { temperature: spectrum.temperature }),
    ...(spectrum.electrolyte === null ? {} : { electrolyte: spectrum.electrolyte }),
  });
}
