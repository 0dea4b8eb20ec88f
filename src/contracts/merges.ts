import * as z from 'zod';
import { Accession } from './accession.ts';
import { Instant } from './common.ts';
import { ComplexSummary } from './complexes.ts';

const Reason = z.string().trim().min(3).max(2000).describe('Kept in the trail');

/** One of the two records of a merge task. */
export const MergeSide = z
  .object({
    complex: ComplexSummary,
    notes: z.string().nullable(),
    createdAt: Instant,
    maker: z.string().describe('Name of who registered it'),
    preparations: z.number().int(),
    folios: z.number().int(),
    obstacles: z.array(z.string()).describe('Why the other record cannot be merged into this one as things stand'),
  })
  .meta({ id: 'MergeSide' });
export type MergeSide = z.infer<typeof MergeSide>;

/** Two records that look like one complex. */
export const MergeTask = z
  .object({
    id: z.string(),
    createdAt: Instant,
    first: MergeSide,
    second: MergeSide,
    differs: z.array(z.string()).describe('Names of the members of the two complexes that are not alike'),
  })
  .meta({ id: 'MergeTask' });
export type MergeTask = z.infer<typeof MergeTask>;

export const MergeSettlement = z
  .strictObject({ outcome: z.literal('different'), reason: Reason })
  .meta({ id: 'MergeSettlement' });
export type MergeSettlement = z.infer<typeof MergeSettlement>;

export const MergeInput = z
  .strictObject({ into: Accession.describe('The record that lives on'), reason: Reason })
  .meta({ id: 'MergeInput' });
export type MergeInput = z.infer<typeof MergeInput>;

export const SpectrumMove = z
  .strictObject({
    complex: Accession.describe('Where the spectrum belongs'),
    preparation: z
      .string()
      .nullable()
      .optional()
      .describe('Of that complex; left out, the present one is kept where it holds that complex, too'),
    reason: Reason,
  })
  .meta({ id: 'SpectrumMove' });
export type SpectrumMove = z.infer<typeof SpectrumMove>;
