import { describe, expect, test } from 'vitest';
import { DomainError } from '#src/chem/errors.ts';
import { readFormula } from '#src/chem/formula/index.ts';
import { ligand } from '#src/chem/ligands/index.ts';

const states = (text: string, answers = {}) => readFormula(text, answers).centres.map((c) => c.oxidationState);
const codes = (text: string, answers = {}) => readFormula(text, answers).questions.map((q) => q.code);

function refusal(text: string): { code: string; position: number | undefined; message: string } {
  try {
    readFormula(text);
  } catch (error) {
    if (error instanceof DomainError) return { code: error.code, position: error.position, message: error.message };
    throw error;
  }
  throw new Error(`${text} was read`);
}

// Spellings and their Red Book order (IR-4.4.3.2): by alphabet, CO before Cl, charge and salt apart.
describe('printing', () => {
  test.each([
    ['Co(NH3)6Cl3', '[Co(NH3)6]Cl3'],
    ['[Co(NH3)5Cl]2+', '[CoCl(NH3)5]2+'],
    ['Ir(CO)Cl(PPh3)2', '[Ir(CO)Cl(PPh3)2]'],
    ['Cl3[Cr(OH2)6]', '[Cr(H2O)6]Cl3'],
    ['[CoCl2(PPh3)2] · 1/2 CH2Cl2', '[CoCl2(PPh3)2]·0.5CH2Cl2'],
    ['TBA2[Re2Cl8]', '(NBu4)2[Re2Cl8]'],
    ['[Cu(en)2](ReO4)2', '[Cu(en)2][ReO4]2'],
    ['K trans-[Cr(ox)2(H2O)2]', 'Ktrans-[Cr(H2O)2(ox)2]'],
    ['[OsO3N]-', '[OsN(O)3]-'],
    ['[Ti(O)(H)2]', '[TiH2(O)]'],
    ['[Os(N)(H)3]', '[OsH3(N)]'],
    ['[Fe(CN)6]^{3-}', '[Fe(CN)6]3-'],
    ['CrO4 2-', '[CrO4]2-'],
    ['CrO42-', '[CrO4]2-'],
    ['MnO4-', '[MnO4]-'],
    ['([Fe(CN)6]3-)2([Ni(en)3]2+)3', '[Ni(en)3]3[Fe(CN)6]2'],
    ['(NH3)5Ru(μ-pyz)Ru(NH3)5', '[{Ru(NH3)5}2(μ-pyz)]'],
  ])('%s is printed %s', (typed, printed) => expect(readFormula(typed).formula).toBe(printed));
});

describe('everyday forms without brackets', () => {
  test.each([
    ['TiCl4(THF)2', 6, 'Ti', 4],
    ['Fe(acac)3', 6, 'Fe', 3],
    ['K3Fe(CN)6', 6, 'Fe', 3],
    ['HAuCl4', 4, 'Au', 3],
    ['HMn(CO)5', 6, 'Mn', 1],
    ['Ru(bpy)3(PF6)2', 6, 'Ru', 2],
    ['Na2MoO4·2H2O', 4, 'Mo', 6],
  ])('%s: %i donors, %s(%i)', (text, coordinationNumber, element, oxidationState) => {
    const reading = readFormula(text);
    expect(reading).toMatchObject({ coordinationNumber, centres: [{ element, oxidationState }], questions: [] });
  });

  test('water of a hydrate is asked about, never placed', () => {
    const asked = readFormula('CuSO4·5H2O');
    expect(asked).toMatchObject({ coordinationNumber: null, solvates: [{ formula: 'H2O', count: 5 }] });
    expect(asked.questions[0]?.choices.map((c) => c.value)).toEqual(['aqua', 'as-typed']);
    expect(readFormula('NiCl2·6H2O', { 'aqua-ion': 'aqua' }).formula).toBe('[Ni(H2O)6]Cl2');
    expect(readFormula('NiCl2·6H2O', { 'aqua-ion': 'inner' }).formula).toBe('[NiCl2(H2O)4]·2H2O');
    expect(readFormula('VOSO4·5H2O', { 'aqua-ion': 'aqua' }).formula).toBe('[V(H2O)5O]SO4');
    expect(codes('NiCl2·6H2O', { 'aqua-ion': 'as-typed' })).toEqual([]);
    for (const full of ['H2PtCl6·6H2O', 'HAuCl4·3H2O', 'K2PtCl4·H2O']) expect(codes(full), full).toEqual([]);
  });
});

