import { renderToStaticMarkup } from 'react-dom/server';
import { expect, test } from 'vitest';
import { diagram } from '#src/chem/ligand-field/index.ts';
import { clipCurve, roundUp, ticksOf } from '#src/components/ligand-field/drawing/clip-curve.ts';
import { LevelDiagram } from '#src/components/ligand-field/drawing/LevelDiagram.tsx';
import { layOut, termWidth } from '#src/components/ligand-field/drawing/lay-out.ts';
import { svgFile } from '#src/components/ligand-field/drawing/svg-file.ts';

const drawn = (n: number, spin: string) =>
  diagram({ n, geometry: 'OC-6', ratioCB: 4.5, points: 41 }).curves.map(({ label, y }) => ({
    label,
    y,
    x: Array.from({ length: 41 }, (_, i) => i),
    strong: label.startsWith(spin),
  }));

test('the diagram of d³ in an octahedron, as a file of its own', async () => {
  const markup = renderToStaticMarkup(
    <LevelDiagram
      title="d3"
      width={640}
      height={440}
      window={{ x: [0, 40], y: [0, 70] }}
      curves={drawn(3, '4')}
      at={32.8}
      marks={[
        { key: 'a', y: 32.8, filled: true, title: '21 550' },
        { key: 'b', y: 43.4, filled: false, title: '28 500' },
      ]}
      xLabel={[{ text: 'Δ', style: 'italic' }]}
      yLabel={[{ text: 'E', style: 'italic' }]}
    />,
  );
  const file = svgFile(markup);
  expect(file).not.toMatch(/var\(| class=| style=/);
  await expect(file).toMatchFileSnapshot('d3-octahedral.svg');
});

test('a token that has no value on paper is no silent gap', () => {
  expect(() => svgFile('<svg fill="var(--color-unheard)"/>')).toThrow('--color-unheard');
});

test.each([2, 3, 4, 5, 6, 7, 8])('labels of d%i do not lie on each other', (n) => {
  const plot = { x: 52, y: 28, width: 500, height: 370 };
  const { labels } = layOut(drawn(n, String(n)), { x: [0, 40], y: [0, 70] }, plot);
  const boxes = labels.map(({ label, x, y, anchor }) => {
    const width = termWidth(label);
    const left = anchor === 'middle' ? x - width / 2 : x;
    return { left, right: left + width, top: y - 11, bottom: y + 3 };
  });
  expect(boxes.length).toBeGreaterThan(3);
  for (const [i, a] of boxes.entries())
    for (const b of boxes.slice(i + 1))
      expect(a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom).toBe(false);
});

test('a curve is cut where it leaves the window, and comes back', () => {
  const { stretches, end } = clipCurve([0, 1, 2, 3], [0, 20, 20, 0], { x: [0, 3], y: [0, 10] });
  expect(stretches).toEqual([
    [
      [0, 0],
      [0.5, 10],
    ],
    [
      [2.5, 10],
      [3, 0],
    ],
  ]);
  expect(end).toEqual({ x: 3, y: 0, side: 'right' });
  expect(clipCurve([0, 1], [20, 30], { x: [0, 1], y: [0, 10] })).toEqual({ stretches: [], end: null });
});

test('ticks and ends of axes are round', () => {
  expect(ticksOf([0, 40], 8)).toEqual([0, 5, 10, 15, 20, 25, 30, 35, 40]);
  expect(ticksOf([-25, 27], 5)).toEqual([-20, 0, 20]);
  expect([roundUp(41), roundUp(7.2), roundUp(130)]).toEqual([50, 8, 150]);
});
