import * as z from 'zod';
import { route } from './route.ts';

const perCm = z.number().min(-1e6).max(1e6).describe('cm⁻¹');
const Electrons = z.number().int().min(1).max(9).describe('d electrons');
const CubicGeometry = z.enum(['OC-6', 'T-4', 'CU-8']);

/** A ligand of the overlap model: degrees and cm⁻¹. */
const OverlapLigand = z.strictObject({
  theta: z.number(),
  phi: z.number(),
  eSigma: perCm,
  ePi: perCm.optional(),
  ePiX: perCm.optional(),
  ePiY: perCm.optional(),
  psi: z.number().optional(),
  eDs: perCm.min(0).optional().describe('mixing of s and d'),
});

export const LevelsInput = z
  .strictObject({
    n: Electrons,
    field: z.discriminatedUnion('kind', [
      z.strictObject({ kind: z.literal('cubic'), geometry: CubicGeometry, delta: perCm }),
      z.strictObject({ kind: z.literal('overlap'), ligands: z.array(OverlapLigand).min(1).max(12) }),
    ]),
    B: perCm,
    C: perCm,
    zeta: z.number().min(-10_000).max(10_000).optional().describe('one-electron spin–orbit parameter ζ in cm⁻¹'),
    alpha: z.number().min(-1000).max(1000).optional().describe('Trees’ correction α L(L + 1), α in cm⁻¹'),
  })
  .meta({ id: 'LevelsInput' });

export const LevelsResult = z
  .looseObject({
    group: z.string().nullable(),
    levels: z.array(
      z.looseObject({
        energy: z.number().describe('cm⁻¹ above the lowest'),
        degeneracy: z.number().int(),
        multiplicity: z.number().int().nullable(),
        irrep: z.string().nullable(),
        label: z.string().nullable(),
        configurations: z.array(z.looseObject({ configuration: z.string(), share: z.number() })).optional(),
        symmetry: z.string().nullable().optional().describe('irrep of the double group by its least j'),
        composition: z.array(z.looseObject({ term: z.string(), share: z.number() })).optional(),
      }),
    ),
  })
  .meta({ id: 'LevelsResult' });

export const DiagramInput = z.strictObject({
  n: Electrons,
  geometry: CubicGeometry,
  ratioCB: z.number().positive().max(20),
  max: z.number().positive().max(1000).optional(),
  points: z.number().int().min(2).max(2001).optional(),
  view: z.enum(['ground', 'absolute']).optional().describe('what energies are counted from; ground unless told'),
});
export const DiagramResult = z
  .looseObject({
    x: z.array(z.number()).describe('Δ/B'),
    curves: z.array(z.looseObject({ label: z.string(), y: z.array(z.number()) })),
    ground: z.array(z.looseObject({ from: z.number(), to: z.number(), label: z.string() })),
    crossings: z.array(z.looseObject({ x: z.number(), from: z.string(), to: z.string() })),
  })
  .meta({ id: 'DiagramResult' });

export const FitInput = z
  .strictObject({
    n: Electrons,
    geometry: CubicGeometry,
    metal: z.string().max(3).optional().describe('symbol, for the B and C/B of the free ion'),
    oxidationState: z.number().int().min(-4).max(9).optional(),
    spin: z.enum(['high', 'low']).optional(),
    ratioCB: z.number().positive().max(20).optional().describe('C/B; else the free ion’s, else 4.5'),
    bands: z
      .array(
        z.strictObject({
          wavenumber: z.number().positive().max(1e6).describe('cm⁻¹'),
          to: z.string().max(20).optional().describe('4T2g, 4T1g(P)'),
          uncertainty: z.number().positive().max(1e6).optional().describe('standard uncertainty in cm⁻¹'),
        }),
      )
      .min(1)
      .max(12),
  })
  .meta({ id: 'FitInput' });

const maybe = z.number().nullable();
export const FitResult = z
  .looseObject({
    candidates: z.array(
      z.looseObject({
        delta: maybe.describe('cm⁻¹; null where no band depends on it'),
        B: maybe,
        C: maybe,
        errors: z.looseObject({ delta: maybe, B: maybe, C: maybe }),
        correlation: z.looseObject({ deltaB: maybe, deltaC: maybe, BC: maybe }),
        beta: maybe.describe('B over that of the free ion'),
        freeIon: z.looseObject({ B: z.number(), source: z.string() }).nullable(),
        assignments: z.array(
          z.looseObject({
            wavenumber: z.number(),
            to: z.string(),
            level: z.number().int().describe('which level of its term above the ground, from 1'),
            calculated: z.number(),
            residual: z.number(),
          }),
        ),
        rms: z.number(),
        ground: z.string(),
        spin: z.enum(['high', 'low']).nullable(),
        ratioCB: maybe.describe('C/B of the values told'),
        ratioSource: z.enum(['given', 'free ion', 'assumed', 'fitted']),
        degreesOfFreedom: z.number().int(),
        converged: z.boolean(),
        score: z.number().describe('rank: residuals, unusual values, missing bands; low is good'),
        remarks: z.array(z.string()).describe('what speaks against the candidate'),
      }),
    ),
  })
  .meta({ id: 'FitResult' });

const derive = {
  tag: 'Ligand field',
  who: 'signed-in',
  scope: 'read',
  status: 200,
  method: 'POST',
  limit: 20_000,
} as const;

export const ligandFieldRoutes = {
  deriveLevels: route({
    ...derive,
    path: '/api/derive/levels',
    summary: 'Levels of a dⁿ ion in a field',
    body: LevelsInput,
    answers: LevelsResult,
  }),
  deriveDiagram: route({
    ...derive,
    path: '/api/derive/diagram',
    summary: 'Energy-level diagram: energy/B against field/B',
    body: DiagramInput,
    answers: DiagramResult,
  }),
  deriveFit: route({
    ...derive,
    path: '/api/derive/fit',
    summary: 'Δ, B and C from observed bands, with candidate assignments',
    body: FitInput,
    answers: FitResult,
  }),
};
