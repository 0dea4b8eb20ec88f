import { describe, expect, test } from 'vitest';
import {
  type CautionContext,
  cautionRules,
  cautionsFor,
  NO_RULE_MATCHED,
  STANDING_SENTENCE,
} from '#src/chem/cautions/index.ts';
import { cautionContext, readFormula } from '#src/chem/formula/index.ts';

type Conditions = Partial<Pick<CautionContext, 'solvent' | 'technique' | 'temperature' | 'electrolyte'>>;
type Case = readonly [formula: string, conditions?: Conditions];

const idsOf = ([formula, conditions = {}]: Case) =>
  cautionsFor({ ...cautionContext(readFormula(formula)), ...conditions }).map((c) => c.id);

// One composition that raises each rule and one that must not. Triggers: standard works named with each rule.
const CASES: Readonly<Record<string, { raises: Case; silent: Case }>> = {
  'CN-1': { raises: ['K2[Ni(CN)4]'], silent: ['K4[Fe(CN)6]'] },
  'CN-2': { raises: ['K3[Fe(CN)6]'], silent: ['K2[Ni(CN)4]'] },
  'SCN-1': { raises: ['[Co(NCS)4]2-'], silent: ['[Co(NCO)4]2-'] },
  'NC-1': { raises: ['[Cr(CNPh)6]'], silent: ['[Cr(CO)6]'] },
  'CLO-1': { raises: ['[Co(NH3)6](ClO4)3'], silent: ['[Co(NH3)6]Cl3'] },
  'CLO-2': { raises: ['[Cu(en)2](ClO3)2'], silent: ['[Cu(en)2]Cl2'] },
  'N3-1': { raises: ['[Cu(N3)4]2-'], silent: ['[Co(N3)(NH3)5]2+'] },
  'N3-2': { raises: ['[Co(N3)(NH3)5]2+'], silent: ['[Co(NH3)6]3+'] },
  'NO3-1': { raises: ['[Co(NH3)6](NO3)3'], silent: ['[Cr(H2O)6](NO3)3'] },
  'AG-1': { raises: ['[Ag(NH3)2]+'], silent: ['[Cu(NH3)4]2+'] },
  'O2-1': { raises: ['K3[Cr(O2)4]'], silent: ['K2[CrO4]'] },
  'OX-1': { raises: ['KMnO4'], silent: ['K2[MnCl4]'] },
  'CR-VI': { raises: ['K2Cr2O7'], silent: ['K3[Cr(ox)3]'] },
  'NI-II': { raises: ['[Ni(en)3]Cl2'], silent: ['Ni(CO)4'] },
  'CO-II': { raises: ['[CoCl4]2-'], silent: ['[Co(NH3)6]3+'] },
  CD: { raises: ['[CdCl4]2-'], silent: ['[ZnCl4]2-'] },
  HG: { raises: ['[HgI4]2-'], silent: ['[ZnI4]2-'] },
  PB: { raises: ['[Pd(diars)2]2+'], silent: ['[Pd(dppe)2]2+'] },
  OS: { raises: ['[Os(bpy)3]2+'], silent: ['[Ru(bpy)3]2+'] },
  'CO-1': { raises: ['[W(CO)6]'], silent: ['[WCl6]'] },
  'CO-4': { raises: ['Ni(CO)4'], silent: ['[W(CO)6]'] },
  PT: { raises: ['cis-[PtCl2(NH3)2]'], silent: ['[Pt(CN)4]2-'] },
  V: { raises: ['[VO4]3-'], silent: ['[VO(acac)2]'] },
  MN: { raises: ['[MnCl4]2-'], silent: ['[FeCl4]2-'] },
  CU: { raises: ['[CuCl4]2-'], silent: ['[NiCl4]2-'] },
  'F-1': { raises: ['[Ru(bpy)3](PF6)2'], silent: ['[Ru(bpy)3]Cl2'] },
  PR: { raises: ['[NiCl2(PMe3)2]'], silent: ['[NiCl2(PPh3)2]'] },
  RED: { raises: ['[Cr(η6-C6H6)2]'], silent: ['[Cr(acac)3]'] },
  LIGHT: { raises: ['K3[Fe(ox)3]'], silent: ['K3[Cr(ox)3]'] },
  RAD: { raises: ['[TcO4]-'], silent: ['[ReO4]-'] },
  'HAL-1': { raises: ['TiCl4'], silent: ['[TiO(acac)2]'] },
  TF: { raises: ['[Fe(phen)3]2+', { electrolyte: 'HClO4' }], silent: ['[Fe(phen)3]2+', { electrolyte: 'NaCl' }] },
  GRIND: {
    raises: ['[Co(NH3)6](ClO4)3', { technique: 'diffuse reflectance' }],
    silent: ['[Co(NH3)6](ClO4)3', { technique: 'solution absorption' }],
  },
  DUST: {
    raises: ['[Ni(en)3]Cl2', { technique: 'diffuse reflectance' }],
    silent: ['[Cr(en)3]Cl3', { technique: 'diffuse reflectance' }],
  },
  MIX: {
    raises: ['[Co(N3)(NH3)5]2+', { solvent: ['dichloromethane'] }],
    silent: ['[Co(N3)(NH3)5]2+', { solvent: ['water'] }],
  },
  'OX-2': { raises: ['KMnO4', { electrolyte: 'conc. H2SO4' }], silent: ['KMnO4', { electrolyte: '0.005 M H2SO4' }] },
  COLD: { raises: ['[Cr(en)3]3+', { temperature: 77 }], silent: ['[Cr(en)3]3+', { temperature: 298 }] },
  LAMP: {
    raises: ['[Ru(bpy)3]2+', { technique: 'emission' }],
    silent: ['[Ru(bpy)3]2+', { technique: 'solution absorption' }],
  },
  'S-ETH': { raises: ['[Cr(acac)3]', { solvent: ['thf'] }], silent: ['[Cr(acac)3]', { solvent: ['water'] }] },
  'S-CL': { raises: ['[Cr(acac)3]', { solvent: ['CH2Cl2'] }], silent: ['[Cr(acac)3]', { solvent: ['ethanol'] }] },
  'S-DIP': { raises: ['[Cr(acac)3]', { solvent: ['dmf'] }], silent: ['[Cr(acac)3]', { solvent: ['water'] }] },
  'S-OTH': { raises: ['[Cr(acac)3]', { solvent: ['acetonitrile'] }], silent: ['[Cr(acac)3]', { solvent: ['water'] }] },
};

