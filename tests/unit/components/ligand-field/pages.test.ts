import { describe, expect, test } from 'vitest';
import { readFormula } from '#src/chem/formula/index.ts';
import { addressOf, START, stateOf } from '#src/components/ligand-field/levels/levels-address.ts';
import { readOut } from '#src/components/ligand-field/levels/read-out.ts';
import { readLimits, USUAL_TYPED } from '#src/components/ligand-field/plan/plan-limits.ts';
import { plannedEntity } from '#src/components/ligand-field/plan/planned-entity.ts';
import { syntheticSpectrum } from '#src/components/ligand-field/plan/synthetic.ts';
import { LatestWins } from '#src/components/ligand-field/worker/latest-wins.ts';

describe('the address of the diagram page', () => {
  test('tells what differs from the start, and is read back', () => {
    const state = { ...START, n: 8, view: 'path' as const, at: 0.25, pi: -300 };
    expect(addressOf(START)).toBe('');
    expect(stateOf(addressOf(state))).toEqual(state);
  });

  test.each(['?n=12', '?n=2.5', '?n=', '?view=none', '?ratio=-1', '?max=abc', '?geometry=TBPY-5'])(
    '%s is as at the start',
    (search) => {
      expect(stateOf(search)).toEqual(START);
    },
  );
});

test('the read-out goes by straight lines, rising, and is empty outside', () => {
  const curves = [
    { label: 'b', x: [0, 1], y: [4, 8], strong: false },
    { label: 'a', x: [0, 1], y: [0, 0], strong: true },
  ];
  expect(readOut(curves, 0.25).map(({ label, energy }) => [label, energy])).toEqual([
    ['a', 0],
    ['b', 5],
  ]);
  expect(readOut(curves, 0)).toHaveLength(2);
  expect(readOut(curves, 1.5)).toEqual([]);
});

describe('the latest question wins', () => {
  const line = () => {
    const sent: [number, string][] = [];
    const frames: (() => void)[] = [];
    const one = new LatestWins<string>(
      (id, question) => sent.push([id, question]),
      (run) => frames.push(run),
    );
    const frame = () => {
      for (const run of frames.splice(0)) run();
    };
    return { one, sent, frame };
  };

  test('one a frame, one under way, and only the last of those that wait', () => {
    const { one, sent, frame } = line();
    for (const question of ['a', 'b', 'c']) one.ask(question);
    expect(sent).toEqual([]);
    frame();
    expect(sent).toEqual([[1, 'c']]);
    for (const question of ['d', 'e']) one.ask(question);
    frame();
    expect(sent).toHaveLength(1);
    expect(one.answered(1)).toBe(true);
    frame();
    expect(sent.at(-1)).toEqual([2, 'e']);
  });

  test('an answer to what was forgotten is not shown', () => {
    const { one, sent, frame } = line();
    one.ask('a');
    frame();
    one.forget();
    expect(one.answered(sent[0]![0])).toBe(false);
  });
});

describe('before measuring', () => {
  test('limits as typed, in mol and cm', () => {
    expect(readLimits(USUAL_TYPED).limits).toEqual({
      absorbance: [0.2, 1],
      paths: [0.1, 0.2, 0.5, 1, 2, 4, 5, 10],
      highest: 0.1,
      lowest: 1e-6,
    });
  });

  test.each([
    [{ low: '' }, 'low'],
    [{ low: '2' }, 'high'],
    [{ paths: '1, x' }, 'paths'],
    [{ lowest: '500' }, 'highest'],
  ])('%j is refused at its field', (part, field) => {
    const { limits, errors } = readLimits({ ...USUAL_TYPED, ...part });
    expect(limits).toBeNull();
    expect(Object.keys(errors ?? {})).toEqual([field]);
  });

  test.each([
    // Of these two the one without a centre has the stronger bands: ε 88 against 56 for cobalt(III) (Cotton & Wilkinson, from memory).
    ['[Co(en)3]3+', { geometry: 'OC-6', donors: [{ abbreviation: 'en', count: 6 }], centrosymmetric: false }],
    ['[Co(NH3)6]3+', { geometry: 'OC-6', donors: [{ abbreviation: 'NH3', count: 6 }], centrosymmetric: true }],
    ['[CoCl4]2-', { geometry: 'T-4', donors: [{ abbreviation: 'Cl', count: 4 }], centrosymmetric: false }],
    ['[CoCl(NH3)5]2+', { geometry: 'OC-6', centrosymmetric: false }],
  ])('%s is planned', (formula, complex) => {
    const planned = plannedEntity(readFormula(formula, {}).entities[0]!, null);
    expect(planned).toMatchObject({ kind: 'planned', complex });
  });

  test('a coordination number without tables is told', () => {
    const planned = plannedEntity(readFormula('[Mo(CN)8]4-', {}).entities[0]!, null);
    expect(planned).toMatchObject({ kind: 'none', sentence: expect.stringContaining('has 8') });
  });

  test('the synthetic spectrum has its band at its place and height', () => {
    const epsilon = { from: 1, to: 100, typical: 10, source: '' };
    const { x, epsilon: y } = syntheticSpectrum([{ kind: 'd-d', wavenumber: 20_000, spinAllowed: true, epsilon }]);
    expect(x[y.indexOf(Math.max(...y))]).toBe(20_000);
    expect(Math.max(...y)).toBeCloseTo(10, 9);
  });
});
