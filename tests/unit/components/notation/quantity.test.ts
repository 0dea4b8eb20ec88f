import { expect, test } from 'vitest';
import { formatNumber, oxidationStateText, parseQuantity, parseUnit } from '#src/components/notation/quantity.ts';
import { runsToText } from '#src/components/notation/runs.ts';

const text = (...args: Parameters<typeof parseQuantity>) =>
  runsToText(parseQuantity(...args)).replace(/[\u202f\u00a0]/g, ' ');

test('digits stand in groups of three, divided by a narrow no-break space, with a true minus (ISO 80000-1, 7.3.1)', () => {
  expect(formatNumber(21550)).toBe('21\u202f550');
  expect(formatNumber(-3600)).toBe('−3\u202f600');
  expect(formatNumber(1234567)).toBe('1\u202f234\u202f567');
  expect(formatNumber(40.1)).toBe('40.10');
  expect(formatNumber(464.04, 3)).toBe('464');
  expect(formatNumber(0)).toBe('0');
});

test('a gap and an absent value are a dash, never a number', () => {
  for (const nothing of [Number.NaN, null, undefined, Number.POSITIVE_INFINITY]) {
    expect(formatNumber(nothing)).toBe('–');
    expect(text({ value: nothing })).toBe('–');
  }
});

test.each([
  // At most two figures in an uncertainty, the value to the same place: GUM (JCGM 100:2008) 7.2.6.
  [{ value: 21550, uncertainty: 60 }, '21 550 ± 60'],
  [{ value: 21547.3, uncertainty: 62.31 }, '21 547 ± 62'],
  [{ value: 0.123456, uncertainty: 0.0012 }, '0.1235 ± 0.0012'],
  [{ value: 21550, uncertainty: 60, unit: 'cm-1' }, '(21 550 ± 60) cm−1'],
  // Powers of ten outside 10⁻³ … 10⁷: common practice.
  [{ value: 6.6e-4, figures: 2 }, '6.6 × 10−4'],
  [{ value: 6.6e-4, uncertainty: 0.5e-5 }, '(6.60 ± 0.05) × 10−4'],
  [{ value: 0.005, figures: 3 }, '0.005 00'],
  [{ value: 154.18, unit: 'g mol-1', figures: 5 }, '154.18 g mol−1'],
  [{ value: 298, unit: 'K' }, '298 K'],
])('%o', (quantity, expected) => {
  expect(text(quantity)).toBe(expected);
});

test('the exponents of a unit are raised and its factors stay on one line', () => {
  expect(parseUnit('dm3 mol-1 cm-1')).toEqual([
    { text: 'dm', style: 'normal' },
    { text: '3', style: 'sup' },
    { text: '\u00a0mol', style: 'normal' },
    { text: '−1', style: 'sup' },
    { text: '\u00a0cm', style: 'normal' },
    { text: '−1', style: 'sup' },
  ]);
  expect(parseUnit('cm⁻¹')).toEqual(parseUnit('cm-1'));
  expect(runsToText(parseUnit('°C'))).toBe('°C');
});

test('oxidation states are Roman, nought is 0, negative ones carry a minus (IUPAC 2005, IR-5.4.2.2)', () => {
  expect(oxidationStateText('Co', 3)).toBe('Co(III)');
  expect(oxidationStateText('Cr', 0)).toBe('Cr(0)');
  expect(oxidationStateText('Fe', -2)).toBe('Fe(−II)');
  expect(oxidationStateText('Os', 8)).toBe('Os(VIII)');
  expect(oxidationStateText('Fe', 2.5)).toBe('Fe(+2.5)');
  expect(oxidationStateText('Ru', null)).toBe('Ru');
});
