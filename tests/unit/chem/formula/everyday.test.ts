import { describe, expect, test } from 'vitest';
import { labelledMolarMass } from '#src/chem/composition/index.ts';
import { readFormula } from '#src/chem/formula/index.ts';

// Spellings of one thing as papers and benches write it (common practice unless said otherwise).

const keys = (text: string, answers = {}) =>
  readFormula(text, answers)
    .entities.map((e) => `${e.count} ${e.identity}`)
    .sort();
const questionsOf = (text: string, answers = {}) => readFormula(text, answers).questions.map((q) => q.code);
const answered = (text: string) => {
  const choices = readFormula(text).questions.map((q) => [q.code, q.choices[0]!.value] as const);
  return readFormula(text, Object.fromEntries(choices));
};

describe('one substance, many spellings', () => {
  test.each([
    [
      '[Fe(Cp)2]',
      ['ferrocene', 'Ferrocene', 'FeCp2', 'Cp2Fe', 'Fe(C5H5)2', 'Fe(η5-C5H5)2', '[Fe(η^5-C5H5)2]', 'Fe(cp)2'],
    ],
    ['[Fe(Cp)2]+', ['ferrocenium', '[FeCp2]+', '[Cp2Fe]+']],
    ['[Mn2(CO)10]', ['Mn2(CO)10', '[(CO)10Mn2]']],
    ['[Mo6Cl14]2-', ['[Mo6Cl8Cl6]2-', '[Mo6Cl14]^{2-}']],
    ['[{WCl3}2(μ-Cl)3]3-', ['[Cl3W(μ-Cl)3WCl3]3-', '[W2Cl6(μ-Cl)3]3-']],
    ['[{Ru(NH3)5}2(μ-pyz)]5+', ['[(NH3)5Ru(pz)Ru(NH3)5]5+', '[{Ru(NH3)5}2(pyz)]5+', 'Creutz–Taube ion']],
    ['[{Ir(ppy)2(μ-Cl)}2]', ['[Ir(ppy)2(μ-Cl)]2', '[Ir2(ppy)4(μ-Cl)2]']],
    ['[{Fe(salen)}2(μ-O)]', ['[Fe(salen)]2O', '[(salen)Fe-O-Fe(salen)]', '[Fe2(salen)2(μ-O)]']],
    ['[OsN(O)3]-', ['[Os(N)O3]-', '[OsO3N]-']],
    ['[ReCl2N(PPh3)2]', ['[ReNCl2(PPh3)2]', '[Re(N)(PPh3)2Cl2]']],
    ['[Co(NCS)(NH3)5]2+', ['[Co(NH3)5(SCN-κN)]2+', '[Co(κN-NCS)(NH3)5]2+']],
    ['[Co(CO3)(NH3)4]+', ['[Co(CO3-κ2O,O′)(NH3)4]+', '[Co(κ2-CO3)(NH3)4]+']],
    ['[Fe(CN)6]4-', ['ferrocyanide', '$[Fe(CN)_6]^{4-}$', '[Fe(CN)<sub>6</sub>]<sup>4-</sup>', '[Fe(CN)6] 4−']],
    ['cis-[PtCl2(NH3)2]', ['cisplatin', 'cis-Pt(NH3)2Cl2']],
    ['trans-[Ir(CO)Cl(PPh3)2]', ["Vaska's complex", 'Vaska’s complex', 'trans-IrCl(CO)(PPh3)2']],
  ])('%s', (printed, spellings) => {
    const wanted = keys(printed);
    for (const spelling of spellings) expect(keys(spelling), spelling).toEqual(wanted);
    expect(readFormula(printed).formula).toBe(printed);
  });

  test('mixed counter-ions in any order', () => {
    const first = readFormula('[Co(NH3)6]Cl2(NO3)');
    expect(first).toMatchObject({ entityCharge: 3, overallCharge: 0 });
    for (const other of ['[Co(NH3)6](NO3)Cl2', '[Co(NH3)6]NO3Cl2', '(NO3)[Co(NH3)6]Cl2'])
      expect(readFormula(other).formula, other).toBe(first.formula);
    expect(readFormula('[Co(NH3)6]Cl(SO4)').entityCharge).toBe(3);
    expect(readFormula('KNa2[Co(NO2)6]').entityCharge).toBe(-3);
  });

  test.each([
    ['·½H2O', 0.5],
    ['·0.5H2O', 0.5],
    ['·1/2 H2O', 0.5],
    ['· 1½ H2O', 1.5],
    ['·2¾H2O', 2.75],
    [' · 3 H2O', 3],
    [' . 3H2O', 3],
    [' * 3 H2O', 3],
    [' x 3 H2O', 3],
    [' × 3 H2O', 3],
    [' 3 H2O', 3],
    [' 3H₂O', 3],
    [' H2O', 1],
    ['·(H2O)3', 3],
    ['·3aq', 3],
  ])('hydrate written %s', (tail, count) => {
    const reading = readFormula(`[Co(en)3]Cl3${tail}`);
    expect(reading.solvates).toEqual([{ formula: 'H2O', count }]);
    expect(reading.entityCharge).toBe(3);
  });

  test.each([
    ['Co(NH3)63+', '[Co(NH3)6]3+'],
    ['Fe(CN)64-', '[Fe(CN)6]4-'],
    ['Ni(en)3 2+', '[Ni(en)3]2+'],
    ['[Ru(bpy)3]2+(PF6-)2', '[Ru(bpy)3](PF6)2'],
    ['[Co(NCS)4][Hg]', 'Hg[Co(NCS)4]'],
    ['[Co(HDO)(NH3)5]3+', '[Co(H2O)(NH3)5]3+'],
  ])('%s is %s', (typed, printed) => {
    expect(readFormula(typed)).toMatchObject({ formula: printed, questions: [] });
    expect(keys(typed)).toEqual(keys(printed));
  });

  test('a digit that may be a count or a charge is asked about behind a bracket, too', () => {
    expect(questionsOf('Cu(phen)2+')).toEqual(['charge-text']);
    expect(readFormula('Cu(phen)2+', { 'charge-text': '+' }).formula).toBe('[Cu(phen)2]+');
    expect(readFormula('Cu(phen)2+', { 'charge-text': '2+' }).formula).toBe('[Cu(phen)]2+');
  });

  test('ions written one after the other, as in an equation', () =>
    expect(readFormula('[Co(en)3]3+ 3 Cl-').formula).toBe('[Co(en)3]Cl3'));
});

