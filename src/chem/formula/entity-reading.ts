import type { CautionContext } from '../cautions/index.ts';
import { addCompositions, type Composition, hillFormula, isDBlock, molarMass } from '../elements.ts';
import type { Ligand } from '../ligands/index.ts';
import { coordination, geometriesFor } from './coordination.ts';
import type { Context } from './entity.ts';
import { identityOf } from './identity.ts';
import { compositionOf } from './lexicon.ts';
import { entityText } from './print.ts';
import type { RawEntity, RawSalt } from './raw.ts';
import { shareCharge } from './share.ts';
import type { EntityReading, LigandReading, Reading } from './types.ts';

const ENTITY_DOUBTS = [
  'impossible-oxidation-state',
  'implausible-oxidation-state',
  'mixed-valence',
  'oxidation-state-sharing',
];

/** What the service tells of one entity. */
export function entityReading(
  entity: RawEntity,
  charge: number | null,
  sphereOpen: boolean,
  context: Context,
): EntityReading {
  // Each entity takes its number here, doubtful or not, so that an answer keeps its place.
  for (const code of ENTITY_DOUBTS) context.codeAt(code, entity.start);
  const shared = shareCharge(entity, charge, context);
  const { number, denticity } = coordination(entity);
  const coordinationNumber = sphereOpen ? null : number;
  const composition = entityComposition(entity);
  const centre = shared.centres.find((c) => isDBlock(c.element));
  return {
    entity: entityText(entity, charge),
    charge,
    hill: hillFormula(composition),
    molarMass: molarMass(composition),
    count: entity.count,
    composition,
    centres: shared.centres,
    ligands: entity.ligands.map(
      (l): LigandReading => ({
        abbreviation: l.ligand.abbreviation,
        count: l.count,
        charge: l.known ? (shared.ligandCharges.get(l) ?? l.ligand.charge) : null,
        denticity: denticity.get(l) ?? 1,
        hapticity: l.hapticity,
        donors: l.donors.slice(0, l.hapticity ?? denticity.get(l) ?? l.donors.length),
        ...shapeOf(l.ligand, denticity.get(l) ?? 1),
        bridging: l.mu !== null,
        name: l.ligand.name,
      }),
    ),
    coordinationNumber,
    geometries: geometriesFor(coordinationNumber, centre?.dCount ?? null),
    configuration: entity.configuration,
    identity: identityOf(entity, composition, charge),
  };
}

/** How a ligand holds its donors, where it uses all of them. */
function shapeOf(
  { bite, span, planar, donors }: Ligand,
  denticity: number,
): Pick<LigandReading, 'bite' | 'span' | 'planar'> {
  if (denticity < 2 || denticity !== donors.length) return {};
  return {
    bite: bite.map(([a, b]) => [a, b]),
    ...(span ? { span } : {}),
    ...(planar ? { planar } : {}),
  };
}

function entityComposition(entity: RawEntity): Composition {
  return addCompositions([
    ...entity.metals.map((m) => ({ composition: { [m.element]: 1 }, count: m.count })),
    ...entity.ligands.map((l) => ({ composition: l.ligand.composition, count: l.count })),
  ]);
}

/** Atoms of all that was typed. */
export function totalComposition(salt: RawSalt, entities: readonly EntityReading[]): Composition {
  return addCompositions([
    ...entities.map((e) => ({ composition: e.composition, count: e.count })),
    ...salt.ions.map(({ ion, count }) => ({ composition: compositionOf(ion.formula) ?? {}, count })),
    ...salt.bareMetals.map((m) => ({ composition: { [m.element]: 1 }, count: m.count })),
    ...salt.solvates,
  ]);
}

/** Ligands of all entities, like ones together. */
export function allLigands(entities: readonly EntityReading[]): LigandReading[] {
  const merged = new Map<string, LigandReading>();
  for (const ligand of entities.flatMap((e) => e.ligands)) {
    const key = [ligand.abbreviation, ligand.bridging, ligand.hapticity, ligand.donors.join()].join('|');
    merged.set(key, { ...ligand, count: ligand.count + (merged.get(key)?.count ?? 0) });
  }
  return [...merged.values()];
}

/** The facts of a reading that cautions are drawn from. */
export function cautionContext(reading: Omit<Reading, 'cautions'>): CautionContext {
  return {
    composition: reading.composition,
    ligands: reading.ligands.map((l) => ({ abbreviation: l.abbreviation, count: l.count })),
    counterIons: reading.counterIons.map((i) => i.formula),
    metals: reading.centres.map(({ element, oxidationState }) => ({ element, oxidationState })),
  };
}
