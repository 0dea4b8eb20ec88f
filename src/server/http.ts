import { createHash } from 'node:crypto';
import * as z from 'zod';
import { DomainError } from '../chem/errors.ts';
import type { Problem, ProblemDetail } from '../contracts/problem.ts';
import { log } from './log.ts';
import { StoreError } from './store.ts';

const TITLES: Record<number, string> = {
  400: 'The request cannot be read',
  401: 'Sign in first',
  403: 'Not allowed',
  404: 'Not found',
  405: 'This method is not served here',
  409: 'It conflicts with what is there',
  410: 'No longer here',
  412: 'Somebody changed it meanwhile',
  413: 'Too large',
  415: 'This kind of body is not served here',
  421: 'Wrong host',
  422: 'The request does not fit',
  428: 'If-Match is needed',
  429: 'Too many requests',
  500: 'Unexpected error',
  503: 'Not available just now',
};

export interface ProblemExtras {
  title?: string;
  errors?: ProblemDetail[];
  /** Further members of the problem, such as the accession of a duplicate. */
  members?: Record<string, unknown>;
  headers?: Record<string, string>;
}

/** A refusal with its status. Thrown deep, turned into an answer in one place. */
export class HttpError extends Error {
  override readonly name = 'HttpError';

  constructor(
    readonly status: number,
    message: string,
    readonly extras: ProblemExtras = {},
  ) {
    super(message);
  }
}

/** The one answer for what the asker may not see and for what is not there: same status, same body. */
export const notInSight = () => new HttpError(404, 'There is no such record in your sight');

/** An RFC 9457 answer. */
export function problem(status: number, detail: string, extras: ProblemExtras = {}): Response {
  const title = extras.title ?? TITLES[status] ?? 'Error';
  const slug = title.toLowerCase().replace(/[^a-z0-9]+/g, '-');
  const body: Problem = {
    type: `urn:zaffre:problem:${slug}`,
    title,
    status,
    detail,
    ...extras.members,
    ...(extras.errors ? { errors: extras.errors } : {}),
  };
  return new Response(JSON.stringify(body), {
    status,
    headers: { 'content-type': 'application/problem+json', 'cache-control': 'private, no-store', ...extras.headers },
  });
}

const toPointer = (path: readonly PropertyKey[]) =>
  `#${path.map((part) => `/${String(part).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('')}`;

/** Every fault that a contract found, as `errors` of a problem. */
export const contractErrors = (error: z.ZodError): ProblemDetail[] =>
  error.issues.map((issue) => ({ pointer: toPointer(issue.path), detail: issue.message }));

/** Failures leave as problem details; one that was not foreseen tells nothing of its insides. */
export function toProblem(error: unknown, requestId: string): Response {
  if (error instanceof HttpError) return problem(error.status, error.message, error.extras);
  if (error instanceof DomainError) {
    const { field, message, position, code } = error;
    const detail: ProblemDetail = { pointer: `#/${field}`, detail: message, code };
    if (position !== undefined) detail.position = position;
    return problem(422, message, { errors: [detail] });
  }
  if (error instanceof StoreError)
    return problem(503, 'The object store cannot be reached: try again', { headers: { 'retry-after': '10' } });
  if (error instanceof z.ZodError)
    return problem(422, 'The request does not match its contract', { errors: contractErrors(error) });
  log.error(
    { requestId, error: error instanceof Error ? { message: error.message, stack: error.stack } : error },
    'unexpected error',
  );
  return problem(500, `Unexpected error; its trace is kept under request ${requestId}`, {
    members: { instance: `urn:zaffre:request:${requestId}` },
  });
}

/** Strong entity tag of a representation: over the bytes that this asker gets. */
export const entityTag = (body: string): string =>
  `"${createHash('sha256').update(body).digest('base64url').slice(0, 27)}"`;

/**
 * Read a JSON body of at most `limit` bytes.
 *
 * @throws {HttpError} 400 when it is not JSON, 413 when it is longer (also when Content-Length lied), 422
 */
export async function readJsonBody(request: Request, limit: number): Promise<unknown> {
  return parseJson(new TextDecoder().decode(await readBytes(request, limit)), 'The body is not JSON');
}

/**
 * JSON as it may come from outside: without keys that would reach an object's prototype.
 *
 * @param refusal - what is said of a text that is none, also of one nested deeper than a program can follow
 * @throws {HttpError} 400 with the refusal; 422 for a null character, at which the database would end a text
 */
export function parseJson(text: string, refusal: string): unknown {
  try {
    return JSON.parse(text, (key, value: unknown) => {
      if (typeof value === 'string' && value.includes('\0')) throw nullCharacter(422);
      return key === '__proto__' ? undefined : value;
    });
  } catch (error) {
    throw error instanceof HttpError ? error : new HttpError(400, refusal);
  }
}

export const nullCharacter = (status: 400 | 422) => new HttpError(status, 'A text holds a null character');

export async function readBytes(request: Request, limit: number): Promise<Uint8Array> {
  const chunks: Uint8Array[] = [];
  let size = 0;
  for await (const chunk of (request.body ?? []) as unknown as AsyncIterable<Uint8Array>) {
    size += chunk.byteLength;
    if (size > limit) throw tooLarge(limit);
    chunks.push(chunk);
  }
  return Buffer.concat(chunks);
}

export const tooLarge = (limit: number) =>
  new HttpError(413, `The body is longer than the ${limit.toLocaleString('en')} bytes allowed here`);
