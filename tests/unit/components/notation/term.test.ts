import { expect, test } from 'vitest';
import { type Run, runsToText } from '#src/components/notation/runs.ts';
import {
  parseConfiguration,
  parseDCount,
  parsePointGroup,
  parseTerm,
  parseTransition,
  termLabel,
} from '#src/components/notation/term.ts';

const marked = (runs: Run[]) =>
  runs
    .map(({ text, style }) => ({ normal: text, sub: `_${text}_`, sup: `^${text}^`, italic: `/${text}/` })[style])
    .join('');

// Typography of terms and groups as in any text on the subject: common practice.
test.each([
  ['4A2g', '^4^A_2g_'],
  ['4T1g(F)', '^4^T_1g_(F)'],
  ['2Eg', '^2^E_g_'],
  ["A1'", 'A_1_′'],
  ["E''", 'E″'],
  ["2A2''", '^2^A_2_″'],
  ['2Sigma_g+', '^2^Σ_g_^+^'],
  ['Sigma-', 'Σ^−^'],
  ['3Pi_u', '^3^Π_u_'],
  ['4F', '^4^F'],
  ['4F3/2', '^4^F_3/2_'],
  ['t2g', 't_2g_'],
  ['T1', 'T_1_'],
  ['dπ(Ru)', 'dπ(Ru)'],
])('term %s', (term, expected) => {
  expect(marked(parseTerm(term))).toBe(expected);
});

test.each([
  ['Oh', '/O/_h_'],
  ['D4h', '/D/_4h_'],
  ['Cinfv', '/C/_∞v_'],
  ['C1', '/C/_1_'],
  ['T', '/T/'],
])('point group %s', (group, expected) => {
  expect(marked(parsePointGroup(group))).toBe(expected);
});

test.each([
  ['t2g3 eg0', 't_2g_^3^ e_g_^0^'],
  ['e4 t23', 'e^4^ t_2_^3^'],
  ['3d3', '3d^3^'],
  ['a1g2 e1g4 b1g1', 'a_1g_^2^ e_1g_^4^ b_1g_^1^'],
  ["a1'2 e''4", 'a_1_′^2^ e″^4^'],
  ['t2g', 't_2g_'],
])('configuration %s', (configuration, expected) => {
  expect(marked(parseConfiguration(configuration))).toBe(expected);
});

test('a transition names its lower state first, and one end alone stands alone', () => {
  expect(marked(parseTransition('2T2g', '2Eg'))).toBe('^2^T_2g_ → ^2^E_g_');
  expect(marked(parseTransition('dπ(Ru)', 'π*(bpy)'))).toBe('dπ(Ru) → π*(bpy)');
  expect(marked(parseTransition(null, '4T2g'))).toBe('^4^T_2g_');
  expect(parseTransition(null, undefined)).toEqual([]);
});

test('a d-count has its number raised', () => {
  expect(runsToText(parseDCount(10))).toBe('d10');
  expect(parseDCount(3)[1]).toEqual({ text: '3', style: 'sup' });
});

test('terms are read aloud in parts', () => {
  expect(termLabel('4A2g')).toBe('4 A 2g');
  expect(termLabel('2Sigma_g+')).toBe('2 Sigma g plus');
  expect(termLabel("A1'")).toBe('A 1 prime');
});
