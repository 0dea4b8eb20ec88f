import * as z from 'zod';
import { bandClasses } from '../chem/assignment/band-classes.ts';
import { Caution, Instant, LabRef, listOf, Paging, RecordState, Visibility } from './common.ts';

export const SpinState = z.enum(['low', 'intermediate', 'high', 'crossover']);
export const Chirality = z.enum(['Δ', 'Λ', 'C', 'A', 'rac']);
export const BandClass = z.enum(bandClasses);

export const Centre = z
  .object({
    element: z.string(),
    group: z.number().int().nullable(),
    oxidationState: z.object({ value: z.number().nullable(), nominal: z.boolean(), alternatives: z.array(z.number()) }),
    dCount: z.number().nullable(),
    geometry: z.string().nullable(),
    geometryBasis: z.enum(['found', 'assumed', 'fluxional', 'unknown']),
    spinState: SpinState.nullable(),
    groundTerm: z.object({ label: z.string(), group: z.string() }).nullable(),
  })
  .meta({ id: 'Centre' });

export const StripBand = z.object({ wavenumber: z.number(), epsilon: z.number().nullable(), class: BandClass });

const Isomer = z.object({
  descriptor: z.string().nullable(),
  chirality: Chirality.nullable(),
  sites: z.array(z.string()).nullable(),
  chelates: z.array(z.tuple([z.number().int(), z.number().int()])).nullable(),
});

/** A complex as a list gives it. */
export const ComplexSummary = z
  .object({
    accession: z.string(),
    formula: z.string(),
    charge: z.number().int(),
    hill: z.string(),
    molarMass: z.number().describe('g mol⁻¹ of the entity'),
    extent: z.enum(['discrete', 'chain', 'layer', 'network']),
    centres: z.array(Centre),
    ligands: z.array(z.object({ abbreviation: z.string(), count: z.number().int() })),
    isomer: Isomer,
    pointGroup: z.string().nullable(),
    donorSetGroup: z.string().nullable(),
    effectiveGroup: z.string().nullable(),
    state: RecordState,
    lab: LabRef,
    labs: z.number().int().describe('Labs that measured it, as far as the asker sees'),
    spectra: z.number().int(),
    strip: z.array(StripBand),
    colour: z.string().nullable().describe('sRGB of the solution at peak visible absorbance 1'),
    visibility: Visibility,
    embargoUntil: Instant.nullable(),
    mergedInto: z.string().optional(),
    updatedAt: Instant,
  })
  .meta({ id: 'ComplexSummary' });
export type ComplexSummary = z.infer<typeof ComplexSummary>;

export const HistoryEntry = z.object({
  at: Instant,
  who: z.string().nullable(),
  action: z.string(),
  detail: z.record(z.string(), z.unknown()),
});

export const PreparationRecord = z
  .object({
    id: z.string(),
    complex: z.string(),
    lab: LabRef,
    label: z.string(),
    formula: z.string().nullable(),
    components: z.array(z.object({ accession: z.string(), perFormulaUnit: z.number() })),
    counterIons: z.array(z.object({ formula: z.string(), count: z.number() })),
    solvates: z.array(z.object({ formula: z.string(), count: z.number() })),
    molarMass: z.number().nullable().describe('g mol⁻¹ per formula unit'),
    form: z.enum(['crystal', 'powder', 'film', 'solution']).nullable(),
    host: z.string().nullable(),
    isotopicLabel: z.string().nullable(),
    enantiomericExcess: z.number().nullable(),
    purity: z.number().nullable(),
    storage: z.string().nullable(),
    atmosphere: z.string().nullable(),
    preparedOn: z.string().nullable(),
    notes: z.string().nullable(),
    visibility: Visibility,
    state: RecordState,
    cautions: z.array(Caution),
  })
  .meta({ id: 'Preparation' });
export type PreparationRecord = z.infer<typeof PreparationRecord>;

/** A complex in full. */
export const ComplexRecord = ComplexSummary.extend({
  notes: z.string().nullable(),
  withdrawnReason: z.string().nullable(),
  cautions: z.array(Caution),
  doubts: z.number().int(),
  evidence: z.array(z.unknown()),
  preparations: z.array(PreparationRecord),
  history: z.array(HistoryEntry),
  siblings: z.array(
    z.object({ accession: z.string(), descriptor: z.string().nullable(), chirality: Chirality.nullable() }),
  ),
  may: z
    .object({ change: z.boolean(), addSpectrum: z.boolean(), download: z.boolean() })
    .describe('What the asker may do with it'),
}).meta({ id: 'Complex' });
export type ComplexRecord = z.infer<typeof ComplexRecord>;

