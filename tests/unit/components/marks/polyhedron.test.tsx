import { renderToStaticMarkup } from 'react-dom/server';
import { expect, test } from 'vitest';
import { findGeometry } from '#src/chem/geometry/catalogue.ts';
import { drawPolyhedron } from '#src/chem/geometry/projection.ts';
import { donorColours } from '#src/components/marks/donor-colours.ts';
import { Polyhedron } from '#src/components/marks/Polyhedron.tsx';

test('donors of one kind share a pigment, other kinds have others; element symbols keep theirs', () => {
  const colours = donorColours(['A', 'B', 'A', 'C']);
  expect(colours.size).toBe(3);
  expect(new Set(colours.values()).size).toBe(3);
  expect(donorColours(['Cl', 'N']).get('N')).toBe(donorColours(['N', 'O']).get('N'));
});

test('an octahedron shows its twelve edges, eight faces, rings and lettered donors', () => {
  const drawing = drawPolyhedron(findGeometry('OC-6')!, [[0, 2]]);
  const html = renderToStaticMarkup(
    <Polyhedron drawing={drawing} sites={['N', 'Cl', 'N', 'Cl', 'Cl', 'Cl']} title="octahedron" />,
  );
  expect(html.match(/<line/g)).toHaveLength(12);
  expect(html.match(/<polygon/g)).toHaveLength(8);
  expect(html.match(/<path/g)).toHaveLength(1);
  expect(html.match(/<circle/g)).toHaveLength(7);
  expect(html.match(/>Cl<\/text>/g)).toHaveLength(4);
});

test('without letters the donors are open circles', () => {
  expect(renderToStaticMarkup(<Polyhedron drawing={drawPolyhedron(findGeometry('T-4')!)} title="t" />)).not.toContain(
    '<text',
  );
});
