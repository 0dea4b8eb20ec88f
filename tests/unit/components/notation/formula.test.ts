import { describe, expect, test } from 'vitest';
import { formulaLabel, parseFormula } from '#src/components/notation/formula.ts';
import { type Run, runsToText } from '#src/components/notation/runs.ts';

/** Runs as one line: _sub_ ^sup^ /italic/. */
const marked = (runs: Run[]) =>
  runs
    .map(({ text, style }) => ({ normal: text, sub: `_${text}_`, sup: `^${text}^`, italic: `/${text}/` })[style])
    .join('');

describe('a formula is set as the Red Book sets it (IUPAC 2005, IR-4)', () => {
  test.each([
    ['[Cr(ox)3]3-', '[Cr(ox)_3_]^3−^', 'charge number before the sign: IR-4.3'],
    ['[Co(NH3)6]3+', '[Co(NH_3_)_6_]^3+^', 'IR-4.3'],
    ['trans-[CoCl2(en)2]+', '/trans/-[CoCl_2_(en)_2_]^+^', 'italic structural prefix: IR-4.6.5'],
    ['rac-[Ru(bpy)3]2+', '/rac/-[Ru(bpy)_3_]^2+^', 'common practice'],
    ['Δ-[Co(en)3]3+', 'Δ-[Co(en)_3_]^3+^', 'upright Greek: IR-2.10'],
    ['(OC-6-22)-[CoCl3(NH3)3]', '/(OC-6-22)/-[CoCl_3_(NH_3_)_3_]', 'italic polyhedral symbol: IR-2.9(f)'],
    ['K3[Cr(ox)3]·3H2O', 'K_3_[Cr(ox)_3_]·3H_2_O', 'count before an addition compound on the line: IR-4.2.3'],
    ['[Co(en)2Cl2]Cl·0.5H2O', '[Co(en)_2_Cl_2_]Cl·0.5H_2_O', 'decimal count'],
    ['[Fe(η5-C5H5)2]', '[Fe(η^5^-C_5_H_5_)_2_]', 'hapticity raised: IR-9.2.4.3'],
    ['[(μ2-OH)2]', '[(μ_2_-OH)_2_]', 'bridging multiplicity lowered: IR-9.2.5.2'],
    ['[{Cr(NH3)5}2(μ-OH)]5+', '[{Cr(NH_3_)_5_}_2_(μ-OH)]^5+^', 'example 1 of IR-2.3.1'],
    ['[Co(NH3)6][Cr(CN)6]', '[Co(NH_3_)_6_][Cr(CN)_6_]', 'two entities'],
    ['[Ni(CO)4]', '[Ni(CO)_4_]', 'no charge'],
    ['Fe0.95O', 'Fe_0.95_O', 'decimal subscript'],
    ["[Ru(4,4'-Me2bpy)3]2+", "[Ru(4,4'-Me_2_bpy)_3_]^2+^", 'locants stay on the line'],
  ])('%s', (formula, expected, source) => {
    expect(marked(parseFormula(formula)), source).toBe(expected);
  });

  test.each([
    ['K+', 'K^+^'],
    ['Fe3+', 'Fe^3+^'],
    ['Cl-', 'Cl^−^'],
    ['NO3-', 'NO_3_^−^'],
    ['NH4+', 'NH_4_^+^'],
    ['SO42-', 'SO_4_^2−^'],
    ['C2O42-', 'C_2_O_4_^2−^'],
    ['SO4^2-', 'SO_4_^2−^'],
    ['[Cr(ox)₃]³⁻', '[Cr(ox)_3_]^3−^'],
  ])('the charge of %s is told from its counts', (formula, expected) => {
    expect(marked(parseFormula(formula))).toBe(expected);
  });

  test('a copy reads back: only the minus of a charge has become a true one', () => {
    const plain = ['[Cr(ox)3]3-', 'trans-[CoCl2(en)2]+', 'K3[Cr(ox)3]·3H2O', '[Fe(η5-C5H5)2]', '[Pt(C2H4)Cl3]-'];
    for (const formula of plain) {
      expect(runsToText(parseFormula(formula))).toBe(formula.replace(/-$/, '−'));
    }
  });

  test('what is half typed is shown as it stands', () => {
    expect(runsToText(parseFormula('[Co(en'))).toBe('[Co(en');
    expect(parseFormula('')).toEqual([]);
  });

  test('is read aloud with its charge in words', () => {
    expect(formulaLabel('[Cr(ox)3]3-')).toBe('[Cr(ox)3] 3 minus');
    expect(formulaLabel('trans-[CoCl2(en)2]+')).toBe('trans-[CoCl2(en)2] plus');
  });
});