describe('isotopologues share the record; the label is told', () => {
  test.each([
    ['[Co(D2O)6]2+', '[Co(H2O)6]2+', '2H', 12],
    ['[Co(ND3)6]Cl3', '[Co(NH3)6]Cl3', '2H', 18],
    ['[Cr([2H]2O)6]3+', '[Cr(H2O)6]3+', '2H', 12],
    ['[Cr((2H)2O)6]3+', '[Cr(H2O)6]3+', '2H', 12],
    ['[Cr(²H₂O)6]3+', '[Cr(H2O)6]3+', '2H', 12],
    ['[RuCl2(d6-dmso)4]', '[RuCl2(dmso)4]', '2H', 24],
    ['[RuCl2(dmso-d6)4]', '[RuCl2(dmso)4]', '2H', 24],
    ['[RuCl2([D6]dmso)4]', '[RuCl2(dmso)4]', '2H', 24],
    ['[Ru([2H8]bpy)3]2+', '[Ru(bpy)3]2+', '2H', 24],
    ['[Fe(13CO)5]', '[Fe(CO)5]', '13C', 5],
    ['[Fe(¹³CO)5]', '[Fe(CO)5]', '13C', 5],
    ['[Fe(C18O)5]', '[Fe(CO)5]', '18O', 5],
    ['K4[57Fe(CN)6]', 'K4[Fe(CN)6]', '57Fe', 1],
    ['[Co(15NH3)6]3+', '[Co(NH3)6]3+', '15N', 6],
    ['[Co(en)3]Cl3·3D2O', '[Co(en)3]Cl3·3H2O', '2H', 6],
    ['[Co(CD3CN)6]2+', '[Co(MeCN)6]2+', '2H', 18],
  ])('%s is %s', (typed, plain, isotope, count) => {
    const reading = readFormula(typed);
    expect(reading.isotopes).toMatchObject([{ isotope, count }]);
    expect(reading.formula).toBe(plain);
    expect(keys(typed)).toEqual(keys(plain));
    expect(labelledMolarMass(reading.composition, reading.isotopes)).toBeGreaterThan(reading.molarMass);
  });

  test.each(['[Rh(COD)Cl]', '[Zn(EDTA)]2-', '[RuCl2(DMSO)4]', '[Co(dien)2]3+', '[Dy(H2O)8][Fe(CN)6]', 'D-[Co(en)3]3+'])(
    'no D is taken for deuterium in %s',
    (text) => expect(readFormula(text).isotopes).toEqual([]),
  );

  test('a position in the labelled text is one in the text as typed', () =>
    expect(() => readFormula('[Co(D2O)4(xyq)]2+')).toThrow(expect.objectContaining({ position: 10 })));
});

