import { brotliDecompressSync, gunzipSync } from 'node:zlib';
import { describe, expect, test } from 'vitest';
import { ask } from '../server.ts';
import type { Door } from './door.ts';

/** What each answer carries beside its body: policies, caching, compression, ranges. */
export function answers(door: Door): void {
  const get = (path: string, headers: Record<string, string> = {}) => ask(door.server.port, path, { headers });
  const bearer = () => ({ authorization: `Bearer ${door.token}` });

  describe('policies', () => {
    test.each(['/signin', '/join', '/no-such-page'])('the page %s runs scripts of ours alone', async (path) => {
      const { headers } = await get(path);
      const policy = new Map(
        String(headers['content-security-policy'])
          .split(';')
          .map((part) => part.trim().split(/\s+/))
          .map(([name, ...values]) => [name!, values]),
      );
      expect(policy.get('default-src')).toEqual(["'self'"]);
      for (const name of ['script-src', 'style-src']) {
        expect(policy.get(name)).toContain("'self'");
        expect(policy.get(name)!.filter((value) => !/^'(?:self|sha256-[\w+/=]+)'$/.test(value))).toEqual([]);
      }
      const loose = [...policy].filter(([, values]) => values.some((value) => /unsafe/.test(value)));
      expect(loose).toEqual([['style-src-attr', ["'unsafe-inline'"]]]);
      expect(policy.get('frame-ancestors')).toEqual(["'none'"]);
      expect(policy.get('base-uri')).toEqual(["'none'"]);
      expect(policy.get('object-src')).toEqual(["'none'"]);
      expect(policy.get('form-action')).toEqual(["'self'"]);
      expect(headers).toMatchObject({
        'x-content-type-options': 'nosniff',
        'referrer-policy': 'same-origin',
        'x-robots-tag': 'noindex, nofollow',
        'cross-origin-opener-policy': 'same-origin',
        'cache-control': 'private, no-store',
      });
      expect(headers).not.toHaveProperty('strict-transport-security');
      expect(headers).not.toHaveProperty('x-powered-by');
    });

    test('an answer of the API, opened as a page, runs nothing', async () => {
      for (const path of ['/api/health', '/api/complexes', '/api/openapi.json', '/api/auth/csrf']) {
        const { headers } = await get(path, bearer());
        expect(headers['content-security-policy'], path).toBe("default-src 'none'; frame-ancestors 'none'; sandbox");
        expect(headers['x-content-type-options']).toBe('nosniff');
        expect(headers).not.toHaveProperty('access-control-allow-origin');
      }
    });
  });

  describe('compression', () => {
    test.each(['/signin', '/api/complexes?limit=50', '/api/openapi.json'])('%s comes whole', async (path) => {
      const who = path.startsWith('/api/') ? bearer() : {};
      const plain = await get(path, { ...who, 'accept-encoding': 'identity' });
      expect(plain.headers).not.toHaveProperty('content-encoding');
      expect(plain.status).toBe(200);
      for (const [coding, decode] of [
        ['br', brotliDecompressSync],
        ['gzip', gunzipSync],
      ] as const) {
        const packed = await get(path, { ...who, 'accept-encoding': coding });
        expect(packed.headers['content-encoding']).toBe(coding);
        expect(packed.headers.vary).toContain('Accept-Encoding');
        expect(packed.bytes.length).toBeLessThan(plain.bytes.length / 2);
        const text = decode(packed.bytes).toString();
        // The token in the sign-in form, and the name of the island around it, are others for each visitor.
        const same = (page: string) => page.replace(/[\da-f]{64}|uid="\w+"/g, '');
        expect(same(text)).toBe(same(plain.text));
      }
    });

    test('a tag goes with its coding, and comes back in a condition', async () => {
      const path = '/api/complexes?limit=50';
      const packed = await get(path, { ...bearer(), 'accept-encoding': 'br' });
      const tag = packed.headers.etag!;
      const again = await get(path, { ...bearer(), 'accept-encoding': 'br', 'if-none-match': tag });
      expect(again.status).toBe(304);
      expect(again.bytes.length).toBe(0);
    });

    test('built files are kept for good, since their names change with them', async () => {
      const page = await get('/signin');
      const files = [...new Set(page.text.match(/\/_astro\/[\w.-]+\.(?:js|css)/g))];
      expect(files.length).toBeGreaterThan(1);
      for (const file of files) {
        const { status, headers, bytes } = await get(file, { 'accept-encoding': 'br' });
        expect(status, file).toBe(200);
        expect(headers['cache-control'], file).toBe('public, max-age=31536000, immutable');
        expect(headers['x-content-type-options'], file).toBe('nosniff');
        if (headers['content-encoding']) expect(brotliDecompressSync(bytes).length).toBeGreaterThan(bytes.length);
      }
    });
  });

  test('a bundle comes in ranges, never compressed', { timeout: 60_000 }, async () => {
    const { items } = JSON.parse((await get('/api/complexes?limit=2', bearer())).text) as {
      items: { accession: string }[];
    };
    const ordered = await ask(door.server.port, '/api/bundles', {
      method: 'POST',
      headers: { ...bearer(), 'content-type': 'application/json' },
      body: JSON.stringify({ complexes: items.map(({ accession }) => accession) }),
    });
    expect(ordered.status, ordered.text).toBe(202);
    const { id } = JSON.parse(ordered.text) as { id: string };
    await expect
      .poll(async () => JSON.parse((await get(`/api/bundles/${id}`, bearer())).text).state, { timeout: 45_000 })
      .toBe('ready');
    const file = `/api/bundles/${id}/file`;
    const coded = { ...bearer(), 'accept-encoding': 'br, gzip' };
    const whole = await get(file, coded);
    expect(whole.headers).not.toHaveProperty('content-encoding');
    expect(whole.headers['accept-ranges']).toBe('bytes');
    expect(Number(whole.headers['content-length'])).toBe(whole.bytes.length);
    const part = await get(file, { ...coded, range: 'bytes=10-19' });
    expect(part.status).toBe(206);
    expect(part.headers).not.toHaveProperty('content-encoding');
    expect(part.headers['content-range']).toBe(`bytes 10-19/${whole.bytes.length}`);
    expect(part.bytes.equals(whole.bytes.subarray(10, 20))).toBe(true);
    const tail = await get(file, { ...coded, range: 'bytes=-5' });
    expect(tail.bytes.equals(whole.bytes.subarray(-5))).toBe(true);
    const beyond = await get(file, { ...coded, range: `bytes=${whole.bytes.length}-` });
    expect(beyond.status).toBe(416);
  });
}
