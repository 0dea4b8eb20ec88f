import { expect, test } from 'vitest';
import { isUnder, navigationFor } from '#src/layouts/navigation.ts';

const labels = (role: string | undefined) => navigationFor(role).map(({ label }) => label);

test('a guest is led to complexes, symmetry, levels and folios only, nobody nowhere', () => {
  expect(labels('guest')).toEqual(['Complexes', 'Symmetry', 'Levels', 'Folios']);
  expect(labels('contributor')).toHaveLength(8);
  expect(labels('lead')).toEqual(labels('contributor'));
  expect(labels('steward')).toEqual([...labels('lead'), 'People', 'Trail']);
  expect(labels(undefined)).toEqual([]);
});

test('a page lies under its list, and only the day sheet under the root', () => {
  expect(isUnder('/complexes/ZF000042-X', '/complexes')).toBe(true);
  expect(isUnder('/complexes', '/complexes')).toBe(true);
  expect(isUnder('/complexes-of-mine', '/complexes')).toBe(false);
  expect(isUnder('/', '/')).toBe(true);
  expect(isUnder('/spectra', '/')).toBe(false);
});
