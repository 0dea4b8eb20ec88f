import * as z from 'zod';
import { route } from './route.ts';
import { CharacterTable, IrrepCount, SelectionResult, TransitionTable, Vector } from './symmetry-answers.ts';

const GroupSymbol = z.string().min(1).max(10).describe('Schoenflies symbol in plain text: Oh, D4h, Cinfv');
const Irrep = z.string().min(1).max(20);
const Links = z
  .array(z.tuple([z.number().int(), z.number().int()]))
  .max(12)
  .describe('Pairs of sites, counted from 0, that a chelate ring joins');

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
    links: Links.optional(),
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
  })
  .meta({ id: 'VibrationsInput', example: { geometry: 'OC-6', sites: ['A', 'A', 'A', 'A', 'A', 'A'] } });
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