describe('binding', () => {
  test('chelating or not follows from the sphere', () => {
    expect(readFormula('[Co(CO3)(NH3)4]+').ligands[0]).toMatchObject({ denticity: 2, donors: ['O', 'O'] });
    expect(readFormula('[Co(CO3)(NH3)5]+').ligands[0]).toMatchObject({ denticity: 1, donors: ['O'] });
  });
  test('a κ names another donor and makes another entity', () => {
    const [byOxygen, bySulfur] = [readFormula('[RuCl2(dmso)4]'), readFormula('[RuCl2(dmso-κS)4]')];
    expect(bySulfur.ligands.find((l) => l.abbreviation === 'dmso')?.donors).toEqual(['S']);
    expect(bySulfur.entities[0]?.identity).not.toBe(byOxygen.entities[0]?.identity);
  });
  test('linkage isomers differ, coordination isomers too', () => {
    const id = (text: string) => readFormula(text).entities.map((e) => e.identity);
    expect(id('[Co(NCS)(NH3)5]2+')).not.toEqual(id('[Co(SCN)(NH3)5]2+'));
    expect(id('[Co(NH3)6][Cr(CN)6]')).not.toEqual(id('[Cr(NH3)6][Co(CN)6]'));
  });
  test('salt, solvate, isomer and spelling leave the identity alone', () => {
    const id = (text: string) => readFormula(text).entities[0]?.identity;
    const same = [
      '[CoCl2(en)2]+',
      'trans-[Co(en)2Cl2]Cl',
      'Δ-cis-[CoCl2(en)2]ClO4·H2O',
      'rac-[Co(NH2CH2CH2NH2)2Cl2]Br',
    ];
    expect(new Set(same.map(id)).size).toBe(1);
  });
  test('which fragment holds what is kept when the fragments differ', () => {
    const id = (text: string) => readFormula(text).entities[0]?.identity;
    expect(id('[{Co(NH3)5}{Ru(CN)5}(μ-pyz)]')).not.toBe(id('[{Ru(NH3)5}{Co(CN)5}(μ-pyz)]'));
    expect(id('[Ru2(NH3)10(μ-pyz)]5+')).toBe(id('[{Ru(NH3)5}2(μ-pyz)]5+'));
  });
  test('four donors: d8 is square planar first', () => {
    expect(readFormula('[PtCl4]2-').geometries[0]).toBe('SP-4');
    expect(readFormula('[CoCl4]2-').geometries[0]).toBe('T-4');
  });
});

describe('charges', () => {
  test.each([
    ['[Pt(NH3)4][PtCl4]', [2, 2]],
    ['[Ni(en)3]2[Fe(CN)6]', [2, 2]],
    ['Hg[Co(NCS)4]', [2]],
    ['Ag3[Fe(CN)6]', [3]],
    ['[PW12O40]3-', Array(12).fill(6)],
    ['La[Fe(CN)6]', [3]],
  ])('%s', (text, wanted) => expect(states(text)).toEqual(wanted));

  test('an f-block partner keeps +3 and no d count', () => {
    expect(readFormula('[LaFe(CN)6]').centres).toMatchObject([
      { element: 'La', group: null, oxidationState: 3, dCount: null },
      { element: 'Fe', oxidationState: 3, dCount: 5 },
    ]);
  });
  test('nitrosyl: plain where the usual state results, else asked', () => {
    expect(readFormula('[Fe(CN)5(NO)]2-').centres[0]).toMatchObject({
      oxidationState: 2,
      nominal: true,
      alternatives: [4],
    });
    expect(codes('[Co(NH3)5(NO)]2+')).toEqual(['ligand-charge']);
    expect(states('[Co(NH3)5(NO)]2+', { 'ligand-charge': '-1' })).toEqual([3]);
    expect(states('[Co(NH3)5(NO)]2+', { 'ligand-charge': '1' })).toEqual([1]);
  });
});

