import { expect, test } from 'vitest';
import { chargeText, donorText } from '#src/components/ligands/ligand-row.ts';

test('donors in the order of the chain, or the hapticity of what binds side-on', () => {
  expect(donorText({ donors: ['N', 'O', 'N'], hapticity: null })).toBe('N, O, N');
  expect(donorText({ donors: ['C', 'C'], hapticity: 2 })).toBe('η2-C');
});

test.each([
  [0, '0'],
  [-1, '1−'],
  [2, '2+'],
])('charge %d is written %s', (charge, text) => expect(chargeText(charge)).toBe(text));
