import { describe, expect, test } from 'vitest';
import { finiteSymbols } from '#src/chem/symmetry/generators.ts';
import { findGroup, selectionAnalysis } from '#src/chem/symmetry/index.ts';

describe.each([...finiteSymbols, 'Cinfv', 'Dinfh'])('%s', (group) => {
  const { irreps, centrosymmetric } = findGroup(group)!;
  const symmetric = irreps[0]!.label;

  test('out of the totally symmetric term, the allowed dipoles are the functions of the other', () => {
    for (const { label, functions } of irreps) {
      const found = selectionAnalysis({ group, from: `1${symmetric}`, to: `1${label}`, vibrations: [] });
      for (const d of ['x', 'y', 'z'] as const) {
        expect(found.dipole[d]).toBe(functions.includes(d));
        expect(found.magneticDipole[d]).toBe(functions.includes(`R${d}`));
        expect(found.vibronic[d]).toEqual([]);
      }
      expect(found.laporteAllowed === null).toBe(!centrosymmetric);
      if (found.laporteAllowed === false) expect(Object.values(found.dipole)).not.toContain(true);
      expect(found.steps[0]).toContain(group);
    }
  });
});

// Td d–d bands: F. A. Cotton, Chemical Applications of Group Theory, 3rd ed., 1990; from memory.
describe('tetrahedral d7', () => {
  test('a symmetry-forbidden band is not called Laporte-forbidden', () => {
    const found = selectionAnalysis({ group: 'Td', from: '4A2', to: '4T2' });
    expect(found.laporteAllowed).toBeNull();
    expect(found.dipole).toEqual({ x: false, y: false, z: false });
    expect(found.mechanism).toBe('vibronic');
    expect(found.steps.join(' ')).not.toMatch(/Laporte-forbidden/);
  });

  test('4A2 to 4T1 is allowed', () => {
    expect(selectionAnalysis({ group: 'Td', from: '4A2', to: '4T1' }).mechanism).toBe('allowed');
  });
});

test('each mechanism has its case', () => {
  const mechanism = (group: string, from: string, to: string): string =>
    selectionAnalysis({ group, from, to }).mechanism;
  expect(mechanism('Oh', '2T2g', '2Eg')).toBe('vibronic');
  expect(mechanism('Oh', '1A1g', '1T1u')).toBe('allowed');
  expect(mechanism('Oh', '4A2g', '2Eg')).toBe('spin-forbidden-vibronic');
  expect(mechanism('D3', '1A1', '3E')).toBe('spin-forbidden');
  expect(mechanism('D3', '1A1', '1A1')).toBe('forbidden');
  expect(mechanism('Dinfh', '1Sigma_g+', '1Sigma_u+')).toBe('allowed');
});

test('the plain skeleton of the group is used unless vibrations are given', () => {
  const request = { group: 'Oh', from: '2T2g', to: '2Eg' };
  expect(selectionAnalysis(request).vibronic.x).toEqual(['T1u', 'T2u']);
  expect(selectionAnalysis({ ...request, vibrations: [{ irrep: 'T1u', count: 2 }] }).vibronic.x).toEqual(['T1u']);
  expect(selectionAnalysis({ ...request, vibrations: [{ irrep: 'T1u', count: 0 }] }).mechanism).toBe('forbidden');
});

// F. A. Cotton, Chemical Applications of Group Theory, 3rd ed., 1990, §9.6: trans-[CoCl2(en)2]+ in D4h; from memory.
test('modes of the actual skeleton: with axial ligands an A2u mode lends what the square plane lends as well', () => {
  const request = { group: 'D4h', from: '1A1g', to: '1Eg' };
  const skeleton = { geometry: 'OC-6', sites: [...'XXNNNN'] };
  const found = selectionAnalysis({ ...request, skeleton });
  expect(found.vibronic).toEqual({ x: ['A2u', 'B2u'], y: ['A2u', 'B2u'], z: ['Eu'] });
  expect(found.steps.join(' ')).toContain('skeleton OC-6 (X X N N N N)');
  expect(() => selectionAnalysis({ ...request, skeleton: { ...skeleton, sites: [...'NNNNNN'] } })).toThrowError(
    expect.objectContaining({ code: 'out-of-range', field: 'skeleton' }),
  );
});

