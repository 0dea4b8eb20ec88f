import { expect, test } from 'vitest';
import { drawMode } from '#src/components/symmetry/mode-drawing.ts';
import { readAtoms } from '#src/components/symmetry/read-atoms.ts';
import { displacementText, modeKey, motionWord, shownVibrations } from '#src/components/symmetry/shown-vibrations.ts';

const at = (atoms: string, tolerance = 0.1) => shownVibrations({ geometry: 'OC-6', donors: [], atoms, tolerance });

test('atoms are read a line or a slash each, from an XYZ file too, and labels count as elements', () => {
  const three = [
    { element: 'Co', x: 0, y: 0, z: 0 },
    { element: 'N', x: 1.96, y: 0, z: 0 },
    { element: 'Cl', x: 0, y: -2.28, z: 0.5 },
  ];
  expect(readAtoms('Co 0 0 0 / N 1.96 0 0 / Cl 0 -2.28 .5').atoms).toEqual(three);
  expect(readAtoms('3\ntitle with 1 2 3\nCo1\t0\t0\t0\r\nN1 1.96 0 0\nCL 0, -2.28, 5e-1\n').atoms).toEqual(three);
});

test.each([
  ['', 'There are no atoms yet'],
  ['Co 0 0 0\nQq 1 0 0', 'Line 2, “Qq 1 0 0”: “Qq” is no element'],
  ['Co 0 0', 'Line 1, “Co 0 0”: three numbers'],
  ['Co 0 0 x', 'three numbers'],
])('“%s” is refused with its line', (text, words) => {
  expect(readAtoms(text).error).toContain(words);
});

test('an octahedron: six irreps of vibrations, each with its activity', () => {
  const { shown } = at('');
  expect(shown!.vibrations).toEqual(
    expect.arrayContaining([
      { irrep: 'T1u', count: 2, infrared: true, raman: false },
      { irrep: 'T2u', count: 1, infrared: false, raman: false },
    ]),
  );
  expect(shown!.labels).toEqual(['M', 'A1', 'A2', 'A3', 'A4', 'A5', 'A6']);
});

test('donors of another letter lower the group', () => {
  const { shown } = shownVibrations({ geometry: 'SP-4', donors: ['N', 'N', 'Cl', 'Cl'], atoms: '', tolerance: 0.1 });
  expect(['C2v', 'D2h']).toContain(shown!.placed.group);
});

test('distorted coordinates have the group that lies within the tolerance, and a lower one below it', () => {
  const text = 'Co 0 0 0/N 2.0 0 0/N -2.0 0 0/N 0 2.0 0/N 0 -2.0 0/N 0 0 2.15/N 0 0 -2.15';
  expect(at(text, 0.2).shown!.placed.group).toBe('Oh');
  expect(at(text, 0.02).shown!.placed.group).toBe('D4h');
  expect(at(text).shown!.notes[0]).toContain('Within 0.1 Å');
});

test('what cannot be judged is told in words', () => {
  expect(at('Co 0 0 0').error).toContain('give two or more');
  expect(shownVibrations({ geometry: 'XX-3', donors: [], atoms: '', tolerance: 0.1 }).error).toContain('XX-3');
});

test('a line of atoms has its modes, too', () => {
  const { shown } = at('O 0 0 -1.16/C 0 0 0/O 0 0 1.16');
  expect(shown!.placed.group).toBe('Dinfh');
  expect(shown!.modes.map(modeKey)).toEqual(['Sigma_g+.0.0', 'Sigma_u+.0.0', 'Pi_u.0.0', 'Pi_u.0.1']);
});

test('a vibration is told in words and drawn: arrows for what moves, atoms displaced by the phase', () => {
  const { shown } = at('');
  const mode = shown!.modes.find(({ irrep }) => irrep === 'A1g')!;
  expect(displacementText(mode, shown!)).toContain('A1 +0.41 z');
  expect(displacementText(mode, shown!)).not.toContain('M ');
  expect(motionWord({ stretch: 0.95 })).toBe('stretch');
  expect(motionWord({ stretch: 0.02 })).toBe('bend');
  const options = { size: 300, turn: 28, tilt: 18 };
  const rest = drawMode(shown!.placed, mode, { ...options, phase: 0 });
  const out = drawMode(shown!.placed, mode, { ...options, phase: 1 });
  expect(rest.arrows.map(({ index }) => index)).toEqual([1, 2, 3, 4, 5, 6]);
  const far = (drawing: typeof rest) => Math.max(...drawing.atoms.map(({ x, y }) => Math.hypot(x - 150, y - 150)));
  expect(far(out)).toBeGreaterThan(far(rest) * 1.1);
  expect(far(out) + 13).toBeLessThan(150 * Math.SQRT2);
});
