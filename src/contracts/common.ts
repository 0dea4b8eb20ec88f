import * as z from 'zod';

/** Where the record came from a list: at most 500 a page, the next page by the cursor of the last. */
export const Paging = z.object({
  limit: z.coerce.number().int().min(1).max(500).default(50),
  cursor: z.string().max(2000).optional(),
});

/** A query value that may be repeated or hold commas: `metal=Co&metal=Ru` and `metal=Co,Ru` are one. */
export const listOf = <T extends z.ZodType>(item: T) =>
  z.preprocess(
    (given) =>
      (Array.isArray(given) ? given : [given]).flatMap((text) => String(text).split(',')).filter((text) => text !== ''),
    z.array(item).max(50),
  );

export const FacetCount = z.object({
  value: z.union([z.string(), z.number()]),
  count: z.number().int(),
  label: z.string().optional(),
});
export type FacetCount = z.infer<typeof FacetCount>;

/** A page of a list, all of it over what the asker sees. */
export const pageOf = <T extends z.ZodType>(item: T) =>
  z.object({
    items: z.array(item),
    total: z.number().int(),
    next: z.string().nullable().describe('Cursor of the next page'),
    facets: z.record(z.string(), z.array(FacetCount)).optional(),
  });
export interface Page<T> {
  items: T[];
  total: number;
  next: string | null;
  facets?: Record<string, FacetCount[]>;
}

export const Id = z.uuid().meta({ description: 'UUID that sorts by the time it was made' });
export const Email = z
  .email()
  .max(254)
  .transform((text) => text.toLowerCase());
export const Name = z.string().trim().min(1).max(200);
export const LabRef = z.object({ id: z.string(), name: z.string() });
export const Instant = z.iso.datetime().meta({ description: 'ISO 8601 instant in UTC' });
/** When something ends: an instant, or a day, whose last moment (UTC) it then is. */
export const Expiry = z.union([Instant, z.iso.date().transform((day) => `${day}T23:59:59.999Z`)]);
export const Visibility = z.enum(['programme', 'lab']);
export const RecordState = z.enum(['draft', 'registered', 'withdrawn']);
export const Caution = z
  .object({ id: z.string(), detail: z.string(), codes: z.array(z.string()), source: z.string() })
  .meta({
    id: 'Caution',
    description: 'A usual caution for this kind of composition; never a statement that something is safe',
  });
export const Question = z
  .object({
    code: z.string(),
    detail: z.string(),
    choices: z.array(z.object({ value: z.string(), label: z.string() })),
    position: z.number().int().optional(),
  })
  .meta({ id: 'Question' });
