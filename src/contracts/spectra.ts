import * as z from 'zod';
import { Caution, Instant, LabRef, listOf, Paging, RecordState, Visibility } from './common.ts';
import { BandClass } from './complexes.ts';
import { FitHistory } from './fit-history.ts';

export type { FitHistory } from './fit-history.ts';

export const Technique = z.enum(['solution', 'reflectance', 'transmission', 'emission', 'circular-dichroism']);
const Note = z.object({ code: z.string(), detail: z.string() });
const Solvent = z.strictObject({ name: z.string().trim().min(1).max(100), volumeFraction: z.number().gt(0).max(1) });
const Medium = z.strictObject({
  pH: z.number().min(-3).max(17).nullable().optional(),
  ionicStrength: z.number().min(0).nullable().optional(),
  electrolyte: z.string().max(200).nullable().optional(),
  atmosphere: z.string().max(200).nullable().optional(),
  age: z.string().max(100).nullable().optional(),
});
const Species = z.strictObject({
  accession: z.string(),
  fraction: z.number().gt(0).max(1).nullable().optional(),
  basis: z.string().max(500),
});
const positive = z.number().positive();

/** The conditions that an upload brings and that a person may mend later. */
const conditions = {
  technique: Technique,
  solvent: z.union([z.string().trim().min(1).max(100), z.array(Solvent).min(1).max(6)]).optional(),
  medium: Medium.optional(),
  phase: z.enum(['solution', 'glass', 'film', 'crystal', 'powder']).optional(),
  concentration: positive.optional().describe('mol dm⁻³ of the entity'),
  concentrationUncertainty: positive.optional().describe('Standard uncertainty (k = 1) unless k says otherwise'),
  pathLength: positive.optional().describe('cm'),
  pathLengthUncertainty: positive.optional(),
  k: z.number().min(1).max(3).optional().describe('Coverage factor of the uncertainties sent; 1 where not told'),
  weighing: z.record(z.string(), z.unknown()).optional(),
  temperature: positive.optional().describe('K'),
  bandwidth: positive.optional().describe('nm'),
  cell: z.string().max(200).optional(),
  polarisation: z.string().max(200).optional(),
  species: z.array(Species).min(1).max(10).optional(),
  instrument: z.string().optional(),
  operator: z.string().max(200).optional(),
  measuredAt: z.union([Instant, z.iso.date()]).optional(),
  title: z.string().trim().max(200).optional(),
  notes: z.string().max(10_000).optional(),
  visibility: Visibility.optional(),
};

/** How a file is to be read where its own words do not settle it. */
export const ReadingOptions = z
  .strictObject({
    block: z.number().int().min(0).max(63).optional(),
    columns: z.strictObject({ x: z.number().int().min(0), y: z.array(z.number().int().min(0)).min(1) }).optional(),
    xUnit: z.enum(['nm', 'um', 'cm-1', 'eV', 'THz']).optional(),
    yUnit: z
      .enum([
        'absorbance',
        'transmittance',
        'percent-transmittance',
        'epsilon',
        'log-epsilon',
        'kubelka-munk',
        'reflectance',
        'percent-reflectance',
        'delta-epsilon',
        'emission',
        'arbitrary',
      ])
      .optional(),
    decimalComma: z.boolean().optional(),
    delimiter: z.string().max(3).optional(),
    skipLines: z.number().int().min(0).max(10_000).optional(),
  })
  .meta({ id: 'ReadingOptions' });
export type ReadingOptions = z.infer<typeof ReadingOptions>;

/** The same for a preview, with the conditions that are to be checked against the curve. */
export const PreviewOptions = ReadingOptions.extend({
  solvent: conditions.solvent,
  concentration: conditions.concentration,
  pathLength: conditions.pathLength,
}).meta({ id: 'PreviewOptions' });
export type PreviewOptions = z.infer<typeof PreviewOptions>;

export const SpectrumMetadata = z
  .strictObject({
    complex: z.string().optional().describe('Accession; or give a preparation'),
    preparation: z.string().optional(),
    lab: z.string().optional().describe('The measuring lab; where the asker is of one lab only, that one'),
    ...conditions,
    ...ReadingOptions.shape,
    synthetic: z.boolean().optional().describe('Computed from band parameters, not measured'),
    state: z.enum(['draft', 'registered']).optional().describe('Registered unless told'),
  })
  .refine((m) => m.complex !== undefined || m.preparation !== undefined, {
    message: 'Tell the complex or the preparation',
    path: ['complex'],
  })
  .meta({ id: 'SpectrumMetadata' });
