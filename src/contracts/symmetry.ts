import * as z from 'zod';
import { route } from './route.ts';

const GroupSymbol = z.string().min(1).max(10).describe('Schoenflies symbol in plain text: Oh, D4h, Cinfv');
const Irrep = z.string().min(1).max(20);
const IrrepCount = z.object({ irrep: z.string(), count: z.number().int() });
const Vector = z.tuple([z.number(), z.number(), z.number()]);
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

export const ProductInput = z.strictObject({
  group: GroupSymbol,
  irreps: z.array(Irrep).min(1).max(12).describe('T2g; of a double group also Γ8+ or G3/2g'),
  part: z
    .enum(['symmetric', 'antisymmetric'])
    .optional()
    .describe('Of the square or cube: for two or three times the same irrep'),
});
export const DescentInput = z.strictObject({
  from: GroupSymbol,
  to: GroupSymbol,
  irreps: z.array(Irrep).min(1).max(50).optional(),
  along: z.string().max(100).optional().describe("A choice of axes, or one class in it, such as C2''"),
});
export const SplittingInput = z.strictObject({ group: GroupSymbol, term: z.string().min(1).max(10) });
const Atom = z.strictObject({
  element: z.string().min(1).max(10).describe('Atoms of one symbol are alike'),
  x: z.number().describe('Å, in any frame'),
  y: z.number(),
  z: z.number(),
});
export const VibrationsInput = z
  .strictObject({
    geometry: z.string().min(1).max(10).optional().describe('Polyhedral symbol, with sites'),
    sites: z.array(z.string().min(1).max(40)).min(1).max(12).optional(),
    links: z
      .array(z.tuple([z.number().int(), z.number().int()]))
      .max(12)
      .optional()
      .describe('Pairs of sites, counted from 0, that a chelate ring joins'),
    coordinates: z.array(Atom).min(1).max(200).optional().describe('In place of geometry and sites'),
    tolerance: z.number().optional().describe('Å, default 0.1: about how far atoms may lie from exact symmetry'),
  })
  .superRefine((input, context) => {
    const refuse = (field: string, message: string) => context.addIssue({ code: 'custom', path: [field], message });
    if (input.coordinates) {
      if (input.geometry || input.sites || input.links)
        refuse('coordinates', 'Send coordinates or a geometry, not both');
      return;
    }
    if (!input.geometry) refuse('geometry', 'Send geometry and sites, or coordinates');
    if (!input.sites) refuse('sites', 'Send geometry and sites, or coordinates');
    if (input.tolerance !== undefined) refuse('tolerance', 'A tolerance goes with coordinates');
  });
const Links = z
  .array(z.tuple([z.number().int(), z.number().int()]))
  .max(12)
  .describe('Pairs of sites, counted from 0, that a chelate ring joins');
export const SelectionInput = z
  .strictObject({
    group: GroupSymbol,
    from: z.string().min(1).max(30),
    to: z.string().min(1).max(30),
    vibrations: z
      .array(z.strictObject({ irrep: Irrep, count: z.number().int().min(1).max(100) }))
      .max(50)
      .optional(),
    skeleton: z
      .strictObject({
        geometry: z.string().min(1).max(10),
        sites: z.array(z.string().min(1).max(40)).min(1).max(12),
        links: Links.optional(),
      })
      .optional()
      .describe('The actual skeleton, of that group, in place of vibrations'),
  })
  .superRefine(({ vibrations, skeleton }, context) => {
    if (vibrations && skeleton) {
      context.addIssue({ code: 'custom', path: ['skeleton'], message: 'Send vibrations or a skeleton, not both' });
    }
  });
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
export const TransitionsQuery = z.strictObject({
  spin: z.enum(['low', 'intermediate', 'high']).optional().describe('In place of the spin state of the record'),
});

const read = { tag: 'Symmetry', who: 'signed-in', scope: 'read', status: 200 } as const;
const derive = { ...read, method: 'POST', limit: 20_000 } as const;

export const symmetryRoutes = {
  listGroups: route({
    ...read,
    method: 'GET',
    path: '/api/symmetry/groups',
    summary: 'Point groups by symbol',
    answers: z.object({ items: z.array(z.object({ symbol: z.string(), order: z.number().int().nullable() })) }),
  }),
  readGroup: route({
    ...read,
    method: 'GET',
    path: '/api/symmetry/groups/{symbol}',
    summary: 'The character table of a group',
    answers: CharacterTable,
  }),
  readTransitions: route({
    ...read,
    method: 'GET',
    path: '/api/complexes/{accession}/transitions',
    summary: 'All d–d transitions from the ground term of a complex, by excited term and polarisation',
    query: TransitionsQuery,
    answers: z.object({ accession: z.string(), centres: z.array(TransitionTable) }),
  }),
  deriveProduct: route({
    ...derive,
    path: '/api/derive/product',
    summary: 'Direct product of irreps, reduced',
    body: ProductInput,
    answers: z.object({ terms: z.array(IrrepCount) }),
  }),
  deriveDescent: route({
    ...derive,
    path: '/api/derive/descent',
    summary: 'What irreps become in a subgroup',
    body: DescentInput,
    answers: z.looseObject({
      maps: z.array(z.object({ irrep: z.string(), terms: z.array(IrrepCount) })),
      choices: z.array(z.string()),
    }),
  }),
  deriveSplitting: route({
    ...derive,
    path: '/api/derive/splitting',
    summary: 'Terms of a free-ion d term in a group',
    body: SplittingInput,
    answers: z.looseObject({
      terms: z.array(z.string()),
      orbitals: z.array(z.object({ orbital: z.string(), irrep: z.string().nullable() })),
    }),
  }),
  deriveVibrations: route({
    ...derive,
    path: '/api/derive/vibrations',
    summary: 'Vibrations of a skeleton, sorted by irrep',
    body: VibrationsInput,
    answers: z.looseObject({
      group: z.string(),
      total: z.array(IrrepCount),
      vibrations: z.array(IrrepCount.extend({ infrared: z.boolean(), raman: z.boolean() })),
      stretches: z.array(IrrepCount).nullable(),
      bends: z.array(IrrepCount).nullable(),
      permutation: z.array(IrrepCount).describe('Irreps of the atoms as the operations permute them'),
      axes: z.string(),
      orientation: z
        .object({ x: Vector, y: Vector, z: Vector, centre: Vector })
        .optional()
        .describe('For coordinates: the axes of the labels in the frame given'),
    }),
  }),
  deriveSelection: route({
    ...derive,
    path: '/api/derive/selection',
    summary: 'Why a transition is allowed or forbidden, step by step',
    body: SelectionInput,
    answers: SelectionResult,
  }),
};
