import * as z from 'zod';

// What the endpoints of group theory answer.

export const IrrepCount = z.object({ irrep: z.string(), count: z.number().int() });
export const Vector = z.tuple([z.number(), z.number(), z.number()]);
const PerAxis = z.object({ x: z.boolean(), y: z.boolean(), z: z.boolean() });
const Mechanism = z.enum(['allowed', 'vibronic', 'spin-forbidden', 'spin-forbidden-vibronic', 'forbidden']);
const Epsilon = z.object({ from: z.number(), to: z.number(), basis: z.string() }).describe('dm³ mol⁻¹ cm⁻¹');
const irrepsPerAxis = z.object({ x: z.array(z.string()), y: z.array(z.string()), z: z.array(z.string()) });

export const CharacterTable = z
  .looseObject({
    symbol: z.string(),
    order: z.number().int().nullable().describe('Null for the linear groups'),
    centrosymmetric: z.boolean(),
    setting: z.string().describe('The choice of axes, in words'),
    classes: z.array(z.object({ label: z.string(), size: z.number().int().nullable() })),
    irreps: z.array(
      z.looseObject({
        label: z.string(),
        dimension: z.number().int(),
        characters: z.array(z.union([z.number(), z.string()])),
        functions: z.array(z.string()),
      }),
    ),
    double: z
      .object({
        order: z.number().int(),
        classes: z.array(z.object({ label: z.string(), size: z.number().int() })),
        irreps: z.array(
          z.object({
            label: z.string().describe('T2g, or by the least j that holds it: G3/2g'),
            bethe: z.string().describe('Γ8+; both numbers of a complex pair'),
            spinor: z.boolean().describe('Changes sign under a full turn'),
            dimension: z.number().int(),
            characters: z.array(z.number()),
          }),
        ),
      })
      .nullable()
      .describe('The double group; null for the linear groups'),
  })
  .meta({ id: 'CharacterTable' });

export const SelectionResult = z
  .looseObject({
    spinAllowed: z.boolean(),
    laporteAllowed: z.boolean().nullable(),
    dipole: PerAxis,
    vibronic: irrepsPerAxis,
    magneticDipole: PerAxis,
    spinOrbit: z.looseObject({
      allowed: z.boolean().nullable().describe('Through the double group; null where the spin does not change'),
      dipole: PerAxis.nullable(),
      vibronic: irrepsPerAxis.nullable(),
      order: z.number().int().nullable().describe('How many times spin–orbit coupling must act'),
      components: z.object({ from: z.string(), to: z.string() }).nullable(),
      steps: z.array(z.string()),
    }),
    mechanism: Mechanism,
    expectedEpsilon: Epsilon,
    lowerGroups: z
      .array(
        z.object({
          group: z.string(),
          along: z.string().nullable(),
          from: z.array(z.string()),
          to: z.array(z.string()),
          dipole: PerAxis,
        }),
      )
      .describe('Subgroups that open a polarisation, from high to low'),
    steps: z.array(z.string()),
  })
  .meta({ id: 'SelectionAnalysis' });

const TermTransition = z.looseObject({
  from: z.string(),
  to: z.string(),
  spinAllowed: z.boolean(),
  laporteAllowed: z.boolean().nullable(),
  dipole: PerAxis,
  vibronic: irrepsPerAxis,
  magneticDipole: PerAxis,
  spinOrbit: z.object({ allowed: z.boolean().nullable(), order: z.number().int().nullable() }),
  mechanism: Mechanism,
  expectedEpsilon: Epsilon,
});
export const TransitionTable = z
  .looseObject({
    element: z.string(),
    dCount: z.number().nullable(),
    geometry: z.string().nullable(),
    parent: z.string().nullable().describe('Group of the ideal polyhedron'),
    ground: z.object({ label: z.string(), group: z.string(), spin: z.string() }).nullable(),
    views: z.array(
      z.looseObject({
        kind: z.enum(['framework', 'donorSet', 'effective', 'polyhedron']),
        group: z.string(),
        setting: z.string(),
        axes: z.string(),
        ground: z.array(z.string()),
        rows: z.array(
          z.looseObject({
            label: z.string().describe('Excited term in the group of the polyhedron'),
            count: z.number().int(),
            freeIon: z.array(z.string()),
            spinAllowed: z.boolean(),
            transitions: z.array(TermTransition),
          }),
        ),
      }),
    ),
    notes: z.array(z.string()).describe('What is not told, and why'),
  })
  .meta({ id: 'TransitionTable' });
