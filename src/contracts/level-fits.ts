import * as z from 'zod';
import { Instant, Visibility } from './common.ts';
import { FitInput, FitResult } from './ligand-field.ts';
import { route } from './route.ts';

const id = z.string().min(1).max(64);

/** What `derive/fit` takes; a band may name the stored one that it is. */
const SavedInput = FitInput.extend({
  bands: z
    .array(FitInput.shape.bands.element.extend({ band: id.optional().describe('Id of the band of the complex it is') }))
    .min(1)
    .max(12),
});

export const LevelFitInput = z
  .strictObject({
    centre: z.number().int().min(0).max(50).default(0).describe('Ordinal of the centre, from 0'),
    input: SavedInput,
    candidate: z.number().int().min(0).max(50).default(0).describe('Place in the list that derive/fit answers'),
    note: z.string().trim().max(2000).optional(),
    visibility: Visibility.optional(),
  })
  .meta({
    id: 'LevelFitInput',
    example: {
      centre: 0,
      input: {
        n: 3,
        geometry: 'OC-6',
        bands: [
          { wavenumber: 21550, to: '4T2g' },
          { wavenumber: 28500, to: '4T1g(F)' },
        ],
      },
      candidate: 0,
    },
  });
export type LevelFitInput = z.infer<typeof LevelFitInput>;

const StoredInput = FitInput.extend({
  bands: z.array(
    FitInput.shape.bands.element.extend({
      band: id.optional(),
      spectrum: id.optional().describe('The spectrum that the band stands in'),
    }),
  ),
});

export const LevelFitRecord = z
  .object({
    id: z.string(),
    complex: z.string(),
    centre: z.number().int(),
    input: StoredInput,
    result: FitResult.shape.candidates.element.describe('The candidate chosen, as the release computed it'),
    release: z.string().describe('Version of the program that computed it'),
    note: z.string().nullable(),
    visibility: Visibility,
    madeBy: z.string().nullable().describe('Name; null for guests'),
    createdAt: Instant,
    may: z.object({ withdraw: z.boolean() }),
  })
  .meta({ id: 'LevelFit' });
export type LevelFitRecord = z.infer<typeof LevelFitRecord>;

const tag = 'Ligand field';

export const levelFitRoutes = {
  listLevelFits: route({
    method: 'GET',
    path: '/api/complexes/{accession}/fits',
    summary: 'Saved fits of the levels of a complex, latest first: those whose spectra are all in sight',
    tag,
    who: 'signed-in',
    scope: 'read',
    status: 200,
    answers: z.array(LevelFitRecord),
  }),
  createLevelFit: route({
    method: 'POST',
    path: '/api/complexes/{accession}/fits',
    summary: 'Save a fit; it is computed again from its input',
    tag,
    who: 'member',
    scope: 'write',
    body: LevelFitInput,
    limit: 20_000,
    status: 201,
    answers: LevelFitRecord,
  }),
  withdrawLevelFit: route({
    method: 'DELETE',
    path: '/api/level-fits/{id}',
    summary: 'Withdraw a saved fit',
    tag,
    who: 'member',
    scope: 'write',
    status: 204,
    answers: null,
  }),
};