describe('questions and their answers', () => {
  test.each([
    ['[Cr(H20)6](N03)3', 'suspicious-token', 'H2O,NO3', '[Cr(H2O)6](NO3)3'],
    ['[CoCI4]2-', 'suspicious-token', 'Cl', '[CoCl4]2-'],
    ['[CO(NH3)6]3+', 'no-d-block-metal', 'Co', '[Co(NH3)6]3+'],
    ['[co(NH3)6]3+', 'unknown-symbol', 'Co', '[Co(NH3)6]3+'],
    ['[FE(CN)6]3-', 'unknown-symbol', 'Fe', '[Fe(CN)6]3-'],
    ['[Fe(CN)6]3+', 'impossible-oxidation-state', '-3', '[Fe(CN)6]3-'],
    ['[ZnCl6]2-', 'implausible-oxidation-state', '-4', '[ZnCl6]4-'],
    ['[ZnCl6]2-', 'implausible-oxidation-state', 'keep', '[ZnCl6]2-'],
    ['[Co(NH3)6]3+Cl2', 'charge-mismatch', 'stated', '[Co(NH3)6]3+Cl2'],
    ['[Co(NH3)6]3+Cl2', 'charge-mismatch', 'balance', '[Co(NH3)6]Cl2'],
    ['[Co(NH3)6]2Cl3', 'charge-mismatch', '3', '([Co(NH3)6]3+)2Cl3'],
    ['VO2+', 'charge-text', '2+', '[VO]2+'],
    ['VO2+', 'charge-text', '+', '[VO2]+'],
    ['[Cu(C10H8N2)2]2+', 'unknown-ligand', 'bpy', '[Cu(bpy)2]2+'],
    ['[Cu(C9H8N2)2]2+', 'unknown-ligand', '0', '[Cu(C9H8N2)2]2+'],
  ])('%s asks %s; answered %s it is %s', (typed, code, value, printed) => {
    const asked = readFormula(typed);
    expect(asked.questions.map((q) => q.code)).toContain(code);
    expect(asked.questions.find((q) => q.code === code)?.choices.map((c) => c.value)).toContain(value);
    const settled = readFormula(typed, { [code]: value });
    expect(settled.questions).toEqual([]);
    expect(settled.formula).toBe(printed);
    expect(settled.centres.every((c) => c.oxidationState !== null)).toBe(true);
  });

  test('mixed valence is averaged, or split as answered', () => {
    const answers = { 'mixed-valence': '2,3' };
    expect(states('[{Ru(NH3)5}2(μ-pyz)]5+', answers)).toEqual([2, 3]);
    expect(codes('[{Ru(NH3)5}2(μ-pyz)]5+', { 'mixed-valence': 'average' })).toEqual([]);
    expect(readFormula('Fe4[Fe(CN)6]3', { 'mixed-valence': '-4,3' })).toMatchObject({
      entityCharge: -4,
      counterIons: [{ formula: 'Fe3+', count: 4 }],
    });
  });

  test('different metals share only when told how', () => {
    const typed = '[{Co(NH3)5}{Ru(CN)5}(μ-pyz)]';
    expect(states(typed)).toEqual([null, null]);
    expect(states(typed, { 'oxidation-state-sharing': 'Co=3,Ru=2' })).toEqual([3, 2]);
  });

  test.each(['[Co(NH3)6]', '[Cr(CO)6]6+', '[Co(NH3)6]5+', '[FeCl6]-'])('%s is not taken without a word', (text) => {
    expect(codes(text).some((code) => code.endsWith('oxidation-state'))).toBe(true);
    expect(states(text)).toEqual([null]);
  });
});

describe('refusals point at the text as typed', () => {
  test.each([
    ['   ', 'empty', 0],
    ['[Co(byp)3]3+', 'unknown-symbol', 4],
    ['K₄[Fe(CN)₆', 'unbalanced-bracket', 2],
    ['K4[Fe(CN)6]··H2O', 'malformed-hydrate', 12],
    ['K4[Fe(CN)6]·nH2O', 'malformed-hydrate', 12],
    ['K4[Fe(CN)6]·3', 'malformed-hydrate', 12],
    ['[Co(NH3)6]1000', 'too-large', 10],
    [`[Fe${'('.repeat(9)}CN${')'.repeat(9)}]`, 'too-large', 10],
    [`[Fe(CN)6]${'Cl'.repeat(300)}`, 'too-large', 500],
    ['[Fe()6]', 'unreadable', 3],
    ['[Co(NH3)6·H2O]', 'unreadable', 9],
    ['[Co(NH3)6 3+]', 'unreadable', 3],
    ['NaCl', 'no-d-block-metal', 0],
    ['C6H12O6', 'no-d-block-metal', 0],
    ['[UO2(NO3)2]', 'f-block-metal', 0],
    ['hello', 'unknown-symbol', 0],
  ])('%s: %s at %i', (text, code, position) => expect(refusal(text)).toMatchObject({ code, position }));

  test('a near miss is named', () => expect(refusal('[Co(byp)3]3+').message).toContain('did you mean "bpy"'));
});

test('a lab’s own ligand is read, and takes precedence', () => {
  const own = ligand('qnx', 'C8H6N2', 0, 'N', 'quinoxaline', 'c1ccc2nccnc2c1', 'acceptor');
  expect(refusal('[Cu(qnx)4]+').code).toBe('unknown-symbol');
  expect(readFormula('[Cu(qnx)4]+', {}, [own])).toMatchObject({
    coordinationNumber: 4,
    centres: [{ oxidationState: 1 }],
  });
});
