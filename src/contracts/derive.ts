import * as z from 'zod';
import { Caution, Question } from './common.ts';
import { route } from './route.ts';

const Counted = z.object({ formula: z.string(), count: z.number() });
const CentreReading = z.object({
  element: z.string(),
  group: z.number().int().nullable(),
  oxidationState: z.number().nullable(),
  dCount: z.number().nullable(),
  nominal: z.boolean(),
});

export const FormulaInput = z.strictObject({
  formula: z.string().max(2000),
  answers: z.record(z.string(), z.string()).optional(),
});
export const FormulaReading = z
  .looseObject({
    formula: z.string(),
    entity: z.string(),
    entityCharge: z.number().nullable(),
    hill: z.string(),
    molarMass: z.number(),
    coordinationNumber: z.number().nullable(),
    centres: z.array(CentreReading),
    ligands: z.array(
      z.looseObject({
        abbreviation: z.string(),
        count: z.number(),
        charge: z.number().nullable(),
        denticity: z.number(),
      }),
    ),
    counterIons: z.array(Counted),
    solvates: z.array(Counted),
    isotopes: z
      .array(z.object({ isotope: z.string(), element: z.string(), massNumber: z.number().int(), count: z.number() }))
      .describe('Labelled atoms; all other values are those of natural abundance'),
    entities: z.array(
      z.looseObject({ entity: z.string(), charge: z.number().nullable(), hill: z.string(), count: z.number() }),
    ),
    geometries: z.array(z.string()),
    configuration: z.string().nullable(),
    questions: z.array(Question),
    cautions: z.array(Caution),
  })
  .meta({ id: 'FormulaReading' });

export const IsomerInput = z
  .strictObject({
    geometry: z.string(),
    ligands: z
      .array(
        z.strictObject({
          label: z.string().min(1).max(40).optional().describe('Needed without a pattern'),
          donors: z.number().int().min(1).max(9).optional().describe('Denticity; 1, or as many as the pattern names'),
          count: z.number().int().min(1).max(9),
          symmetric: z.boolean().optional(),
          span: z.enum(['fac', 'mer', 'either']).optional(),
          pattern: z.array(z.string().min(1).max(40)).max(9).optional(),
          links: z.array(z.tuple([z.number().int(), z.number().int()])).optional(),
          planar: z.boolean().optional(),
        }),
      )
      .min(1)
      .max(9),
  })
  .meta({ id: 'IsomerInput' });
export const IsomerList = z
  .object({
    count: z.number().int(),
    enantiomericPairs: z.number().int(),
    isomers: z.array(
      z.looseObject({
        descriptor: z.string().nullable(),
        chiral: z.boolean(),
        chirality: z.string().nullable(),
        pointGroup: z.string(),
        donorSetGroup: z.string(),
        sites: z.array(z.string()),
        chelates: z.array(z.array(z.number().int())),
      }),
    ),
  })
  .meta({ id: 'IsomerList' });

const triple = z.array(z.number()).length(3);
export const GeometryList = z
  .object({
    items: z.array(
      z.looseObject({
        symbol: z.string(),
        name: z.string(),
        coordinationNumber: z.number().int(),
        group: z.string(),
        vertices: z.array(triple),
        edges: z.array(z.array(z.number().int()).length(2)),
      }),
    ),
  })
  .meta({ id: 'GeometryList' });

const series = z.array(z.number()).min(2).max(100_000);
export const ColourInput = z
  .strictObject({
    x: series,
    epsilon: z.array(z.number().nullable()).min(2).max(100_000),
    concentration: z.number().positive().optional(),
    pathLength: z.number().positive().optional(),
  })
  .refine((c) => c.x.length === c.epsilon.length, {
    message: 'x and epsilon have not the same length',
    path: ['epsilon'],
  });
export const ColourResult = z.object({
  XYZ: triple,
  xy: z.array(z.number()).length(2),
  sRGB: triple,
  hex: z.string(),
  inGamut: z.boolean(),
  concentration: z.number(),
  pathLength: z.number(),
});

export const LigandRecord = z.looseObject({
  abbreviation: z.string(),
  name: z.string(),
  synonyms: z.array(z.string()),
  charge: z.number(),
  denticity: z.number(),
  donors: z.array(z.string()),
});

const read = { tag: 'Derivations', who: 'signed-in', scope: 'read', status: 200 } as const;

export const deriveRoutes = {
  deriveFormula: route({
    ...read,
    method: 'POST',
    path: '/api/derive/formula',
    summary: 'Read a formula',
    body: FormulaInput,
    answers: FormulaReading,
    limit: 20_000,
  }),
  deriveIsomers: route({
    ...read,
    method: 'POST',
    path: '/api/derive/isomers',
    summary: 'Stereoisomers of a set of ligands on a polyhedron',
    body: IsomerInput,
    answers: IsomerList,
    limit: 20_000,
  }),
  deriveColour: route({
    ...read,
    method: 'POST',
    path: '/api/derive/colour',
    summary: 'Colour of a solution',
    body: ColourInput,
    answers: ColourResult,
    limit: 5_000_000,
  }),
  listGeometries: route({
    ...read,
    method: 'GET',
    path: '/api/geometries',
    summary: 'Polyhedra by IUPAC symbol',
    answers: GeometryList,
  }),
  listLigands: route({
    ...read,
    method: 'GET',
    path: '/api/ligands',
    summary: 'The ligand library',
    answers: z.object({ items: z.array(LigandRecord), total: z.number(), next: z.null() }),
  }),
};
