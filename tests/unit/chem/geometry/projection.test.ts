import { describe, expect, test } from 'vitest';
import {
  defaultView,
  drawPolyhedron,
  enumerateIsomers,
  findGeometry,
  geometries,
  type Isomer,
  type PolyhedronDrawing,
  turned,
} from '#src/chem/geometry/index.ts';
import { determinant, dot } from '#src/chem/geometry/vector.ts';

const octahedron = findGeometry('OC-6')!;

/** What is seen, written so that two drawings can be compared: discs with their labels, and arcs. */
function seen(isomer: Isomer, { vertices, arcs, size }: PolyhedronDrawing, mirrored: boolean): string[] {
  const x = (value: number) => (mirrored ? size - value : value).toFixed(3);
  const discs = vertices.map((v) => `${isomer.sites[v.vertex]} ${x(v.x)} ${v.y.toFixed(3)} ${v.depth.toFixed(3)}`);
  const rings = arcs.map((arc) => {
    const ends = [`${x(arc.x1)} ${arc.y1.toFixed(3)}`, `${x(arc.x2)} ${arc.y2.toFixed(3)}`].sort();
    return `${ends.join(' ')} over ${x(arc.cx)} ${arc.cy.toFixed(3)}`;
  });
  return [...discs, ...rings].sort();
}

test.each([
  ['OC-6', [{ label: 'en', donors: 2, count: 3 }]],
  [
    'OC-6',
    [
      { label: 'en', donors: 2, count: 2 },
      { label: 'Cl', donors: 1, count: 2 },
    ],
  ],
  ['T-4', ['A', 'B', 'C', 'D'].map((label) => ({ label, donors: 1, count: 1 }))],
  ['SAPR-8', [{ label: 'ox', donors: 2, count: 4 }]],
])('%s: enantiomers are drawn as reflections of each other', (geometry, ligands) => {
  const { isomers } = enumerateIsomers({ geometry, ligands });
  const chiral = isomers.filter((isomer) => isomer.chiral);
  expect(chiral.length).toBeGreaterThan(0);
  for (let n = 0; n < chiral.length; n += 2) {
    const [one, other] = [chiral[n]!, chiral[n + 1]!];
    const draw = (isomer: Isomer) => drawPolyhedron(findGeometry(geometry)!, isomer.chelates);
    expect(seen(one, draw(one), true)).toEqual(seen(other, draw(other), false));
    expect(seen(one, draw(one), false)).not.toEqual(seen(other, draw(other), false));
  }
});

describe.each(geometries)('$symbol', (geometry) => {
  const drawing = drawPolyhedron(geometry, geometry.chelateEdges);

  test('is seen from a right-handed set of unit directions', () => {
    const { rotation } = defaultView(geometry);
    expect(determinant(rotation)).toBeCloseTo(1, 9);
    for (const [i, a] of rotation.entries()) {
      for (const [j, b] of rotation.entries()) expect(dot(a, b)).toBeCloseTo(Number(i === j), 9);
    }
  });

  test('has discs that stay apart, off the metal, and inside the box', () => {
    const points = [drawing.metal, ...drawing.vertices];
    for (const [n, a] of points.entries()) {
      for (const b of points.slice(n + 1)) expect(Math.hypot(a.x - b.x, a.y - b.y)).toBeGreaterThan(2 * drawing.radius);
      for (const value of [a.x, a.y]) {
        expect(value).toBeGreaterThanOrEqual(drawing.radius);
        expect(value).toBeLessThanOrEqual(drawing.size - drawing.radius);
      }
    }
    expect(drawing.radius).toBeGreaterThan(5);
  });

  test('comes back to front, with every vertex and edge', () => {
    expect(drawing.vertices.map(({ vertex }) => vertex).sort()).toEqual(geometry.vertices.map((_, i) => i));
    expect(drawing.edges).toHaveLength(geometry.edges.length);
    for (const items of [drawing.vertices, drawing.edges, drawing.faces, drawing.arcs]) {
      const depths = items.map(({ depth }) => depth);
      expect(depths).toEqual([...depths].sort((a, b) => a - b));
    }
  });

  test('has arcs that bulge away from the metal', () => {
    const { metal } = drawing;
    for (const { x1, y1, cx, cy, x2, y2 } of drawing.arcs) {
      const chord = Math.hypot((x1 + x2) / 2 - metal.x, (y1 + y2) / 2 - metal.y);
      const bulge = Math.hypot(cx - metal.x, cy - metal.y);
      expect(bulge).toBeGreaterThanOrEqual(chord - 0.5);
    }
  });
});

test('the octahedron stands upright with its square seen from above', () => {
  const { vertices, metal, faces } = drawPolyhedron(octahedron);
  const at = (vertex: number) => vertices.find((v) => v.vertex === vertex)!;
  expect(at(0).x).toBeCloseTo(metal.x, 9);
  expect(at(0).y).toBeLessThan(metal.y);
  expect(at(1).y).toBeGreaterThan(metal.y);
  const nearer = vertices.filter(({ depth, vertex }) => depth > 0 && vertex > 1);
  expect(nearer).toHaveLength(2);
  for (const { y, enlargement } of nearer) {
    expect(y).toBeGreaterThan(metal.y);
    expect(enlargement).toBeGreaterThan(1);
  }
  expect(faces).toHaveLength(8);
});

test('a whole turn of the view changes nothing, half a turn swaps left and right', () => {
  const view = defaultView(octahedron);
  const once = turned(view, 360, 360).rotation.flat();
  for (const [k, x] of once.entries()) expect(x).toBeCloseTo(view.rotation.flat()[k]!, 9);
  expect(turned(view, 180, 0).rotation[0][0]).toBeCloseTo(-view.rotation[0][0], 9);
});

test('the box scales the drawing', () => {
  const [small, large] = [drawPolyhedron(octahedron, [[0, 2]]), drawPolyhedron(octahedron, [[0, 2]], { size: 208 })];
  expect(large.arcs[0]!.cx).toBeCloseTo(2 * small.arcs[0]!.cx, 9);
  expect(large.radius).toBeCloseTo(2 * small.radius, 9);
});
