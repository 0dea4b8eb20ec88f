/** One thing that is wrong with what was sent: where, what, and the offset in a formula or the line in a file. */
export interface ProblemDetail {
  pointer: string;
  detail: string;
  position?: number;
}

/** A refusal by the server (RFC 9457), or a request that never arrived, with status 0. */
export class ProblemError extends Error {
  override readonly name = 'ProblemError';

  constructor(
    readonly status: number,
    readonly title: string,
    readonly detail: string | undefined,
    readonly errors: readonly ProblemDetail[] = [],
    /** All that the answer held, its own members among it: the `accession` of a 409. */
    readonly members: Readonly<Record<string, unknown>> = {},
  ) {
    super(detail ?? title);
  }

  /** The first complaint about a field of the body, such as `formula`. */
  about(field: string): string | undefined {
    return this.errors.find(({ pointer }) => pointer === `#/${field}` || pointer.startsWith(`#/${field}/`))?.detail;
  }
}

/** What is told where an answer carries no problem details of its own. */
const TITLES: Record<number, string> = {
  0: 'The server cannot be reached',
  401: 'You are signed out',
  403: 'You may not do this',
  404: 'Not found',
  409: 'There is one already',
  412: 'Somebody changed this meanwhile',
  413: 'Too large',
  429: 'Too many requests at once',
  503: 'The service is busy or away',
};

/** Any thrown thing as a problem that can be shown. */
export function toProblemError(error: unknown): ProblemError {
  if (error instanceof ProblemError) return error;
  return new ProblemError(0, 'Something went wrong', error instanceof Error ? error.message : undefined);
}

/** Reads a failed answer; what is not problem details still gives its status a title. */
export async function readProblem(response: Response): Promise<ProblemError> {
  const fallback = TITLES[response.status] ?? `The server answered ${response.status}`;
  if (!/\bapplication\/(problem\+)?json\b/.test(response.headers.get('content-type') ?? '')) {
    return new ProblemError(response.status, fallback, undefined);
  }
  const body = (await response.json().catch(() => ({}))) as Partial<ProblemError>;
  const errors = Array.isArray(body.errors) ? body.errors : [];
  return new ProblemError(response.status, body.title ?? fallback, body.detail, errors, { ...body });
}

/** A request that never arrived. */
export function unreachable(cause: unknown): ProblemError {
  const problem = new ProblemError(0, TITLES[0]!, 'What you typed is still here. Check the connection and try again.');
  problem.cause = cause;
  return problem;
}
