import { renderToStaticMarkup } from 'react-dom/server';
import { expect, test } from 'vitest';
import { Formula, PointGroup, Quantity } from '#src/components/notation/index.tsx';
import { placeRuns } from '#src/components/notation/place-runs.ts';
import { SvgRuns } from '#src/components/notation/SvgRuns.tsx';
import { parseTransition } from '#src/components/notation/term.ts';

test('a formula is plain characters in real sub and sup elements', () => {
  const html = renderToStaticMarkup(<Formula formula="[Cr(ox)3]3-" />);
  expect(html).toContain('[Cr(ox)<sub>3</sub>]<sup>3−</sup>');
  expect(html).toContain('aria-label="[Cr(ox)3] 3 minus"');
  expect(html.replace(/<[^>]+>/g, '')).toBe('[Cr(ox)3]3−');
});

test('a point group is italic with an upright subscript', () => {
  expect(renderToStaticMarkup(<PointGroup group="Cinfv" />)).toContain('<i>C</i><sub>∞v</sub>');
});

test('a quantity says its unit in words', () => {
  expect(renderToStaticMarkup(<Quantity value={464} unit="nm" />)).toContain('aria-label="464 nanometres"');
});

test('in SVG every run of normal size is back on the baseline', () => {
  const { placed, rest } = placeRuns(parseTransition('4A2g', '4T2g'));
  let pen = 0;
  for (const { dy, size } of placed) {
    pen += dy * size;
    if (size === 1) expect(pen).toBeCloseTo(0, 2);
    else expect(Math.abs(pen)).toBeGreaterThan(0.2);
  }
  expect(pen + rest).toBeCloseTo(0, 2);
});

test('SVG text keeps its characters, and adds one of no width only where it must lead back', () => {
  const text = (restore: boolean) =>
    renderToStaticMarkup(<SvgRuns runs={parseTransition('2T2g', '2Eg')} restore={restore} />).replace(/<[^>]+>/g, '');
  expect(text(false)).toBe('2T2g → 2Eg');
  expect(text(true)).toBe('2T2g → 2Eg\u200b');
});
