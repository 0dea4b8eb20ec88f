import { expect, test } from 'vitest';
import { spinChoices } from '#src/chem/electrons.ts';
import file from './terms.json';

interface Ground {
  id: string;
  kind: 'ligandFieldGround';
  geometry: 'Oh' | 'Td';
  spin: 'high' | 'low';
  dCount: number;
  expect: {
    configuration: string;
    groundTerm: string;
    unpaired: number;
    spinMultiplicity: number;
    LFSE_in_Delta: number;
    extraPairsOverHighSpin: number;
    spinOnlyMoment_BM: number;
  };
  tolerance: { spinOnlyMoment_BM: number; LFSE_in_Delta: number };
  source: string;
}

const records = (file.records as unknown as Ground[]).filter((r) => r.kind === 'ligandFieldGround');

test('there are records to check', () => expect(records.length).toBeGreaterThan(5));

test.each(records)('$id', ({ geometry, spin, dCount, expect: wanted, tolerance, source }) => {
  const choices = spinChoices(dCount, geometry === 'Oh' ? 'OC-6' : 'T-4');
  const choice = choices.find((c) => c.spin === spin);
  expect(choice?.configuration, source).toBe(wanted.configuration);
  expect(choice?.groundTerm).toEqual({ label: wanted.groundTerm, group: geometry });
  expect(choice?.unpaired).toBe(wanted.unpaired);
  expect(Math.abs((choice?.lfseInDelta ?? Number.NaN) - wanted.LFSE_in_Delta)).toBeLessThanOrEqual(tolerance.LFSE_in_Delta);
  expect(choice?.extraPairs).toBe(wanted.extraPairsOverHighSpin);
  expect(Math.abs((choice?.spinOnlyMoment ?? Number.NaN) - wanted.spinOnlyMoment_BM)).toBeLessThanOrEqual(tolerance.spinOnlyMoment_BM);
});
