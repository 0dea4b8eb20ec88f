import * as z from 'zod';

const wavenumber = z.number().min(0).max(1e6).describe('cm⁻¹');
const value = z.number().min(-1e9).max(1e9);
const width = z.number().positive().max(1e6).describe('cm⁻¹');
const component = z.number().int().min(0).max(19).describe('Place in the order that the step before left, from 0');
const nothing = z.strictObject({});

/** One step of a band fit. The same steps on the same points give the same numbers. */
export const FitStepRecord = z
  .discriminatedUnion('operation', [
    z.strictObject({
      operation: z.literal('range'),
      parameters: z.strictObject({ from: wavenumber.nullable(), to: wavenumber.nullable() }),
    }),
    z.strictObject({
      operation: z.literal('smooth'),
      parameters: z.strictObject({ halfWidth: z.number().min(0).max(1e5).describe('cm⁻¹') }),
    }),
    z.strictObject({
      operation: z.literal('baseline'),
      parameters: z.strictObject({
        baseline: z.strictObject({ kind: z.enum(['line', 'scattering']), from: wavenumber, to: wavenumber }).nullable(),
      }),
    }),
    z.strictObject({
      operation: z.literal('settings'),
      parameters: z.strictObject({
        shape: z.enum(['gaussian', 'lorentzian', 'voigt']),
        count: z.number().int().min(0).max(20).nullable().describe('Null: by AICc'),
        edge: z.boolean().nullable().describe('Null: by AICc'),
        constant: z.boolean(),
      }),
    }),
    z.strictObject({ operation: z.literal('pick'), parameters: nothing }),
    z.strictObject({ operation: z.literal('find'), parameters: nothing }),
    z.strictObject({ operation: z.literal('refine'), parameters: nothing }),
    z.strictObject({
      operation: z.literal('add'),
      parameters: z.strictObject({ wavenumber, height: value, fwhm: width }),
    }),
    z.strictObject({ operation: z.literal('remove'), parameters: z.strictObject({ component }) }),
    z.strictObject({
      operation: z.literal('set'),
      parameters: z.strictObject({
        component,
        wavenumber: wavenumber.optional(),
        height: value.optional(),
        fwhm: width.optional(),
      }),
    }),
    z.strictObject({
      operation: z.literal('lock'),
      parameters: z.strictObject({ component, part: z.enum(['wavenumber', 'height', 'fwhm']), locked: z.boolean() }),
    }),
  ])
  .meta({ id: 'FitStep' });

/** How fitted bands came about: the curve that was fitted, each step, and what came out. */
export const FitHistory = z
  .strictObject({
    points: z.number().int().min(8).max(200_000).describe('Points of the curve that the steps work on'),
    quantity: z.string().max(40).describe('Quantity of its ordinates'),
    wavelengthCheck: z.number().min(0).max(100).nullable().describe('Standard uncertainty of the wavelengths, nm'),
    steps: z.array(FitStepRecord).min(1).max(200),
    components: z
      .array(
        z.strictObject({
          wavenumber,
          height: value,
          fwhm: width,
          area: z.number().describe('Of the fitted shape, height times cm⁻¹'),
          error: z.number().min(0).nullable().describe('Standard error of the position in the fit alone, cm⁻¹'),
        }),
      )
      .min(1)
      .max(20),
  })
  .meta({ id: 'FitHistory' });
export type FitHistory = z.infer<typeof FitHistory>;
