import { blob, index, integer, primaryKey, real, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { accounts, labs } from './accounts.ts';
import { complexes, preparations, recordStates, visibilities } from './complexes.ts';

export const techniques = ['solution', 'reflectance', 'transmission', 'emission', 'circular-dichroism'] as const;

export const bandClasses = [
  'd-d',
  'LMCT',
  'MLCT',
  'intraligand',
  'interligand',
  'intervalence',
  'metal-metal',
  'metal-centred-other',
  'ion-pair',
  'other',
  'unassigned',
] as const;

export const bandQuantities = ['epsilon', 'absorbance', 'kubelka-munk', 'delta-epsilon', 'emission'] as const;

export const instruments = sqliteTable(
  'instrument',
  {
    id: text().primaryKey(),
    labId: text()
      .notNull()
      .references(() => labs.id),
    name: text().notNull(),
    model: text(),
    /** Highest absorbance that the lab trusts on it. */
    absorbanceLimit: real(),
    notes: text(),
    version: integer().notNull().default(1),
    createdAt: text().notNull(),
  },
  (t) => [index('instrument_lab').on(t.labId)],
);

/** Original files by content. The bytes are in the object store under `originals/<sha256>`. */
export const files = sqliteTable('file', {
  sha256: text().primaryKey(),
  size: integer().notNull(),
  createdAt: text().notNull(),
});

export const spectra = sqliteTable(
  'spectrum',
  {
    id: text().primaryKey(),
    complexId: text()
      .notNull()
      .references(() => complexes.id),
    preparationId: text().references(() => preparations.id),
    /** The lab that measured, which may not be the one that prepared. */
    labId: text()
      .notNull()
      .references(() => labs.id),
    makerId: text()
      .notNull()
      .references(() => accounts.id),
    title: text().notNull(),
    technique: text({ enum: techniques }).notNull(),
    phase: text({ enum: ['solution', 'glass', 'film', 'crystal', 'powder'] }),
    pH: real(),
    /** mol dm⁻³ */
    ionicStrength: real(),
    electrolyte: text(),
    atmosphere: text(),
    /** Time since dissolution, as written ("20 min"). */
    age: text(),
    /** mol dm⁻³ of the entity, with its standard uncertainty. */
    concentration: real(),
    concentrationUncertainty: real(),
    /** Mass, salt, volume and dilutions from which the concentration follows, where it was not typed. */
    weighing: text({ mode: 'json' }).$type<Record<string, unknown>>(),
    /** cm, with its standard uncertainty. */
    pathLength: real(),
    pathLengthUncertainty: real(),
    /** K */
    temperature: real(),
    /** nm */
    bandwidth: real(),
    cell: text(),
    polarisation: text(),
    blankSha256: text().references(() => files.sha256),
    instrumentId: text().references(() => instruments.id),
    operator: text(),
    measuredAt: text(),
    /** Made from band parameters, not measured; shown wherever the spectrum is. */
    synthetic: integer({ mode: 'boolean' }).notNull().default(false),
    fileSha256: text()
      .notNull()
      .references(() => files.sha256),
    fileName: text().notNull(),
    /** Which block of the file, and which ordinate column of the block. */
    block: integer().notNull().default(0),
    column: integer().notNull().default(0),
    /** How the file was read, replayable. */
    reading: text({ mode: 'json' }).$type<Record<string, unknown>>().notNull().default({}),
    xUnit: text().notNull(),
    yUnit: text().notNull(),
    points: integer().notNull(),
    /** cm⁻¹ */
    xMin: real().notNull(),
    xMax: real().notNull(),
    /** sRGB of the solution diluted to a highest visible absorbance of 1, "#rrggbb"; null where the range is too short. */
    colour: text(),
    warnings: text({ mode: 'json' }).$type<{ code: string; detail: string }[]>().notNull().default([]),
    flags: text({ mode: 'json' }).$type<{ code: string; detail: string }[]>().notNull().default([]),
    /** Replayable steps from the decoded points to what is shown. */
    history: text({ mode: 'json' }).$type<Record<string, unknown>[]>().notNull().default([]),
    visibility: text({ enum: visibilities }).notNull().default('programme'),
    state: text({ enum: recordStates }).notNull().default('registered'),
    withdrawnReason: text(),
    notes: text(),
    version: integer().notNull().default(1),
    createdAt: text().notNull(),
    updatedAt: text().notNull(),
  },
  (t) => [
    index('spectrum_complex').on(t.complexId, t.state),
    index('spectrum_lab').on(t.labId),
    index('spectrum_file').on(t.fileSha256, t.block, t.column),
    index('spectrum_preparation').on(t.preparationId),
  ],
);

/** The solvent or mixture, largest share first. */
export const spectrumSolvents = sqliteTable(
  'spectrum_solvent',
  {
    spectrumId: text()
      .notNull()
      .references(() => spectra.id),
    ordinal: integer().notNull(),
    name: text().notNull(),
    /** 0 … 1, before mixing. */
    volumeFraction: real().notNull(),
  },
  (t) => [primaryKey({ columns: [t.spectrumId, t.ordinal] }), index('spectrum_solvent_name').on(t.name)],
);

/** What absorbs: usually the one complex; more make it a mixture. */
export const spectrumSpecies = sqliteTable(
  'spectrum_species',
  {
    spectrumId: text()
      .notNull()
      .references(() => spectra.id),
    complexId: text()
      .notNull()
      .references(() => complexes.id),
    /** Mole fraction, 0 … 1; null while not known. */
    fraction: real(),
    basis: text().notNull(),
  },
  (t) => [primaryKey({ columns: [t.spectrumId, t.complexId] })],
);

/** Numbers of a spectrum. Each blob holds `points` little-endian float64; a gap is NaN. */
export const spectrumPoints = sqliteTable('spectrum_points', {
  spectrumId: text()
    .primaryKey()
    .references(() => spectra.id),
  /** Abscissa and ordinate as they stand in the file, in its units and order. */
  x: blob({ mode: 'buffer' }).notNull(),
  y: blob({ mode: 'buffer' }).notNull(),
  /** The ascending copy, cm⁻¹. */
  wavenumber: blob({ mode: 'buffer' }).notNull(),
  /** Absorbance for absorption techniques, the file's own quantity otherwise, in the order of `wavenumber`. */
  value: blob({ mode: 'buffer' }).notNull(),
});

export const bands = sqliteTable(
  'band',
  {
    id: text().primaryKey(),
    spectrumId: text()
      .notNull()
      .references(() => spectra.id),
    ordinal: integer().notNull(),
    /** cm⁻¹ */
    wavenumber: real().notNull(),
    height: real().notNull(),
    quantity: text({ enum: bandQuantities }).notNull(),
    /** dm³ mol⁻¹ cm⁻¹ per mole of entity; null where the conditions do not give it. */
    epsilon: real(),
    shoulder: integer({ mode: 'boolean' }).notNull().default(false),
    /** cm⁻¹ */
    fwhm: real(),
    oscillatorStrength: real(),
    /** Standard uncertainty of the wavenumber, cm⁻¹. */
    uncertainty: real(),
    found: text({ enum: ['picked', 'fitted', 'typed'] }).notNull(),
    class: text({ enum: bandClasses }).notNull().default('unassigned'),
    centreOrdinal: integer(),
    ligand: text(),
    from: text(),
    to: text(),
    reason: text(),
    state: text({ enum: ['proposed', 'attested', 'disputed'] })
      .notNull()
      .default('proposed'),
    proposedBy: text()
      .notNull()
      .references(() => accounts.id),
    judgedBy: text().references(() => accounts.id),
    judgedAt: text(),
    judgement: text(),
    version: integer().notNull().default(1),
  },
  (t) => [index('band_spectrum').on(t.spectrumId), index('band_place').on(t.wavenumber)],
);