export type SpectrumMetadata = z.infer<typeof SpectrumMetadata>;

export const SpectrumPatch = z
  .strictObject({
    ...(Object.fromEntries(
      Object.entries(conditions).map(([name, schema]) => [name, (schema as z.ZodType).nullable().optional()]),
    ) as {
      [K in keyof typeof conditions]: z.ZodOptional<z.ZodNullable<(typeof conditions)[K]>>;
    }),
    state: RecordState.optional(),
    withdrawnReason: z.string().trim().min(3).max(2000).optional(),
  })
  .meta({ id: 'SpectrumPatch' });
export type SpectrumPatch = z.infer<typeof SpectrumPatch>;

const Assignment = z.strictObject({
  class: BandClass,
  centre: z.number().int().min(0).optional(),
  ligand: z.string().max(100).optional(),
  from: z.string().max(100).optional(),
  to: z.string().max(100).optional(),
  reason: z.string().max(2000).optional(),
});
export const BandQuantity = z.enum(['epsilon', 'absorbance', 'kubelka-munk', 'delta-epsilon', 'emission']);

export const BandInput = z.strictObject({
  id: z
    .string()
    .optional()
    .describe('Id of a band that is kept: its judgement stands as long as nothing of it changes'),
  wavenumber: z.number().min(1000).max(120_000).describe('cm⁻¹'),
  height: z.number(),
  quantity: BandQuantity,
  fwhm: positive.nullable().optional(),
  shoulder: z.boolean().optional(),
  found: z.enum(['picked', 'fitted', 'typed']),
  assignment: Assignment.optional(),
});
export const BandList = z.array(BandInput).max(100).meta({ id: 'BandList' });
export type BandList = z.infer<typeof BandList>;

export const FittedBands = z
  .strictObject({ bands: BandList, fit: FitHistory })
  .meta({ id: 'FittedBands', description: 'Bands of which some were fitted, with the history of the fit' });
export type FittedBands = z.infer<typeof FittedBands>;

export const BandRecord = z
  .object({
    id: z.string(),
    wavenumber: z.number(),
    wavelength: z.number().describe('nm'),
    height: z.number(),
    quantity: BandQuantity,
    epsilon: z.number().nullable(),
    fwhm: z.number().nullable(),
    shoulder: z.boolean(),
    oscillatorStrength: z.number().nullable(),
    uncertainty: z.number().nullable(),
    found: z.enum(['picked', 'fitted', 'typed']),
    assignment: Assignment.extend({ class: BandClass }),
    verdict: z.string().nullable(),
    state: z.enum(['proposed', 'attested', 'disputed']),
    proposedBy: z.string().nullable().describe('Name; null for guests'),
    judgedBy: z.string().nullable().describe('Name; null for guests'),
    judgement: z.string().nullable(),
    may: z.object({ judge: z.boolean() }).describe('Whether this asker may attest or dispute it'),
  })
  .meta({ id: 'Band' });
export type BandRecord = z.infer<typeof BandRecord>;

export const SpectrumSummary = z
  .object({
    id: z.string(),
    complex: z.string(),
    formula: z.string(),
    preparation: z.string().nullable(),
    lab: LabRef,
    title: z.string(),
    technique: Technique,
    solvent: z.array(Solvent),
    concentration: z.number().nullable(),
    pathLength: z.number().nullable(),
    temperature: z.number().nullable(),
    points: z.number().int(),
    xMin: z.number(),
    xMax: z.number(),
    synthetic: z.boolean(),
    colour: z.string().nullable(),
    flags: z.array(Note),
    bandCount: z.number().int(),
    state: RecordState,
    measuredAt: z.string().nullable(),
    createdAt: Instant,
  })
  .meta({ id: 'SpectrumSummary' });
export type SpectrumSummary = z.infer<typeof SpectrumSummary>;

