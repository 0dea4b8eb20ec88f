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

// 3T1 with spin–orbit coupling borrows from 1T2 among others in Td; a d–d band in Oh cannot without a vibration.
test('spin–orbit coupling in first order', () => {
  expect(selectionAnalysis({ group: 'Td', from: '1A1', to: '3T1' }).spinOrbit.allowed).toBe(true);
  expect(selectionAnalysis({ group: 'Oh', from: '1A1g', to: '3T1u' }).spinOrbit.allowed).toBe(true);
  expect(selectionAnalysis({ group: 'Oh', from: '1A1g', to: '3T1g' }).spinOrbit.allowed).toBe(false);
  expect(selectionAnalysis({ group: 'Td', from: '6A1', to: '2T2' }).spinOrbit.allowed).toBe(false);
  expect(selectionAnalysis({ group: 'Td', from: '4A2', to: '4T1' }).spinOrbit.allowed).toBeNull();
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
