import { afterAll, beforeAll, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { person } from './people.ts';

let token: string;
let close: () => Promise<void>;
beforeAll(async () => {
  ({ close } = await openRegistry());
  ({ token } = await person('a guest'));
});
afterAll(() => close());

const x = Array.from({ length: 181 }, (_, i) => 12_000 + 100 * i);
const gaussian = (at: number, height: number, fwhm: number) => (v: number) =>
  height * Math.exp(-4 * Math.LN2 * ((v - at) / fwhm) ** 2);

test('two bands are found in a curve, with a residual that keeps order and gaps', async () => {
  const [first, second] = [gaussian(17_400, 13, 2500), gaussian(24_600, 15, 3000)];
  const y: (number | null)[] = x.map((v) => first(v) + second(v));
  y[3] = null;
  const fit = await json<{ bands: { wavenumber: number; errors: object }[]; residual: (number | null)[] }>(
    call('POST', '/api/derive/bands', { as: token, json: { x, y } }),
  );
  expect(fit.bands.map(({ wavenumber }) => Math.round(wavenumber))).toEqual([17_400, 24_600]);
  expect(fit.residual).toHaveLength(x.length);
  expect(fit.residual[3]).toBeNull();
  expect(Object.keys(fit.bands[0]!.errors)).toContain('oscillatorStrength');
});

test('series of different length, and too few points, are refused with their place', async () => {
  const refused = async (body: object) => {
    const { errors } = await json<{ errors: { pointer: string }[] }>(
      call('POST', '/api/derive/bands', { as: token, json: body }),
      422,
    );
    return errors[0]!.pointer;
  };
  expect(await refused({ x, y: [1, 2] })).toBe('#/y');
  expect(await refused({ x: x.slice(0, 8), y: [1, 2, null, null, null, null, null, null] })).toBe('#/x');
});