test('every rule has its pair of cases', () => {
  expect(Object.keys(CASES).sort()).toEqual([...new Set(cautionRules.map((r) => r.id))].sort());
});

describe.each(Object.entries(CASES))('%s', (id, { raises, silent }) => {
  test(`is raised by ${raises[0]}`, () => expect(idsOf(raises)).toContain(id));
  test(`is not raised by ${silent[0]}`, () => expect(idsOf(silent)).not.toContain(id));
});

// Each pair of sample and surroundings by itself. Bretherick's Handbook, 8th ed. 2017 (from memory).
test.each([
  ['KMnO4', { solvent: ['acetone'] }],
  ['K4[Fe(CN)6]', { electrolyte: '1 M HCl' }],
  ['[Co(NH3)6]Cl3', { electrolyte: 'NaClO4' }],
  ['[Co(NH3)6]Cl3', { solvent: ['nitromethane'] }],
] as [string, Conditions][])('%s does not go with its surroundings', (formula, conditions) => {
  expect(idsOf([formula, conditions])).toContain('MIX');
  expect(idsOf([formula, { solvent: ['water'] }])).not.toContain('MIX');
});

test('cautions come with the reading, and need nothing but the composition', () => {
  expect(readFormula('[Co(NH3)6](ClO4)3').cautions.map((c) => c.id)).toContain('CLO-1');
});

test('an unsettled oxidation state does not silence what may hold', () => {
  expect(readFormula('[NiCl6]-').centres[0]?.oxidationState).toBeNull();
  expect(readFormula('[NiCl6]-').cautions.map((c) => c.id)).toContain('NI-II');
});

test('no sentence says that anything is safe', () => {
  for (const text of [STANDING_SENTENCE, NO_RULE_MATCHED, ...cautionRules.map((r) => r.sentence)]) {
    expect(text.replace(/safety data sheet/gi, '')).not.toMatch(/\bsafe|harmless|no hazard/i);
  }
  for (const rule of cautionRules) expect(rule.source.length).toBeGreaterThan(2);
});
