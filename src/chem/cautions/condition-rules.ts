import { strongOxidant } from './composition-rules.ts';
import type { CautionRule, Facts } from './rule.ts';

const CLP = 'CLP Regulation (EC) 1272/2008, Annex VI (from memory)';
const BRETHERICK = "Bretherick's Handbook of Reactive Chemical Hazards, 8th ed. 2017 (from memory)";
const PRUDENT = 'Prudent Practices in the Laboratory, National Academies 2011 (from memory)';

const CHLORINATED =
  /CH2Cl2|CHCl3|CCl4|DCE|C2H4Cl2|dichloromethane|chloroform|tetrachloromethane|dichloroethane|chlorobenzene/i;
const ETHERS = /diethyl ether|^ether$|Et2O|thf|tetrahydrofuran|dioxane|\bdme\b|2-methyltetrahydrofuran/i;
const DIPOLAR = /dmf|dmac|nmp|dmso|dimethylformamide|dimethylacetamide|methylpyrrolidone|dimethyl ?sulfoxide/i;
const OTHERS =
  /methanol|MeOH|CH3OH|acetonitrile|MeCN|CH3CN|benzene|toluene|pyridine|^py$|CS2|carbon disulfide|nitromethane|MeNO2|CH3NO2/i;
const BURNABLE = /dmso|dmf|acetone|ether|alcohol|anol\b|MeOH|EtOH|dimethyl ?sulfoxide|dimethylformamide|thf/i;
const ACID =
  /H2SO4|sulfuric|HCl|hydrochloric|HNO3|nitric|HClO4|perchloric|triflic|CF3SO3H|HOTf|acetic acid|HBr|acid\b/i;
const CONC_SULFURIC = /(conc|oleum|fuming|98 ?%).*(H2SO4|sulfuric)|(H2SO4|sulfuric).*(conc|98 ?%)/i;
const NITROMETHANE = /nitromethane|MeNO2|CH3NO2/i;

const chlorate = (f: Facts) => f.anywhere('ClO3');
const permanganate = (f: Facts) => f.context.metals.some((m) => m.element === 'Mn' && m.oxidationState === 7);
const chromate = (f: Facts) => f.context.metals.some((m) => m.element === 'Cr' && m.oxidationState === 6);
const explosive = (f: Facts) =>
  (f.anywhere('ClO4') && f.oxidisable) ||
  f.group('N3') ||
  ((f.group('NO3', 'NO2') || f.ion('S2O8')) && f.nitrogenFuel) ||
  (strongOxidant(f) && f.oxidisable);

/** Pairs of what is in the sample and what it meets; the sentence names the pair. */
const MIXTURES: readonly { test: (f: Facts) => boolean; sentence: string }[] = [
  {
    test: (f) => f.anywhere('N3') && f.solvent(CHLORINATED),
    sentence: 'Azide with a chlorinated solvent can form explosive diazidomethane: choose another solvent.',
  },
  {
    test: (f) => strongOxidant(f) && f.solvent(BURNABLE),
    sentence:
      'Strong oxidant with dimethyl sulfoxide, dimethylformamide, acetone, ether or alcohol: may ignite or explode.',
  },
  {
    test: (f) => f.group('CN', 'NC') && f.medium(ACID),
    sentence: 'Cyanide with an acid medium frees hydrogen cyanide.',
  },
  {
    test: (f) => f.nitrogenFuel && /ClO4|perchlorate/i.test(f.context.electrolyte ?? ''),
    sentence: 'Amine complex with a perchlorate electrolyte: an explosive perchlorate may crystallise in the cell.',
  },
  {
    test: (f) => f.solvent(NITROMETHANE) && (f.nitrogenFuel || f.medium(/OH|amine|base/i)),
    sentence: 'Nitromethane with a base or amine forms sensitive explosives.',
  },
];

/** Rules on solvent, medium, technique and temperature. */
export const conditionRules: readonly CautionRule[] = [
  {
    id: 'TF',
    test: (f) => f.medium(/HClO4|perchloric|triflic|CF3SO3H|HOTf/i) || f.medium(CONC_SULFURIC),
    sentence: 'Triflic, perchloric and concentrated acids are corrosive; hot perchloric acid needs a hood of its own.',
    codes: ['H314', 'H271'],
    source: PRUDENT,
  },
  {
    id: 'GRIND',
    test: (f) => f.ground && explosive(f),
    sentence: 'Do not grind or press: this kind of composition may explode by friction.',
    codes: ['GHS01'],
    source: `${BRETHERICK}; common practice`,
  },
  {
    id: 'DUST',
    test: (f) => f.ground && (f.metal('Ni') || f.metal('Co') || chromate(f) || f.element('Os')),
    sentence: 'Never grind nickel, cobalt, chromium(VI) or osmium compounds in the open: dust.',
    codes: ['H350i'],
    source: 'common practice',
  },
  ...MIXTURES.map(({ test, sentence }) => ({
    id: 'MIX',
    test,
    sentence,
    codes: ['as the substances met'],
    source: `${BRETHERICK}; ${PRUDENT}`,
  })),
  {
    id: 'OX-2',
    test: (f) => ((permanganate(f) || chromate(f)) && f.medium(CONC_SULFURIC)) || (chlorate(f) && f.medium(ACID)),
    sentence:
      'Permanganate or chromate with concentrated sulfuric acid, and chlorate with acid, give explosive or very toxic products (Mn2O7, CrO2Cl2, ClO2): do not combine.',
    codes: ['H200 series', 'H330'],
    source: BRETHERICK,
  },
  {
    id: 'COLD',
    test: (f) => f.context.temperature !== undefined && f.context.temperature <= 100,
    sentence:
      'Cryogenic work: sealed cells burst, oxygen condenses, asphyxiation, glass shatters. Vented cell, shield, gloves, room air.',
    codes: [],
    source: PRUDENT,
  },
  {
    id: 'LAMP',
    test: (f) => /emission|circular dichroism|laser|luminescence|fluorescence/i.test(f.context.technique ?? ''),
    sentence: 'Ultraviolet and laser light, ozone, nitrogen purge.',
    codes: [],
    source: 'common practice',
  },
  {
    id: 'S-ETH',
    test: (f) => f.solvent(ETHERS),
    sentence: 'Ethers are very flammable and form peroxides: test before use or evaporation.',
    codes: ['H224', 'H225', 'EUH019'],
    source: CLP,
  },
  {
    id: 'S-CL',
    test: (f) => f.solvent(CHLORINATED),
    sentence:
      'Chlorinated solvents are suspected or known carcinogens; never with strong base and acetone, azide or alkali metal.',
    codes: ['H351', 'H350'],
    source: CLP,
  },
  {
    id: 'S-DIP',
    test: (f) => f.solvent(DIPOLAR),
    sentence:
      'Dimethylformamide and N-methylpyrrolidone are toxic to reproduction; dimethyl sulfoxide carries solutes through the skin.',
    codes: ['H360D'],
    source: CLP,
  },
  {
    id: 'S-OTH',
    test: (f) => f.solvent(OTHERS),
    sentence:
      'Flammable or toxic solvent (methanol, acetonitrile, benzene, toluene, pyridine, carbon disulfide, nitromethane): as its safety data sheet says.',
    codes: ['H225', 'H301', 'H311', 'H331', 'H350'],
    source: CLP,
  },
];
