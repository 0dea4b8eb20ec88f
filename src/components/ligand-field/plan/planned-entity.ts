import type { EntityReading } from '#src/chem/formula/index.ts';
import type { PlannedComplex } from '#src/chem/planning/index.ts';

/** What of a reading can be planned with, or why it cannot. */
export type PlannedEntity =
  | { kind: 'none'; sentence: string }
  | { kind: 'planned'; complex: PlannedComplex; choices: PlannedComplex['geometry'][] };

const none = (sentence: string): PlannedEntity => ({ kind: 'none', sentence });

/** The complex that is planned: one centre of whole oxidation state with six or four donors. */
export function plannedEntity(entity: EntityReading, wished: PlannedComplex['geometry'] | null): PlannedEntity {
  const [centre, ...others] = entity.centres;
  if (!centre) return none('There is no metal in this formula.');
  if (others.length > 0) return none('There are several metals in this formula: plan for each of them alone.');
  if (centre.oxidationState === null || !Number.isInteger(centre.oxidationState))
    return none('The oxidation state of the metal is open; answer the question first.');
  const donors = entity.ligands.map(({ abbreviation, count, denticity }) => ({
    abbreviation,
    count: count * denticity,
  }));
  const total = donors.reduce((sum, { count }) => sum + count, 0);
  const choices = total === 6 ? (['OC-6'] as const) : total === 4 ? (['T-4'] as const) : [];
  const [first] = choices;
  if (!first)
    return none(`Bands are planned for octahedra of six donors and tetrahedra of four; this complex has ${total}.`);
  const geometry = wished && (choices as readonly string[]).includes(wished) ? wished : first;
  return {
    kind: 'planned',
    choices: [...choices],
    complex: {
      element: centre.element,
      oxidationState: centre.oxidationState,
      geometry,
      donors,
      // Six alike about the metal have a centre of inversion. The rings of a tris-chelate take it away (D3), and of
      // several kinds it depends on the isomer.
      centrosymmetric: geometry === 'OC-6' && entity.ligands.length === 1 && entity.ligands[0]!.denticity === 1,
    },
  };
}
