import { expect, test } from 'vitest';
import { groups } from '#src/chem/symmetry/index.ts';
import { groupAddress } from '#src/components/symmetry/GroupLink.tsx';
import { groupFamilies } from '#src/components/symmetry/group-families.ts';
import { addressOf, START, stateOf, withGroup } from '#src/components/symmetry/symmetry-address.ts';

test('a state comes back from its address, and the start has none', () => {
  const state = {
    ...START,
    group: 'D4h',
    double: true,
    irreps: ['B1g', 'Γ6+', 'Γ5,Γ6'],
    part: 'symmetric' as const,
    into: 'D2h',
    along: "C2'', sigma_d",
    term: '4F',
    from: '1A1g',
    to: '1Eg',
    geometry: 'SP-4',
    donors: ['N', 'N', 'Cl', 'Cl'],
    atoms: 'Co 0 0 0\nN 1.96 0 0',
    tolerance: 0.25,
    mode: 'Eu.1.0',
  };
  expect(stateOf(addressOf(state))).toEqual(state);
  expect(addressOf(START)).toBe('');
  expect(stateOf('')).toEqual(START);
});

test('an address that tells nonsense is as the start', () => {
  expect(stateOf('?group=D99h&part=half&tolerance=-1&double=yes')).toEqual(START);
  expect(stateOf(`?irreps=${Array.from({ length: 30 }, () => 'A1g').join('.')}`).irreps).toHaveLength(12);
});

test('another group lets labels of the old one go and keeps the skeleton', () => {
  const state = { ...START, irreps: ['T2g'], into: 'D4h', from: '4A2g', to: '4T2g', geometry: 'T-4', term: '2D' };
  expect(withGroup(state, 'Td')).toEqual({ ...START, group: 'Td', geometry: 'T-4', term: '2D' });
});

test('a link from a label is an address that the page reads', () => {
  expect(stateOf(new URL(groupAddress('Oh', '4A2g'), 'http://x').search)).toMatchObject({ group: 'Oh', from: '4A2g' });
});

test('every group stands in one family', () => {
  const listed = groupFamilies.flatMap(({ symbols }) => symbols);
  expect([...listed].sort()).toEqual(groups.map(({ symbol }) => symbol).sort());
  expect(groupFamilies.find(({ name }) => name === 'S2n')!.symbols).toEqual(['S4', 'S6', 'S8']);
});
