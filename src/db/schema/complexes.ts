import { sql } from 'drizzle-orm';
import { index, integer, primaryKey, real, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { accounts, labs } from './accounts.ts';

export const recordStates = ['draft', 'registered', 'withdrawn'] as const;
export const visibilities = ['programme', 'lab'] as const;

/** A coordination entity (ion or neutral molecule), never its salt. */
export const complexes = sqliteTable(
  'complex',
  {
    id: text().primaryKey(),
    /** The counter; what the outside sees is the accession, its keyed permutation. */
    number: integer().notNull(),
    accession: text().notNull(),
    /** What makes it one complex: composition, charge, connectivity, geometry, isomer (design §3). */
    identityKey: text().notNull(),
    /** Plain text in Red Book order without stereodescriptor: "[CoCl2(en)2]+". */
    formula: text().notNull(),
    charge: integer().notNull(),
    hill: text().notNull(),
    composition: text({ mode: 'json' }).$type<Record<string, number>>().notNull(),
    /** g mol⁻¹ of the entity. */
    molarMass: real().notNull(),
    extent: text({ enum: ['discrete', 'chain', 'layer', 'network'] })
      .notNull()
      .default('discrete'),
    /** Relative configuration: "trans", "fac" …; null while not stated or where only one is possible. */
    descriptor: text(),
    chirality: text({ enum: ['Δ', 'Λ', 'C', 'A', 'rac'] }),
    /** Donor label at each vertex, in the numbering of `/api/geometries`; null while the isomer is not stated. */
    sites: text({ mode: 'json' }).$type<string[]>(),
    /** Vertex pairs spanned by one ligand. */
    chelates: text({ mode: 'json' }).$type<[number, number][]>(),
    /** Point group of donors and chelate edges; null while the isomer is not stated. */
    pointGroup: text(),
    donorSetGroup: text(),
    /** A subgroup chosen for analysis, with its reason. */
    effectiveGroup: text(),
    effectiveGroupReason: text(),
    labId: text()
      .notNull()
      .references(() => labs.id),
    makerId: text()
      .notNull()
      .references(() => accounts.id),
    state: text({ enum: recordStates }).notNull(),
    visibility: text({ enum: visibilities }).notNull().default('programme'),
    embargoUntil: text(),
    notes: text(),
    withdrawnReason: text(),
    /** The record that lives on, where a steward merged this one. */
    mergedInto: text(),
    /** Answers given to the questions of the reading, by code. */
    answers: text({ mode: 'json' }).$type<Record<string, string>>().notNull().default({}),
    /** Lower-case text that the free-text filter looks in: accession, formula, Hill, ligand names. */
    search: text().notNull(),
    version: integer().notNull().default(1),
    createdAt: text().notNull(),
    updatedAt: text().notNull(),
  },
  (t) => [
    uniqueIndex('complex_number').on(t.number),
    uniqueIndex('complex_accession').on(t.accession),
    // One record an identity among what the whole programme sees, and within a lab among what only it sees.
    uniqueIndex('complex_identity_programme')
      .on(t.identityKey)
      .where(sql`state = 'registered' and visibility = 'programme' and merged_into is null`),
    uniqueIndex('complex_identity_lab')
      .on(t.identityKey, t.labId)
      .where(sql`state = 'registered' and visibility = 'lab' and merged_into is null`),
    index('complex_identity').on(t.identityKey),
    index('complex_lab').on(t.labId, t.state),
    index('complex_group').on(t.pointGroup),
    // All that sight asks of a complex, so that counting reads no whole rows.
    index('complex_sight').on(
      t.mergedInto,
      t.state,
      t.visibility,
      t.labId,
      t.makerId,
      t.embargoUntil,
      t.pointGroup,
      t.id,
    ),
  ],
);

export const centres = sqliteTable(
  'centre',
  {
    complexId: text()
      .notNull()
      .references(() => complexes.id),
    ordinal: integer().notNull(),
    element: text().notNull(),
    /** Group of the periodic table, 3–12; null for an f-block partner. */
    group: integer(),
    /** May be fractional (shared) or null (not to be shared out by formula alone). */
    oxidationState: real(),
    nominal: integer({ mode: 'boolean' }).notNull().default(false),
    alternatives: text({ mode: 'json' }).$type<number[]>().notNull().default([]),
    /** Why a person set the oxidation state otherwise than derived. */
    overrideReason: text(),
    dCount: real(),
    coordinationNumber: integer(),
    /** Polyhedral symbol, or null with its basis. */
    geometry: text(),
    geometryBasis: text({ enum: ['found', 'assumed', 'fluxional', 'unknown'] }).notNull(),
    spinState: text({ enum: ['low', 'intermediate', 'high', 'crossover'] }),
    groundTerm: text(),
    /** The group in which the ground term is labelled. */
    groundTermGroup: text(),
  },
  (t) => [
    primaryKey({ columns: [t.complexId, t.ordinal] }),
    // With the complex behind, so that a filter is answered from the index alone.
    index('centre_element').on(t.element, t.oxidationState, t.complexId),
    index('centre_d').on(t.dCount, t.complexId),
    index('centre_geometry').on(t.geometry, t.complexId),
  ],
);

/** A kind of ligand in a complex. */
export const complexLigands = sqliteTable(
  'complex_ligand',
  {
    complexId: text()
      .notNull()
      .references(() => complexes.id),
    ordinal: integer().notNull(),
    abbreviation: text().notNull(),
    count: integer().notNull(),
    charge: integer(),
    denticity: integer().notNull(),
    hapticity: integer(),
    /** Element symbols of the donor atoms, in the order of the ligand's own numbering. */
    donors: text({ mode: 'json' }).$type<string[]>().notNull(),
    bridging: integer({ mode: 'boolean' }).notNull().default(false),
  },
  (t) => [
    primaryKey({ columns: [t.complexId, t.ordinal] }),
    index('complex_ligand_name').on(t.abbreviation, t.complexId),
  ],
);

/** Which donor of which ligand sits at which vertex of which centre; a bridging donor has a row a centre. */
export const ligandSites = sqliteTable(
  'ligand_site',
  {
    complexId: text()
      .notNull()
      .references(() => complexes.id),
    centreOrdinal: integer().notNull(),
    /** Vertex in the numbering of `/api/geometries`. */
    vertex: integer().notNull(),
    ligandOrdinal: integer().notNull(),
    /** Which of the `count` ligands of that kind. */
    instance: integer().notNull(),
    /** Index into the ligand's donors. */
    donor: integer().notNull(),
  },
  (t) => [primaryKey({ columns: [t.complexId, t.centreOrdinal, t.vertex] })],
);

/** The material that one lab made. */
export const preparations = sqliteTable(
  'preparation',
  {
    id: text().primaryKey(),
    /** The complex under which it is filed: the first of its components. */
    complexId: text()
      .notNull()
      .references(() => complexes.id),
    labId: text()
      .notNull()
      .references(() => labs.id),
    makerId: text()
      .notNull()
      .references(() => accounts.id),
    label: text().notNull(),
    /** The whole formula unit as typed and as printed by the reader; null for a solution as received. */
    formula: text(),
    counterIons: text({ mode: 'json' }).$type<{ formula: string; count: number }[]>().notNull().default([]),
    solvates: text({ mode: 'json' }).$type<{ formula: string; count: number }[]>().notNull().default([]),
    /** g mol⁻¹ per formula unit. */
    molarMass: real(),
    host: text(),
    form: text({ enum: ['crystal', 'powder', 'film', 'solution'] }),
    isotopicLabel: text(),
    /** −1 … 1. */
    enantiomericExcess: real(),
    /** Mass fraction, 0 … 1. */
    purity: real(),
    storage: text(),
    atmosphere: text(),
    preparedOn: text(),
    notes: text(),
    visibility: text({ enum: visibilities }).notNull().default('programme'),
    state: text({ enum: recordStates }).notNull().default('registered'),
    withdrawnReason: text(),
    version: integer().notNull().default(1),
    createdAt: text().notNull(),
    updatedAt: text().notNull(),
  },
  (t) => [index('preparation_complex').on(t.complexId), index('preparation_lab').on(t.labId)],
);

/** The complexes in a formula unit: two in a double salt. */
export const preparationComponents = sqliteTable(
  'preparation_component',
  {
    preparationId: text()
      .notNull()
      .references(() => preparations.id),
    complexId: text()
      .notNull()
      .references(() => complexes.id),
    perFormulaUnit: real().notNull(),
  },
  (t) => [primaryKey({ columns: [t.preparationId, t.complexId] })],
);

/** Two records that look like one complex, for a steward to judge; neither lab is told of the other's. */
export const mergeTasks = sqliteTable('merge_task', {
  id: text().primaryKey(),
  firstId: text()
    .notNull()
    .references(() => complexes.id),
  secondId: text()
    .notNull()
    .references(() => complexes.id),
  createdAt: text().notNull(),
  settledAt: text(),
  settledBy: text().references(() => accounts.id),
  outcome: text({ enum: ['merged', 'different'] }),
  reason: text(),
});

/** A fit of field and repulsion to observed bands of one centre, as it was saved. Never changed, only followed. */
export const levelFits = sqliteTable(
  'level_fit',
  {
    id: text().primaryKey(),
    complexId: text()
      .notNull()
      .references(() => complexes.id),
    centreOrdinal: integer().notNull(),
    makerId: text()
      .notNull()
      .references(() => accounts.id),
    /** What was fitted, as `derive/fit` takes it, with the spectra and bands that the wavenumbers come from. */
    input: text({ mode: 'json' }).$type<Record<string, unknown>>().notNull(),
    /** The candidate that was chosen, as `derive/fit` answered. */
    result: text({ mode: 'json' }).$type<Record<string, unknown>>().notNull(),
    /** Version of the program that computed it. */
    release: text().notNull(),
    note: text(),
    visibility: text({ enum: visibilities }).notNull().default('programme'),
    createdAt: text().notNull(),
    withdrawnAt: text(),
  },
  (t) => [index('level_fit_complex').on(t.complexId, t.centreOrdinal)],
);