export const SpectrumRecord = SpectrumSummary.extend({
  medium: Medium,
  phase: z.string().nullable(),
  concentrationUncertainty: z.number().nullable(),
  pathLengthUncertainty: z.number().nullable(),
  k: z.literal(1).describe('Stored uncertainties are standard'),
  weighing: z.record(z.string(), z.unknown()).nullable(),
  bandwidth: z.number().nullable(),
  cell: z.string().nullable(),
  polarisation: z.string().nullable(),
  species: z.array(Species),
  instrument: z.object({ id: z.string(), name: z.string() }).nullable(),
  operator: z.string().nullable(),
  visibility: Visibility,
  notes: z.string().nullable(),
  withdrawnReason: z.string().nullable(),
  fileName: z.string(),
  sha256: z.string(),
  block: z.number().int(),
  column: z.number().int(),
  size: z.number().int().describe('Bytes of the original file'),
  xUnit: z.string(),
  yUnit: z.string(),
  reading: z.record(z.string(), z.unknown()),
  warnings: z.array(Note),
  bands: z.array(BandRecord),
  fit: FitHistory.nullable().describe('How the fitted bands were found; null for guests, and where none is fitted'),
  cautions: z.array(Caution),
  may: z.object({ change: z.boolean(), propose: z.boolean(), attest: z.boolean(), download: z.boolean() }),
}).meta({ id: 'Spectrum' });
export type SpectrumRecord = z.infer<typeof SpectrumRecord>;

export const SpectrumQuery = Paging.extend({
  complex: z.string().optional(),
  lab: listOf(z.string()).optional(),
  technique: listOf(Technique).optional(),
  instrument: listOf(z.string()).optional(),
  flag: listOf(z.string()).optional(),
  state: listOf(RecordState).optional(),
  q: z.string().trim().max(200).optional(),
  sort: z.enum(['created', '-created', 'title', '-title', 'complex', '-complex']).default('-created'),
  facets: z.enum(['0', '1']).default('0'),
});
export type SpectrumQuery = z.infer<typeof SpectrumQuery>;

export const PointsQuery = z.object({
  xUnit: z.enum(['nm', 'cm-1', 'eV', 'um', 'THz']).default('cm-1'),
  yUnit: z
    .enum(['absorbance', 'epsilon', 'log-epsilon', 'transmittance', 'file'])
    .optional()
    .describe('Epsilon where the conditions give it, else the quantity of the file'),
  from: z.coerce.number().optional(),
  to: z.coerce.number().optional(),
  max: z.coerce.number().int().min(4).max(200_000).default(2000),
});
export type PointsQuery = z.infer<typeof PointsQuery>;

export const Points = z
  .object({
    xUnit: z.string(),
    yUnit: z.string(),
    x: z.array(z.number()),
    y: z.array(z.number().nullable()),
    decimated: z.boolean(),
  })
  .meta({ id: 'Points' });
export type PointsRecord = z.infer<typeof Points>;
export type Points = z.infer<typeof Points>;

/** A file as it was read, before anything is stored. */
export const ReadBlock = z
  .object({
    title: z.string(),
    kind: z.enum(['curve', 'peaks']),
    xUnit: z.string().nullable(),
    yUnit: z.string().nullable(),
    suggestedXUnit: z.string().optional(),
    suggestedYUnit: z.string().optional(),
    points: z.number().int(),
    x: z.array(z.number()),
    y: z.array(z.number().nullable()),
    metadata: z.record(z.string(), z.string()),
    warnings: z.array(Note.extend({ line: z.number().int().optional() })),
    format: z.string(),
    dialect: z.record(z.string(), z.unknown()).optional(),
    flags: z.array(Note).describe('What the conditions sent along say against the curve').optional(),
  })
  .meta({ id: 'ReadBlock' });
export type ReadBlock = z.infer<typeof ReadBlock>;

export const Judgement = z.strictObject({ reason: z.string().trim().max(2000).optional() });
export type Judgement = z.infer<typeof Judgement>;

export const SimilarQuery = z.object({ limit: z.coerce.number().int().min(1).max(100).default(20) });
export const SimilarSpectra = z
  .object({
    items: z.array(
      z.object({
        spectrum: SpectrumSummary,
        cosine: z.number().describe('1 for curves of one shape'),
        angle: z.number().describe('degrees'),
        from: z.number().describe('cm⁻¹: the range that both cover'),
        to: z.number(),
      }),
    ),
    compared: z.number().int().describe('Spectra of the same technique in sight that cover enough of the range'),
  })
  .meta({ id: 'SimilarSpectra' });
export type SimilarSpectra = z.infer<typeof SimilarSpectra>;
