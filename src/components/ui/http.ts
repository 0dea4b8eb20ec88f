import { readProblem, unreachable } from './problem-error.ts';

export { ProblemError } from './problem-error.ts';

type Method = 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/** How a change is sent: the version it is based on, and the key that makes a repeat harmless. */
export interface SendOptions {
  /** The `ETag` of the representation that was changed; needed by PATCH and DELETE. */
  ifMatch?: string | undefined;
  idempotencyKey?: string | undefined;
  signal?: AbortSignal | undefined;
}

/** A record with the version it came in, as `SendOptions.ifMatch` wants it back. */
export interface Versioned<T> {
  data: T;
  etag: string | undefined;
}

/**
 * Reads JSON from our own API.
 *
 * @throws {ProblemError} with the server's reasons, or status 0 when it cannot be reached; an abort is thrown as it is
 */
export async function getJson<T>(url: string, signal?: AbortSignal): Promise<T> {
  return (await getVersioned<T>(url, signal)).data;
}

/** Like `getJson`, with the `ETag` that a later change must name. */
export async function getVersioned<T>(url: string, signal?: AbortSignal): Promise<Versioned<T>> {
  return answer<T>(await request(url, { signal: signal ?? null }));
}

/** Sends a JSON body (none where undefined); answers the parsed body, undefined for 204. Throws as `getJson` does. */
export async function sendJson<T = unknown>(
  method: Method,
  url: string,
  body?: unknown,
  options: SendOptions = {},
): Promise<T> {
  const json = body === undefined ? {} : { body: JSON.stringify(body) };
  const type: Record<string, string> = body === undefined ? {} : { 'content-type': 'application/json' };
  return send<T>(method, url, { ...json, headers: { ...type, ...conditions(options) } }, options);
}

/** Sends a form with files. The browser writes the content type itself, with the boundary. Throws as `getJson` does. */
export async function sendForm<T = unknown>(
  method: Method,
  url: string,
  form: FormData,
  options: SendOptions = {},
): Promise<T> {
  return send<T>(method, url, { body: form, headers: conditions(options) }, options);
}

async function send<T>(method: Method, url: string, init: RequestInit, { signal }: SendOptions): Promise<T> {
  return (await answer<T>(await request(url, { ...init, method, signal: signal ?? null }))).data;
}

function conditions({ ifMatch, idempotencyKey }: SendOptions): Record<string, string> {
  return {
    ...(ifMatch ? { 'if-match': ifMatch } : {}),
    ...(idempotencyKey ? { 'idempotency-key': idempotencyKey } : {}),
  };
}

async function request(url: string, init: RequestInit): Promise<Response> {
  const headers = { accept: 'application/json', ...(init.headers as Record<string, string> | undefined) };
  try {
    return await fetch(url, { credentials: 'same-origin', ...init, headers });
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw unreachable(error);
  }
}

async function answer<T>(response: Response): Promise<Versioned<T>> {
  if (!response.ok) throw await readProblem(response);
  const data = response.status === 204 ? undefined : await response.json();
  return { data: data as T, etag: response.headers.get('etag') ?? undefined };
}
