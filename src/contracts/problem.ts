import * as z from 'zod';

export const ProblemDetail = z
  .object({
    pointer: z.string().describe('JSON Pointer fragment into the request, such as #/formula'),
    detail: z.string(),
    code: z.string().optional(),
    position: z.number().int().optional().describe('Character offset in a formula, or line in a file'),
  })
  .meta({ id: 'ProblemDetail' });
export type ProblemDetail = z.infer<typeof ProblemDetail>;

/** RFC 9457 problem details. */
export const Problem = z
  .looseObject({
    type: z.string(),
    title: z.string(),
    status: z.number().int(),
    detail: z.string(),
    errors: z.array(ProblemDetail).optional(),
  })
  .meta({ id: 'Problem', description: 'RFC 9457 problem details' });
export type Problem = z.infer<typeof Problem>;