describe('stereo prefixes are kept', () => {
  test.each([
    ['trans-[CoCl2(en)2]Cl', 'trans'],
    ['all-trans-[RuCl2(CO)2(PPh3)2]', 'all-trans'],
    ['cis,cis,trans-[RuCl2(CO)2(PPh3)2]', 'cis,cis,trans'],
    ['mer,trans-[RuCl2(CO)(PPh3)3]', 'mer,trans'],
    ['trans(N)-[Co(gly)3]', 'trans(N)'],
    ['(OC-6-22)-[Co(NH3)3Cl3]', '(OC-6-22)'],
    ['Δ-[Co(en)3]3+', 'Δ'],
    ['Lambda-[Co(en)3]3+', 'Λ'],
    ['(+)589-[Co(en)3]Br3', '(+)589'],
    ['(−)-[Co(en)3]3+', '(-)'],
    ['rac-cis-[CoCl2(en)2]+', 'rac-cis'],
    ['K (OC-6-22)-[CoCl3(NH3)3]', '(OC-6-22)'],
  ])('%s', (typed, configuration) => {
    const reading = readFormula(typed);
    expect(reading.configuration ?? reading.entities[0]?.configuration).toBe(configuration);
    expect(readFormula(reading.formula).formula).toBe(reading.formula);
  });
});

describe('what nobody can tell from the formula is asked', () => {
  test('dmg: the proton is left out in [Ni(dmg)2], not in the dianion', () => {
    const [question] = readFormula('[Ni(dmg)2]').questions;
    expect(question).toMatchObject({ code: 'ligand-meaning', position: 4 });
    expect(question?.choices[0]?.label).toContain('dmg means Hdmg⁻ here');
    expect(readFormula('[Ni(dmg)2]').centres[0]?.oxidationState).toBeNull();
    const meant = readFormula('[Ni(dmg)2]', { 'ligand-meaning': 'Hdmg' });
    expect(meant).toMatchObject({ formula: '[Ni(Hdmg)2]', questions: [], centres: [{ oxidationState: 2 }] });
    expect(readFormula('[Ni(dmg)2]', { 'ligand-meaning': 'dmg' }).centres[0]?.oxidationState).toBe(4);
    expect(questionsOf('[Ni(dmg)2]2-')).toEqual([]);
    expect(questionsOf('[Co(dmg)2(py)Cl]')).toEqual(['ligand-meaning']);
    expect(readFormula('[Co(dmg)2(py)Cl]', { 'ligand-meaning': 'Hdmg' }).centres[0]?.oxidationState).toBe(3);
  });

  test('pz: pyrazine between two metals, pyrazolate where only that gives a usual state, else a question', () => {
    const ligandOf = (text: string) => readFormula(text).ligands.map((l) => l.abbreviation);
    expect(ligandOf('[{Ru(NH3)5}2(μ-pz)]5+')).toContain('pyz');
    expect(ligandOf('[Rh2(CO)4(μ-pz)2]')).toContain('pyrazolato');
    expect(ligandOf('[Pt(NH3)2(pz)2]')).toContain('pyrazolato');
    expect(questionsOf('[Ru(NH3)5(pz)]2+')).toEqual(['ligand-meaning']);
    expect(readFormula('[Ru(NH3)5(pz)]2+', { 'ligand-meaning': 'pyz' }).centres[0]?.oxidationState).toBe(2);
    expect(readFormula('[Ru(NH3)5(pz)]2+', { 'ligand-meaning': 'pyrazolato' }).centres[0]?.oxidationState).toBe(3);
  });

  test.each([
    ['[Cu(NO3)2(py)2]', '[Cu(NO3-κO)2(py)2]', 4],
    ['[Zn(OAc)2(H2O)2]', '[Zn(H2O)2(OAc-κO)2]', 4],
    ['[Zn(SO4)(H2O)2(py)]', null, 4],
    ['[Cu(CO3)(py)2]', null, 4],
  ])('how it holds: %s', (typed, printed, coordinationNumber) => {
    if (printed === null) {
      expect(readFormula(typed)).toMatchObject({ coordinationNumber, questions: [] });
      return;
    }
    expect(readFormula(typed)).toMatchObject({ coordinationNumber: null, questions: [{ code: 'denticity' }] });
    expect(readFormula(typed, { denticity: '1' })).toMatchObject({
      coordinationNumber,
      formula: printed,
      questions: [],
    });
    expect(readFormula(printed)).toMatchObject({ coordinationNumber, questions: [] });
    expect(keys(typed, { denticity: '1' })).toEqual(keys(printed));
    expect(readFormula(typed, { denticity: '2' }).coordinationNumber).toBe(6);
    expect(keys(typed, { denticity: '2' })).not.toEqual(keys(printed));
  });

  test('what bridges a dimer', () => {
    expect(questionsOf('[RhCl(cod)]2')).toEqual(['bridges']);
    expect(readFormula('[RhCl(cod)]2', { bridges: 'Cl' }).formula).toBe('[{Rh(cod)(μ-Cl)}2]');
    expect(keys('[RhCl(cod)]2', { bridges: 'Cl' })).toEqual(keys('[Rh2(μ-Cl)2(cod)2]'));
    expect(readFormula('[RuCl2(p-cymene)]2', { bridges: 'Cl' }).formula).toBe('[{RuCl(p-cym)(μ-Cl)}2]');
    expect(keys('[Cu(OAc)2(H2O)]2', { bridges: 'OAc*2' })).toEqual(keys('[Cu2(μ-OAc)4(H2O)2]'));
    expect(readFormula('[RhCl(cod)]2', { bridges: 'none' })).toMatchObject({
      formula: '[{RhCl(cod)}2]',
      questions: [],
    });
  });

  test.each([
    ['[Co(NH3)5(NO)]2+', 'ligand-charge', ['1', '-1']],
    ['[Co(O2)(salen)(py)]', 'ligand-charge', ['-2', '-1', '0']],
    ['[Ru(bpy)3]', 'implausible-oxidation-state', ['2', '3', '4', 'keep']],
    ['[{Ru(NH3)5}2(μ-pyz)]5+', 'mixed-valence', ['average', '2,3']],
    ['[Co(H20)6]2+', 'suspicious-token', ['H2O']],
    ['[Fe(CN)6]3+', 'impossible-oxidation-state', ['-3', '-4']],
    ['[{Co(NH3)5}{Ru(CN)5}(μ-pyz)]', 'oxidation-state-sharing', ['Co=3,Ru=2', 'Co=2,Ru=3', 'open']],
  ])('%s: %s', (text, code, values) => {
    const question = readFormula(text).questions.find((q) => q.code === code);
    expect(question?.choices.map((c) => c.value)).toEqual(values);
    for (const value of values) expect(questionsOf(text, { [code]: value }), value).not.toContain(code);
  });

  test('mercury(I) is a pair, not an impossible state', () =>
    expect(readFormula('[Hg2]2+')).toMatchObject({
      questions: [],
      centres: [{ oxidationState: 1 }, { oxidationState: 1 }],
    }));
});

