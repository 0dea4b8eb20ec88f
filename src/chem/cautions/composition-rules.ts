import { type CautionRule, type Facts, isRadioactive } from './rule.ts';

const SDS = 'safety data sheet';
const CLP = 'CLP Regulation (EC) 1272/2008, Annex VI (from memory)';
const BRETHERICK = "Bretherick's Handbook of Reactive Chemical Hazards, 8th ed. 2017 (from memory)";
const PRUDENT = 'Prudent Practices in the Laboratory, National Academies 2011 (from memory)';
const PRACTICE = 'common practice';

const INERT_CYANIDE = ['Fe', 'Co', 'Cr', 'Mo', 'W', 'Ru', 'Os'];
const AMINE_OXIDANTS = ['NO3', 'NO2', 'BrO3', 'S2O8'];

/** Six or eight cyanides and nothing else on an inert centre, and no free cyanide. */
function inertCyanide(f: Facts): boolean {
  const { ligands, metals } = f.context;
  const [only, other] = ligands;
  const inert = metals.length === 1 && INERT_CYANIDE.includes(metals[0]!.element);
  return inert && !other && only?.abbreviation === 'CN' && [6, 8].includes(only.count) && !f.ion('CN');
}

const cyanide = (f: Facts) => f.group('CN', 'NC');
const permanganateLike = (f: Facts) => f.metal('Mn', 7) || f.metal('Cr', 6) || f.metal('Fe', 6);
/** Chromate or dichromate, not any chromium whose state is unknown. */
const chromiumSix = (f: Facts) => f.context.metals.some((m) => m.element === 'Cr' && m.oxidationState === 6);

