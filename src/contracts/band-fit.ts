import * as z from 'zod';
import { route } from './route.ts';

const MOST_POINTS = 20_000;
const value = z.number().min(-1e9).max(1e9);

/** A component that a person laid; locked parts stay as they are. */
const Component = z.strictObject({
  wavenumber: z.number().min(0).max(1e6).describe('cm⁻¹'),
  height: value,
  fwhm: z.number().positive().max(1e6).describe('cm⁻¹'),
  locked: z
    .strictObject({ wavenumber: z.boolean().optional(), height: z.boolean().optional(), fwhm: z.boolean().optional() })
    .optional(),
});

/** Points of a band at 20 000 cm⁻¹. */
const EXAMPLE = {
  x: [16_000, 17_000, 18_000, 19_000, 20_000, 21_000, 22_000, 23_000],
  y: [0.4, 3.4, 15.8, 39.7, 54, 39.7, 15.8, 3.4],
  count: 1,
  edge: false,
};

export const BandFitInput = z
  .strictObject({
    x: z.array(z.number().min(0).max(1e6)).min(8).max(MOST_POINTS).describe('cm⁻¹, any order'),
    y: z
      .array(value.nullable())
      .max(MOST_POINTS)
      .describe('dm³ mol⁻¹ cm⁻¹, or whatever the heights shall be in; null is a gap'),
    count: z.number().int().min(0).max(20).optional().describe('Found by AICc where left out'),
    edge: z.boolean().optional().describe('A charge-transfer edge at the upper end; by AICc where left out'),
    constant: z.boolean().optional().describe('A constant under all bands'),
    shape: z.enum(['gaussian', 'lorentzian', 'voigt']).optional(),
    signed: z.boolean().optional().describe('Heights may be negative, as in circular dichroism'),
    start: z.array(Component).min(1).max(20).optional().describe('Components to begin with, kept in number'),
  })
  .refine(({ x, y }) => x.length === y.length, { message: 'x and y have not the same length', path: ['y'] })
  .meta({ id: 'BandFitInput', example: EXAMPLE });

const error = z.number().nullable().describe('Standard error; null where the data do not give it');

export const BandFitResult = z
  .looseObject({
    bands: z.array(
      z.looseObject({
        wavenumber: z.number().describe('cm⁻¹'),
        height: z.number(),
        fwhm: z.number().describe('cm⁻¹'),
        area: z.number(),
        oscillatorStrength: z.number().describe('Holds for ε in dm³ mol⁻¹ cm⁻¹'),
        shoulder: z.boolean(),
        lorentzian: z.number().nullable(),
        errors: z.looseObject({
          wavenumber: error,
          height: error,
          fwhm: error,
          area: error,
          oscillatorStrength: error,
        }),
      }),
    ),
    edge: z.looseObject({ height: z.number(), decay: z.number(), at: z.number() }).nullable(),
    constant: z.number().nullable(),
    rms: z.number(),
    residual: z.array(z.number().nullable()).describe('y minus the fit, in the order given; null at gaps'),
    compared: z.array(z.looseObject({ count: z.number(), edge: z.boolean(), aicc: z.number() })),
    converged: z.boolean(),
  })
  .meta({ id: 'BandFitResult' });

export const bandFitRoutes = {
  deriveBands: route({
    tag: 'Spectra',
    who: 'signed-in',
    scope: 'read',
    status: 200,
    method: 'POST',
    limit: 2_000_000,
    path: '/api/derive/bands',
    summary: 'Fit bands to a curve on the wavenumber axis',
    body: BandFitInput,
    answers: BandFitResult,
  }),
};
