import type * as z from 'zod';

/**
 * Who may ever use a route, before any record is looked at:
 * anyone; anybody signed in; a member of a lab (or the steward); a member who writes; the steward.
 * What a guest may see of a record, and what a contributor may change in it, is judged record by record.
 */
export type Who = 'anyone' | 'signed-in' | 'member' | 'steward';

export interface Route<Query extends z.ZodType = z.ZodType, Body extends z.ZodType = z.ZodType> {
  method: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  /** OpenAPI path, the file of `src/pages/api` in other letters: `/api/complexes/{accession}`. */
  path: string;
  summary: string;
  tag: string;
  who: Who;
  /** What an access token needs to use it. */
  scope: 'read' | 'write';
  /** Not for access tokens at all. */
  sessionOnly?: boolean;
  query?: Query;
  /** A JSON body. */
  body?: Body;
  /** A multipart body: the names of its parts, described for the document. */
  multipart?: { parts: Record<string, z.ZodType>; limit?: number };
  /** Largest JSON body in bytes; 200 000 unless told. */
  limit?: number;
  status: 200 | 201 | 202 | 204;
  /** What it answers: a schema for JSON, or the media type of a file. */
  answers: z.ZodType | string | null;
  /** Needs If-Match. */
  conditional?: boolean;
  /** Serves ranges of its file. */
  ranges?: boolean;
  /** Further refusals worth telling in the document. */
  refusals?: Record<number, string>;
}

/** A route as it stands in the table; the helper only keeps the types of query and body. */
export const route = <
  Q extends z.ZodType = z.ZodType<Record<string, never>>,
  B extends z.ZodType = z.ZodType<undefined>,
>(
  definition: Route<Q, B>,
): Route<Q, B> => definition;