const numbers = listOf(z.coerce.number());
export const ComplexFilters = z.object({
  metal: listOf(z.string()).optional(),
  oxidationState: numbers.optional(),
  dCount: numbers.optional(),
  geometry: listOf(z.string()).optional(),
  pointGroup: listOf(z.string()).optional(),
  spinState: listOf(SpinState).optional(),
  ligand: listOf(z.string()).optional(),
  substructure: z
    .string()
    .trim()
    .min(1)
    .max(500)
    .optional()
    .describe('SMILES of a fragment that one of the ligands holds'),
  lab: listOf(z.string()).optional(),
  folio: z.string().optional(),
  bandFrom: z.coerce.number().positive().optional().describe('nm'),
  bandTo: z.coerce.number().positive().optional().describe('nm'),
  minEpsilon: z.coerce.number().min(0).optional(),
  bandClass: listOf(BandClass).optional(),
  q: z.string().trim().max(200).optional(),
  state: listOf(RecordState).optional(),
});
export type ComplexFilters = z.infer<typeof ComplexFilters>;

export const complexSorts = [
  'accession',
  'formula',
  'metal',
  'dCount',
  'geometry',
  'pointGroup',
  'labs',
  'spectra',
  'updated',
] as const;
export const ComplexQuery = ComplexFilters.extend(Paging.shape).extend({
  sort: z.enum([...complexSorts, ...complexSorts.map((s) => `-${s}` as const)]).default('-updated'),
  facets: z.enum(['0', '1']).default('0'),
});
export type ComplexQuery = z.infer<typeof ComplexQuery>;

const answers = z.record(z.string(), z.string()).optional();

export const ComplexInput = z
  .strictObject({
    formula: z.string().max(500),
    answers,
    geometry: z
      .union([z.string(), z.array(z.string().nullable())])
      .nullable()
      .optional()
      .describe('One value, or one a centre'),
    isomer: z
      .union([z.number().int().min(0), z.array(z.string())])
      .nullable()
      .optional()
      .describe('Index, or sites, of the list of derive/isomers; null: not stated'),
    chirality: z.enum(['rac']).optional().describe('The pair of mirror images, where the isomer is chiral'),
    spinState: z
      .union([SpinState, z.array(SpinState.nullable())])
      .nullable()
      .optional(),
    lab: z.string().describe('Home lab: its id'),
    visibility: Visibility.optional(),
    state: z.enum(['draft', 'registered']).optional(),
    notes: z.string().max(10_000).optional(),
  })
  .meta({ id: 'ComplexInput' });
export type ComplexInput = z.infer<typeof ComplexInput>;

export const ComplexPatch = z
  .strictObject({
    geometry: z.string().nullable().optional(),
    isomer: z
      .union([z.number().int().min(0), z.array(z.string())])
      .nullable()
      .optional(),
    chirality: z.enum(['rac']).nullable().optional(),
    spinState: SpinState.nullable().optional(),
    notes: z.string().max(10_000).nullable().optional(),
    visibility: Visibility.optional(),
    embargoUntil: Instant.nullable().optional(),
    state: RecordState.optional(),
    withdrawnReason: z.string().trim().min(3).max(2000).optional().describe('Needed to withdraw'),
  })
  .meta({ id: 'ComplexPatch' });
export type ComplexPatch = z.infer<typeof ComplexPatch>;

export const PreparationInput = z
  .strictObject({
    label: z.string().trim().min(1).max(100),
    lab: z.string(),
    formula: z.string().max(500).optional().describe('The whole formula unit with counter-ions and solvates'),
    answers,
    form: z.enum(['crystal', 'powder', 'film', 'solution']).optional(),
    host: z.string().max(200).optional(),
    isotopicLabel: z.string().max(200).optional(),
    enantiomericExcess: z.number().min(-1).max(1).optional(),
    purity: z.number().gt(0).max(1).optional(),
    storage: z.string().max(500).optional(),
    atmosphere: z.string().max(200).optional(),
    preparedOn: z.iso.date().optional(),
    notes: z.string().max(10_000).optional(),
    visibility: Visibility.optional(),
  })
  .meta({ id: 'PreparationInput' });
export type PreparationInput = z.infer<typeof PreparationInput>;

export const PreparationPatch = PreparationInput.omit({ lab: true })
  .partial()
  .extend({ state: RecordState.optional(), withdrawnReason: z.string().trim().min(3).max(2000).optional() })
  .meta({ id: 'PreparationPatch' });
export type PreparationPatch = z.infer<typeof PreparationPatch>;