// G. F. Koster et al., Properties of the Thirty-Two Point Groups, 1963; J. S. Griffith, The Theory of
// Transition-Metal Ions, 1961; from memory.
describe('spin–orbit mixing through the double group', () => {
  const mixing = (group: string, from: string, to: string) => selectionAnalysis({ group, from, to }).spinOrbit;

  test('what it opens, and what it leaves closed', () => {
    expect(mixing('Td', '1A1', '3T1').allowed).toBe(true);
    expect(mixing('Oh', '1A1g', '3T1u').allowed).toBe(true);
    expect(mixing('Oh', '1A1g', '3T1g').allowed).toBe(false);
    expect(mixing('Td', '4A2', '4T1').allowed).toBeNull();
    expect(mixing('Td', '4A2', '3T1').allowed).toBe(false);
    expect(mixing('Dinfh', '1Sigma_g+', '3Pi_u').allowed).toBe(true);
    expect(mixing('Dinfh', '1Sigma_g+', '3Pi_g').allowed).toBe(false);
  });

  test('ruby’s 4A2g to 2Eg: Γ8 to Γ8, closed in Oh without a vibration, open across the axis in D3', () => {
    const inOh = mixing('Oh', '4A2g', '2Eg');
    expect(inOh.components).toEqual({ from: 'Γ8+', to: 'Γ8+' });
    expect(inOh.vibronic).toEqual({ x: ['T1u', 'T2u'], y: ['T1u', 'T2u'], z: ['T1u', 'T2u'] });
    const inD3 = mixing('D3', '4A2', '2E');
    expect(inD3.components).toEqual({ from: 'Γ4 + (Γ5,Γ6)', to: 'Γ4 + (Γ5,Γ6)' });
    expect(inD3.dipole).toEqual({ x: true, y: true, z: true });
  });

  test('spins that differ by two are joined in second order', () => {
    expect(mixing('Td', '6A1', '4T1')).toMatchObject({ allowed: true, order: 1 });
    expect(mixing('Td', '6A1', '2T2')).toMatchObject({ allowed: true, order: 2 });
  });

  // 1A1 to 3A2 in C2v: the spin functions of a triplet are A2, B1, B2, so the components are A1, B1, B2.
  test('a singlet and a triplet in C2v', () => {
    expect(mixing('C2v', '1A1', '3A2').dipole).toEqual({ x: true, y: true, z: true });
    expect(mixing('C2v', '1A1', '3A1').dipole).toEqual({ x: true, y: true, z: false });
  });
});

describe('expected order of ε, by common practice (Lever 1984; Figgis and Hitchman 2000)', () => {
  test.each([
    ['[Ti(H2O)6]3+, ε 5', 'Oh', '2T2g', '2Eg', 5],
    ['[Mn(H2O)6]2+, ε 0.03', 'Oh', '6A1g', '4T1g', 0.03],
    ['[CoCl4]2-, ε 600', 'Td', '4A2', '4T1', 600],
    ['[MnO4]-, ε 2400, which no d–d range may exclude', 'Oh', '1A1g', '1T1u', 2400],
    ['[Co(en)3]3+, ε 85', 'D3', '1A1', '1E', 85],
    ['[MnBr4]2-, ε 2', 'Td', '6A1', '4T1', 2],
  ])('%s', (_, group, from, to, epsilon) => {
    const { expectedEpsilon } = selectionAnalysis({ group, from, to });
    expect(epsilon).toBeGreaterThanOrEqual(expectedEpsilon.from);
    expect(epsilon).toBeLessThanOrEqual(expectedEpsilon.to);
  });
});

describe('what a lower group would allow', () => {
  test('T2g to Eg: open in O and Td, closed wherever the centre stays', () => {
    const { lowerGroups } = selectionAnalysis({ group: 'Oh', from: '2T2g', to: '2Eg' });
    const of = (symbol: string) => lowerGroups.find(({ group }) => group === symbol);
    expect(of('Td')).toMatchObject({ from: ['2T2'], to: ['2E'], dipole: { x: true, y: true, z: true } });
    expect(of('D3')).toMatchObject({ from: ['2A1', '2E'], to: ['2E'], dipole: { x: true, y: true, z: true } });
    for (const { group } of lowerGroups) expect(findGroup(group)!.centrosymmetric).toBe(false);
  });

  test('4A2 to 4T2 of a tetrahedron: open along x and y when it is squashed to D2d', () => {
    const { lowerGroups } = selectionAnalysis({ group: 'Td', from: '4A2', to: '4T2' });
    expect(lowerGroups.find(({ group }) => group === 'D2d')?.dipole).toEqual({ x: true, y: true, z: false });
  });

  test('nothing is said where all is open already', () => {
    expect(selectionAnalysis({ group: 'Td', from: '4A2', to: '4T1' }).lowerGroups).toEqual([]);
  });
});

test('steps are numbered and name the group', () => {
  const { steps } = selectionAnalysis({ group: 'D4h', from: '1A1g', to: '1A2g' });
  steps.forEach((step, i) => {
    expect(step.startsWith(`${i + 1}. `)).toBe(true);
  });
  expect(steps.filter((step) => step.includes('D4h')).length).toBeGreaterThan(4);
});

test('refusals name the field', () => {
  const refused = (request: Parameters<typeof selectionAnalysis>[0], field: string) =>
    expect(() => selectionAnalysis(request)).toThrowError(expect.objectContaining({ name: 'DomainError', field }));
  refused({ group: 'Oh5', from: '1A1g', to: '1T1u' }, 'group');
  refused({ group: 'Oh', from: 'A1g', to: '1T1u' }, 'from');
  refused({ group: 'Oh', from: '1A1g', to: '1T1' }, 'to');
  refused({ group: 'Oh', from: '1A1g', to: '1T1u', vibrations: [{ irrep: 'B9', count: 1 }] }, 'vibrations');
});