describe('several doubts under one code are told apart by place', () => {
  const typed = '[Cr(C9H8N2)2(C8H6N3)2]2+';
  test('numbers stand, whatever is answered first', () => {
    expect(questionsOf(typed)).toEqual(['unknown-ligand', 'unknown-ligand:2']);
    expect(questionsOf(typed, { 'unknown-ligand': '0' })).toEqual(['unknown-ligand:2']);
    expect(questionsOf(typed, { 'unknown-ligand:2': '-1' })).toEqual(['unknown-ligand']);
    const both = readFormula(typed, { 'unknown-ligand': '0', 'unknown-ligand:2': '0' });
    expect(both).toMatchObject({ questions: [], centres: [{ oxidationState: 2 }] });
  });
  test('each entity of a salt has its own', () => {
    const salt = '[Zn(NH3)6]4+[Fe(CN)6]4-';
    expect(questionsOf(salt)).toEqual(['implausible-oxidation-state']);
    const other = '[Fe(CN)6]4-[Zn(NH3)6]4+';
    expect(questionsOf(other)).toEqual(['implausible-oxidation-state:2']);
    const repaired = { 'implausible-oxidation-state:2': '2' };
    expect(questionsOf(other, repaired)).toEqual(['charge-mismatch']);
    const charges = readFormula(other, { ...repaired, 'charge-mismatch': 'stated' }).entities.map((e) => e.charge);
    expect(charges).toEqual([-4, 2]);
  });
  test('nitrates and acetates in one sphere', () => {
    const codes = questionsOf('[Zn(NO3)(OAc)(py)2]');
    expect(codes).toEqual(['denticity', 'denticity:2']);
    expect(answered('[Zn(NO3)(OAc)(py)2]').questions).toEqual([]);
  });
});

describe('typing errors are shown where they are, with what was meant', () => {
  test.each([
    ['[Co(byp)3]3+', 4, 'did you mean "bpy"'],
    ['[Fe(phne)3]2+', 4, 'did you mean "phen"'],
    ['[Co(NH3)6](ClO5)3', 10, 'did you mean "ClO4"'],
    ['[Co(κ3-en)3]3+', 7, 'en has 2'],
    ['[Fe(CN)6', 0, 'never closed'],
  ])('%s at %i', (text, position, hint) => {
    expect(() => readFormula(text)).toThrow(
      expect.objectContaining({ position, message: expect.stringContaining(hint) }),
    );
  });
  test('a metal in the wrong case in the second entity, too', () => {
    expect(questionsOf('[Cr(NH3)6][CO(CN)6]')).toEqual(['no-d-block-metal']);
    expect(readFormula('[Cr(NH3)6][CO(CN)6]', { 'no-d-block-metal': 'Co' }).formula).toBe('[Cr(NH3)6][Co(CN)6]');
  });
});
