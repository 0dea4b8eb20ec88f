import { afterEach, expect, test, vi } from 'vitest';
import { getJson, getVersioned, ProblemError, sendForm, sendJson } from '#src/components/ui/http.ts';
import { readPointer } from '#src/components/ui/Problem.tsx';

afterEach(() => vi.unstubAllGlobals());

/** Answers every request with one response and keeps what was asked. */
function answerWith(make: () => Response) {
  const asked = vi.fn(async (_url: string, _init: RequestInit) => make());
  vi.stubGlobal('fetch', asked);
  return asked;
}

const json = (body: unknown, init: ResponseInit = {}, type = 'application/json') =>
  new Response(JSON.stringify(body), { ...init, headers: { 'content-type': type, ...init.headers } });

test('a record comes with the version a later change must name', async () => {
  answerWith(() => json({ accession: 'ZF000042-X' }, { headers: { etag: '"v1"' } }));
  expect(await getVersioned('/api/x')).toEqual({ data: { accession: 'ZF000042-X' }, etag: '"v1"' });
});

test('a change carries its body, the version it is based on and its key', async () => {
  const asked = answerWith(() => new Response(null, { status: 204 }));
  expect(await sendJson('PATCH', '/api/x', { notes: 'n' }, { ifMatch: '"v1"', idempotencyKey: 'k' })).toBeUndefined();
  expect(asked.mock.calls[0]?.[1]).toMatchObject({
    method: 'PATCH',
    body: '{"notes":"n"}',
    headers: { 'content-type': 'application/json', 'if-match': '"v1"', 'idempotency-key': 'k' },
  });
});

test('a form goes without a content type of ours, so that the browser can name the boundary', async () => {
  const asked = answerWith(() => json({ id: 's1' }, { status: 201 }));
  expect(await sendForm('POST', '/api/spectra', new FormData())).toEqual({ id: 's1' });
  expect(asked.mock.calls[0]?.[1].headers).not.toHaveProperty('content-type');
});

test('problem details arrive whole (RFC 9457)', async () => {
  const errors = [{ pointer: '#/formula', detail: 'a bracket is not closed', position: 4 }];
  answerWith(() =>
    json(
      { title: 'Unprocessable', status: 422, detail: 'see errors', errors },
      { status: 422 },
      'application/problem+json',
    ),
  );
  const problem = await getJson('/api/x').catch((error: unknown) => error as ProblemError);
  expect(problem).toBeInstanceOf(ProblemError);
  expect(problem).toMatchObject({ status: 422, title: 'Unprocessable', detail: 'see errors', errors });
  expect((problem as ProblemError).about('formula')).toBe('a bracket is not closed');
  expect((problem as ProblemError).about('form')).toBeUndefined();
});

test('an answer that is no problem document still says something', async () => {
  answerWith(() => new Response('<html>', { status: 503, headers: { 'content-type': 'text/html' } }));
  await expect(getJson('/api/x')).rejects.toMatchObject({ status: 503, title: 'The service is busy or away' });
});

test('a server that cannot be reached is status 0; an abort stays an abort', async () => {
  vi.stubGlobal('fetch', () => Promise.reject(new TypeError('failed to fetch')));
  await expect(getJson('/api/x')).rejects.toMatchObject({ status: 0, title: 'The server cannot be reached' });
  vi.stubGlobal('fetch', () => Promise.reject(new DOMException('stopped', 'AbortError')));
  await expect(getJson('/api/x')).rejects.toMatchObject({ name: 'AbortError' });
});

test('a pointer is read as words, its indices from one', () => {
  expect(readPointer('#/bands/0/height')).toBe('bands 1, height');
  expect(readPointer('#/formula')).toBe('formula');
});
