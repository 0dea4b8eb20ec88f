import { expect, test } from 'vitest';
import { findGroup, selectionAnalysis } from '#src/chem/symmetry/index.ts';
import { argumentLines } from '#src/components/symmetry/argument.ts';
import { epsilonLine, usualOf } from '#src/components/symmetry/epsilon-line.ts';
import { plainText } from '#src/components/symmetry/pieces.ts';
import { prosePieces } from '#src/components/symmetry/prose-pieces.ts';
import { viewVibrations } from '#src/components/symmetry/view-vibrations.ts';

const octahedron = { geometry: 'OC-6', sites: Array.from({ length: 6 }, () => 'N'), chelates: null };

function lines(group: string, from: string, to: string, skeleton: Parameters<typeof viewVibrations>[1] | null = null) {
  const vibrations = skeleton && viewVibrations({ kind: 'donorSet', group }, skeleton);
  const analysis = selectionAnalysis({ group, from, to, ...(vibrations ? { vibrations } : {}) });
  const symmetric = findGroup(group)!.irreps[0]!.label;
  return argumentLines({ analysis, from, to, vibrations, symmetric }).map(
    ({ topic, verdict, pieces }) => `${topic}${verdict ? ` (${verdict})` : ''}: ${plainText(pieces)}`,
  );
}

// T1u and T2u lend the quartet bands of Cr(III) intensity: B. N. Figgis, M. A. Hitchman, Ligand Field Theory and Its
// Applications, 2000 (from memory).
test('a spin-allowed d–d band of an octahedron: Laporte-forbidden, vibronic by T1u and T2u', () => {
  expect(lines('Oh', '4A2g', '4T2g', octahedron)).toEqual([
    'Spin (allowed): quartet to quartet, allowed.',
    'Laporte (forbidden): g to g in Oh, which has a centre of inversion: forbidden.',
    'Product: in Oh, Γ = A2g ⊗ T2g = T1g.',
    'Dipole (forbidden): along x, y and z it is T1u in Oh: A2g ⊗ T1u ⊗ T2g holds no A1g, forbidden.',
    'Vibrations: of metal and donors in Oh: A1g + Eg + T2g + 2T1u + T2u.',
    'Vibronic (lent): T1u and T2u lend intensity along x, y and z.',
    'Spin–orbit: not needed, as the spin does not change.',
    'Lower group (lent): a fall from Oh to O, T, D4, C4v or 10 others opens a polarisation: in O, x, y and z are allowed (4A2 to 4T2).',
  ]);
});

test('without a centre the Laporte rule has no meaning, and each polarisation has its step', () => {
  const said = lines('D3', '1A1', '1E');
  expect(said).toContain('Laporte: D3 has no centre of inversion, so the rule has no meaning here.');
  expect(said).toContain('Dipole (allowed): along x and y it is E in D3: A1 ⊗ E ⊗ E holds A1, allowed.');
  expect(said).toContain('Dipole (forbidden): along z it is A2 in D3: A1 ⊗ A2 ⊗ E holds no A1, forbidden.');
  expect(said).toContain('Vibrations: no skeleton is known for D3, so that vibrations are not judged.');
});

test('a spin-forbidden band names the double group and what the terms become', () => {
  const said = lines('Oh', '4A2g', '2Eg', octahedron);
  expect(said[0]).toBe('Spin (forbidden): quartet to doublet, forbidden.');
  const coupling = said.find((line) => line.startsWith('Spin–orbit'))!;
  expect(coupling).toContain('in the double group of Oh the terms become Γ8+ and Γ8+;');
  expect(coupling).toContain('with a quantum of');
});

test('where a polarisation is open, a lower group counts only when it opens more', () => {
  const said = lines('C4v', '1A1', '1A1');
  expect(said.at(-1)).toMatch(/^Lower group/);
  expect(said.at(-1)).not.toContain('every polarisation is open');
  expect(lines('C1', '1A', '1A').at(-1)).toBe('Lower group: every polarisation is open in C1 already.');
});

test('vibrations of a view: of the framework, of the donors, and carried down to a group chosen', () => {
  const chelates = [
    [0, 2],
    [1, 4],
    [3, 5],
  ] as const;
  const en = { ...octahedron, chelates };
  const count = (terms: readonly { count: number }[] | null) => terms!.reduce((sum, term) => sum + term.count, 0);
  expect(count(viewVibrations({ kind: 'donorSet', group: 'Oh' }, en))).toBe(6);
  expect(viewVibrations({ kind: 'effective', group: 'D4h' }, octahedron)).toEqual(
    expect.arrayContaining([
      { irrep: 'A1g', count: 2 },
      { irrep: 'Eu', count: 3 },
    ]),
  );
  expect(viewVibrations({ kind: 'framework', group: 'C1' }, { ...octahedron, geometry: null })).toBeNull();
});

const dd = { bandClass: 'd-d' as const, spinAllowed: true, element: 'Cr', geometry: 'OC-6', centrosymmetric: true };
const said = (epsilon: number | null | undefined, facts = dd) => plainText(epsilonLine(epsilon, usualOf(facts)).pieces);

test('the measured ε against the usual range of its class', () => {
  expect(said(40)).toBe('ε of 40 lies in the usual range of its class, 1 to 100 dm3 mol-1 cm-1.');
  expect(said(200)).toContain('a little above');
  expect(said(5000)).toContain('far above');
  expect(said(0.01)).toContain('far below');
  expect(said(null)).toContain('no ε is measured');
  expect(said(undefined)).toContain('the usual range of ε of such a band is 1 to 100');
  expect(plainText(epsilonLine(9, usualOf({ ...dd, bandClass: 'LMCT' as never })).pieces)).toContain('far below');
  expect(usualOf({ ...dd, bandClass: 'intraligand' as never })).toBeNull();
});

test('d-counts, axes and mirrors within a sentence are told apart from other words', () => {
  expect(prosePieces('A d0 centre; x a C2′, xz a σv; OC-6, SPY-5')).toEqual([
    'A ',
    { count: 0 },
    ' centre; ',
    { direction: 'x' },
    ' a ',
    { operation: "C2'" },
    ', ',
    { direction: 'xz' },
    ' a ',
    { operation: 'sigma_v' },
    '; OC-6, SPY-5',
  ]);
});