/** Rules on what the substance is made of. */
export const compositionRules: readonly CautionRule[] = [
  {
    id: 'CN-1',
    test: (f) => cyanide(f) && !inertCyanide(f),
    sentence:
      'Acid, even carbonic acid, can free hydrogen cyanide from cyanides. Keep basic, work in a fume cupboard, not alone.',
    codes: ['H300', 'H310', 'H330', 'EUH032', 'GHS06'],
    source: `${CLP}; ${PRUDENT}`,
  },
  {
    id: 'CN-2',
    test: inertCyanide,
    sentence:
      'Inert hexa- and octacyanidometallates are less toxic, but hot strong acid or ultraviolet light can free hydrogen cyanide.',
    codes: ['EUH032'],
    source: `${CLP}: the group entry leaves out complex cyanides`,
  },
  {
    id: 'SCN-1',
    test: (f) => f.group('SCN', 'NCS', 'SeCN', 'NCSe'),
    sentence:
      'Acid or a strong oxidant can free toxic gas from thiocyanates and selenocyanates (hydrogen cyanide, with selenium also hydrogen selenide).',
    codes: ['H302', 'EUH032'],
    source: `${CLP}; ${BRETHERICK}`,
  },
  {
    id: 'NC-1',
    test: (f) => f.ligand('CNMe', 'CNtBu', 'CNPh'),
    sentence: 'Organic isocyanides are toxic and smell very strongly: fume cupboard.',
    codes: ['H330', 'H331', 'H332'],
    source: SDS,
  },
  {
    id: 'CLO-1',
    test: (f) => f.anywhere('ClO4') && f.oxidisable,
    sentence:
      'Perchlorates with organic ligands, ammines or hydrazine may explode by friction, shock, heat or for no clear cause. Tens of milligrams at most, no scraping, no dry heating; take another anion if one serves. Sensitivity tests do not clear a sample.',
    codes: ['H200 series', 'GHS01'],
    source: `W. R. Robinson, J. Chem. Educ. 62 (1985) 1001; ${BRETHERICK}; ${PRUDENT}`,
  },
  {
    id: 'CLO-2',
    test: (f) => (f.group('ClO3', 'BrO3', 'IO4', 'MnO4') || f.metal('Mn', 7)) && f.oxidisable,
    sentence:
      'Chlorates, bromates, periodates and permanganates with organic ligands, ammonium or ammines may explode or ignite.',
    codes: ['H240 series', 'H272'],
    source: BRETHERICK,
  },
  {
    id: 'N3-1',
    test: (f) => f.group('N3') && (f.element('Pb', 'Ag', 'Hg', 'Cu', 'Cd') || azides(f) >= 3),
    sentence:
      'Azides of lead, silver, mercury, copper and cadmium, and azide-rich compounds, are of the primary explosive class: never isolate dry.',
    codes: ['H200 series', 'GHS01'],
    source: BRETHERICK,
  },
  {
    id: 'N3-2',
    test: (f) => f.anywhere('N3'),
    sentence:
      'Acid frees hydrazoic acid (toxic, explosive) from azides. No chlorinated solvents, no metal spatulas, no copper or lead drains.',
    codes: ['H300', 'H310', 'EUH032'],
    source: `${PRUDENT}; ${BRETHERICK}`,
  },
  {
    id: 'NO3-1',
    test: (f) => f.ion('pic') || ((f.group(...AMINE_OXIDANTS) || chromiumSix(f)) && f.nitrogenFuel),
    sentence:
      'Nitrates, nitrites, dichromates and the like with ammines, amines or hydrazine, and picrates, are energetic: treat as explosive.',
    codes: ['GHS01'],
    source: BRETHERICK,
  },
  {
    id: 'AG-1',
    test: (f) => f.element('Ag', 'Au') && f.ligand('NH3'),
    sentence:
      'Standing ammoniacal silver or gold solutions can deposit explosive solids: make fresh, acidify and discard the same day.',
    codes: ['GHS01'],
    source: BRETHERICK,
  },
  {
    id: 'O2-1',
    test: (f) => f.ligand('O2', 'OOH'),
    sentence: 'Peroxo and superoxo complexes are oxidisers and may detonate when dry: keep cold and dilute.',
    codes: ['H240 series', 'H271', 'H272'],
    source: BRETHERICK,
  },
  {
    id: 'OX-1',
    test: (f) => strongOxidant(f),
    sentence: 'Strong oxidant: keep from organics, alcohols, dimethyl sulfoxide and acetone.',
    codes: ['H271', 'H272', 'GHS03'],
    source: `${CLP}; ${BRETHERICK}`,
  },
  {
    id: 'CR-VI',
    test: chromiumSix,
    sentence: 'Chromium(VI) compounds are carcinogenic, mutagenic, toxic to reproduction, sensitising and oxidising.',
    codes: ['H340', 'H350', 'H360FD', 'H330', 'H301', 'H314', 'H317', 'H334', 'H410'],
    source: `${CLP}; IARC Monographs 100C`,
  },
  {
    id: 'NI-II',
    test: (f) => f.metal('Ni', 2) || f.ion('Ni'),
    sentence:
      'Dust of nickel(II) compounds is carcinogenic when inhaled; sensitises skin and airways; toxic to reproduction.',
    codes: ['H350i', 'H341', 'H360D', 'H372', 'H317', 'H334', 'H410'],
    source: `${CLP}; IARC Monographs 100C`,
  },
  {
    id: 'CO-II',
    test: (f) => f.metal('Co', 2) || f.ion('Co'),
    sentence:
      'Dust of cobalt(II) compounds may cause cancer when inhaled (class 1B); sensitises skin and airways; toxic to reproduction.',
    codes: ['H350i', 'H341', 'H360F', 'H317', 'H334', 'H410'],
    source: CLP,
  },
  {
    id: 'CD',
    test: (f) => f.element('Cd', 'Be'),
    sentence: 'Cadmium and beryllium compounds are carcinogenic and very toxic when inhaled.',
    codes: ['H350', 'H330', 'H372'],
    source: `${CLP}; IARC Monographs 100C`,
  },
  {
    id: 'HG',
    test: (f) => f.element('Hg', 'Tl'),
    sentence:
      'Mercury and thallium compounds are very toxic by all routes and cumulative; organomercury passes through common gloves.',
    codes: ['H300', 'H310', 'H330', 'H373', 'H410'],
    source: `${CLP}, group entries`,
  },
  {
    id: 'PB',
    test: (f) => f.element('Pb', 'As', 'Sb'),
    sentence: 'Lead is toxic to reproduction, arsenic carcinogenic, antimony toxic.',
    codes: ['H360Df', 'H373', 'H350', 'H301'],
    source: CLP,
  },
  {
    id: 'OS',
    test: (f) => f.element('Os') || (f.element('Ru') && f.group('IO4')),
    sentence:
      'Osmium compounds (and ruthenium with periodate) can oxidise to the volatile tetroxide, which harms eyes and lungs and is very toxic: fume cupboard, sealed cuvette.',
    codes: ['H300', 'H310', 'H330', 'H314'],
    source: `${CLP} (OsO4)`,
  },
  {
    id: 'CO-1',
    test: (f) => f.ligand('CO'),
    sentence: 'Carbonyls give off carbon monoxide on heating, light or oxidation: fume cupboard, detector.',
    codes: ['H331', 'H360D', 'H372'],
    source: `${CLP} (CO); ${PRUDENT}`,
  },
  {
    id: 'CO-4',
    test: (f) => volatileCarbonyl(f),
    sentence:
      'Volatile metal carbonyl; nickel carbonyl is very toxic and carcinogenic: not to be made or handled without special provision.',
    codes: ['H330', 'H351', 'H360D', 'H225'],
    source: CLP,
  },
  {
    id: 'PT',
    test: (f) =>
      (f.element('Pt') && f.group('Cl')) ||
      (f.element('Pt', 'Ru') && (f.nitrogenFuel || f.ligand('C6H6', 'p-cym', 'C6Me6'))),
    sentence:
      'Chloroplatinates sensitise the airways; platinum and ruthenium complexes with ammine, amine or arene ligands may be cytotoxic or mutagenic: handle as such.',
    codes: ['H334', 'H317'],
    source: CLP,
  },
  {
    id: 'V',
    test: (f) => f.metal('V', 5),
    sentence: 'Vanadium(V) compounds are toxic and harm the airways.',
    codes: ['H302', 'H361', 'H373'],
    source: CLP,
  },
  {
    id: 'MN',
    test: (f) => f.element('Mn'),
    sentence: 'Dust of manganese compounds harms the nervous system on long exposure.',
    codes: ['H373'],
    source: CLP,
  },
  {
    id: 'CU',
    test: (f) => f.element('Cu'),
    sentence: 'Soluble copper compounds are harmful when swallowed and very toxic to water life.',
    codes: ['H302', 'H410'],
    source: CLP,
  },
  {
    id: 'F-1',
    test: (f) => f.ion('PF6', 'BF4', 'SbF6', 'AsF6', 'SiF6') || (f.ligand('F') && f.element('Ti', 'Zr', 'Nb', 'Ta')),
    sentence:
      'Fluoridoanions can give hydrogen fluoride with water, acid or heat; it attacks glass and quartz. Calcium gluconate at hand.',
    codes: ['H300', 'H310', 'H330', 'H314'],
    source: `${SDS}; ${PRUDENT}`,
  },
  {
    id: 'PR',
    test: (f) =>
      f.ligand(
        'PMe3',
        'PEt3',
        'PBu3',
        'PMe2Ph',
        'PCy3',
        'PH3',
        'dmpe',
        'diars',
        'AsPh3',
        'SMe',
        'SEt',
        'SPh',
        'SMe2',
        'SH',
        'edt',
      ),
    sentence:
      'Free alkyl phosphanes, arsanes, sulfides and thiols are toxic and smell; alkyl phosphanes may ignite in air.',
    codes: ['H330', 'H250'],
    source: SDS,
  },
  {
    id: 'RED',
    test: (f) => stronglyReducing(f),
    sentence:
      'Low oxidation state, hydride or alkyl: air-sensitive, may ignite or give hydrogen. Inert gas, sealed cell.',
    codes: ['H250', 'H260'],
    source: 'D. F. Shriver, M. A. Drezdzon, The Manipulation of Air-Sensitive Compounds, 2nd ed. 1986 (from memory)',
  },
  {
    id: 'LIGHT',
    test: (f) =>
      f.metal('Ag', 1) ||
      f.ion('Ag') ||
      f.ligand('CO', 'NO') ||
      (f.metal('Fe', 3) && f.ligand('ox')) ||
      (f.metal('Co', 3) && f.ligand('I', 'N3', 'NO2')),
    sentence: 'Light-sensitive: amber glass, short exposure, and record it.',
    codes: [],
    source: PRACTICE,
  },
  {
    id: 'RAD',
    test: (f) => Object.keys(f.context.composition).some(isRadioactive),
    sentence: 'Radioactive element: licence and local rules.',
    codes: [],
    source: 'local law',
  },
  {
    id: 'HAL-1',
    test: (f) => waterReactiveHalide(f),
    sentence: 'Water-reactive halide: gives hydrogen halide with moisture. Dry inert gas, sealed cell.',
    codes: ['H314', 'EUH014'],
    source: SDS,
  },
];

