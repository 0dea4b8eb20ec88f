import { MAX_LENGTH, type NormalText, normalise } from './normalise.ts';

/** Everyday names of entities and salts, in small letters without blanks, and the formula each stands for. */
const NAMES: Readonly<Record<string, string>> = {
  ferrocene: '[Fe(Cp)2]',
  ferrocenium: '[Fe(Cp)2]+',
  decamethylferrocene: '[Fe(Cp*)2]',
  ruthenocene: '[Ru(Cp)2]',
  osmocene: '[Os(Cp)2]',
  cobaltocene: '[Co(Cp)2]',
  cobaltocenium: '[Co(Cp)2]+',
  nickelocene: '[Ni(Cp)2]',
  chromocene: '[Cr(Cp)2]',
  vanadocene: '[V(Cp)2]',
  manganocene: '[Mn(Cp)2]',
  titanocenedichloride: '[TiCl2(Cp)2]',
  zirconocenedichloride: '[ZrCl2(Cp)2]',
  hafnocenedichloride: '[HfCl2(Cp)2]',
  cisplatin: 'cis-[PtCl2(NH3)2]',
  transplatin: 'trans-[PtCl2(NH3)2]',
  'zeise′ssalt': 'K[PtCl3(C2H4)]·H2O',
  'magnus′greensalt': '[Pt(NH3)4][PtCl4]',
  'reinecke′ssalt': 'NH4trans-[Cr(NCS)4(NH3)2]·H2O',
  'vaska′scomplex': 'trans-[Ir(CO)Cl(PPh3)2]',
  'wilkinson′scatalyst': '[RhCl(PPh3)3]',
  'creutz–taubeion': '[{Ru(NH3)5}2(μ-pyz)]5+',
  prussianblue: 'Fe4[Fe(CN)6]3',
  firpic: '[Ir(dfppy)2(pic)]',
  ferroin: '[Fe(phen)3]2+',
  ferrocyanide: '[Fe(CN)6]4-',
  ferricyanide: '[Fe(CN)6]3-',
  nitroprusside: '[Fe(CN)5(NO)]2-',
  permanganate: '[MnO4]-',
  chromate: '[CrO4]2-',
  dichromate: '[Cr2O7]2-',
};

const known: ReadonlyMap<string, string> = new Map(Object.entries(NAMES).map(([name, f]) => [plainName(name), f]));

function plainName(typed: string): string {
  return typed.toLowerCase().replace(/[\s'’‘′-]|[\u2010-\u2015]/gu, '');
}

/** The formula of an everyday name (`ferrocene`, `Vaska's complex`), each character pointing at the name; else null. */
export function formulaOfName(typed: string): NormalText | null {
  if (typed.length > MAX_LENGTH || !/^[\sA-Za-z]/.test(typed)) return null;
  const formula = known.get(plainName(typed));
  if (formula === undefined) return null;
  const { text } = normalise(formula);
  return { text, at: [...Array.from(text, () => 0), typed.length] };
}
