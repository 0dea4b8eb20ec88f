import { renderToStaticMarkup } from 'react-dom/server';
import { expect, test } from 'vitest';
import { BandStrip } from '#src/components/marks/BandStrip.tsx';
import { BAND_STYLES, bandStyle } from '#src/components/marks/band-classes.ts';
import { placeOnStrip, STRIP_VISIBLE, tickHeight } from '#src/components/marks/band-strip.ts';
import { Cuvette } from '#src/components/marks/Cuvette.tsx';
import { DBlock } from '#src/components/marks/DBlock.tsx';
import { visibleRule } from '#src/components/marks/visible-light.ts';

test('classes that mean different things differ in letter, pigment and stroke, all three', () => {
  const groups = Object.values(BAND_STYLES).filter(
    ({ letter }, i, all) => all.findIndex((s) => s.letter === letter) === i,
  );
  expect(groups.map(({ letter }) => letter).sort()).toEqual(['L', 'M', 'd', 'i', 'o', 'v', 'x', '–'].sort());
  expect(new Set(groups.map(({ colour }) => colour)).size).toBe(groups.length);
  expect(new Set(groups.map(({ stroke }) => JSON.stringify(stroke))).size).toBe(groups.length);
});

test('a class that nobody knows is shown as unassigned', () => {
  expect(bandStyle('no such class')).toBe(BAND_STYLES.unassigned);
  expect(bandStyle(null)).toBe(BAND_STYLES.unassigned);
});

test('the strip runs from 50 000 at the left to 4 000 cm⁻¹ at the right', () => {
  expect(placeOnStrip(50_000)).toBe(0);
  expect(placeOnStrip(27_000)).toBe(0.5);
  expect(placeOnStrip(4_000)).toBe(1);
});

test('height follows log ε from −2 to 5, keeps a least height, and stays inside', () => {
  expect(tickHeight(1e5)).toBe(28);
  expect(tickHeight(1e9)).toBe(28);
  expect(tickHeight(0.01)).toBe(4);
  expect(tickHeight(0)).toBe(4);
  expect(tickHeight(1000) - tickHeight(100)).toBeCloseTo(tickHeight(100) - tickHeight(10), 10);
  expect(tickHeight(null)).toBeGreaterThan(4);
});

test('visible light lies from 750 to 380 nm, 13 333 to 26 316 cm⁻¹, violet to the left on a falling wavenumber axis', () => {
  expect(STRIP_VISIBLE?.start).toBeCloseTo((50_000 - 26_315.8) / 46_000, 4);
  expect((STRIP_VISIBLE?.start ?? 0) + (STRIP_VISIBLE?.width ?? 0)).toBeCloseTo((50_000 - 13_333.3) / 46_000, 4);
  expect(STRIP_VISIBLE?.gradient).toMatch(/^linear-gradient\(to right, #5b2a9d 0\.0%/);
  const rising = visibleRule((nm) => (1e7 / nm - 10_000) / 20_000);
  expect(rising?.gradient).toMatch(/^linear-gradient\(to right, #8c1a1a 0\.0%/);
});

test('an axis without visible light has no rule, and one that cuts it keeps to its ends', () => {
  expect(visibleRule((nm) => (nm - 800) / 200)).toBeNull();
  expect(visibleRule((nm) => (nm - 500) / 100)).toMatchObject({ start: 0, width: 1 });
});

test('a strip says its bands in words', () => {
  const bands = [{ wavenumber: 17_500, epsilon: 75, class: 'd-d' }];
  expect(renderToStaticMarkup(<BandStrip bands={bands} />)).toContain('d–d 17\u202f500 cm⁻¹, ε 75');
  expect(renderToStaticMarkup(<BandStrip bands={[]} />)).toContain('no bands');
});

test('a cuvette without a colour is hatched, not white', () => {
  expect(renderToStaticMarkup(<Cuvette colour={null} title="no spectrum" />)).toContain('<path');
  expect(renderToStaticMarkup(<Cuvette colour="#e9a13b" title="x" />)).toContain('fill="#e9a13b"');
});

test('the d block has thirty cells; a chosen one says so', () => {
  const html = renderToStaticMarkup(<DBlock counts={{ Co: 2 }} chosen={['Co']} onToggle={() => {}} />);
  expect(html.match(/<button/g)).toHaveLength(30);
  expect(html).toMatch(/aria-pressed="true"[^>]*aria-label="Co, 2 complexes"/);
});