function azides(f: Facts): number {
  return f.context.ligands.filter((l) => l.abbreviation === 'N3').reduce((sum, l) => sum + l.count, 0);
}

/** Permanganate, chromate, ferrate, cerium(IV) beside, persulfate, aquacobalt(III). */
export function strongOxidant(f: Facts): boolean {
  const known = f.context.metals.every((m) => m.oxidationState !== null);
  return (
    (known && permanganateLike(f)) ||
    f.ion('S2O8') ||
    (f.ligand('H2O') && known && f.metal('Co', 3) && f.context.ligands.length === 1)
  );
}

function volatileCarbonyl(f: Facts): boolean {
  if (!f.ligand('CO')) return false;
  const { C = 0, O = 0, Fe = 0, Co = 0 } = f.context.composition;
  const only = f.context.ligands.every((l) => l.abbreviation === 'CO');
  return f.element('Ni') || (only && C === O && ((Fe === 1 && C === 5) || (Co === 2 && C === 8)));
}

const REDUCING: Readonly<Record<string, number>> = { Ti: 3, V: 2, Cr: 2, Sc: 2, Zr: 3, Nb: 3, Ta: 3, W: 3, Hf: 3 };

function stronglyReducing(f: Facts): boolean {
  if (f.ligand('H', 'CH3', 'Et', 'BH4') || f.ion('BH4')) return true;
  return f.context.metals.some(
    ({ element, oxidationState: state }) => state !== null && (state <= 0 || state <= (REDUCING[element] ?? 0)),
  );
}

const OXOPHILIC = ['Ti', 'Zr', 'Hf', 'V', 'Nb', 'Ta', 'Mo', 'W'];

/** A high-valent early metal with halides and nothing that shows it has met water or hydrolysis. */
function waterReactiveHalide(f: Facts): boolean {
  if (!f.ligand('Cl', 'Br', 'I') || f.ligand('H2O', 'OH', 'Cp', 'Cp*')) return false;
  return f.context.metals.some(
    (m) => OXOPHILIC.includes(m.element) && m.oxidationState !== null && m.oxidationState >= 4,
  );
}
