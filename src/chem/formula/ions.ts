/** Free ions of salts. The charge of each is fixed; the spellings are those read, the first is written. */
export interface Ion {
  /** Symbol without charge, as written in a salt: `SO4`, `NBu4`. */
  symbol: string;
  charge: number;
  /** Formula that gives the composition; brackets allowed. */
  formula: string;
  synonyms: readonly string[];
  /** Never found in a coordination sphere of an unbracketed formula. */
  outer: boolean;
}

function ion(symbol: string, charge: number, synonyms: readonly string[] = [], formula = symbol, outer = false): Ion {
  return { symbol, charge, formula, synonyms, outer };
}

const simpleCations = (charge: number, symbols: string) => symbols.split(' ').map((s) => ion(s, charge));

/** Cations that stand beside a complex anion. */
export const cations: readonly Ion[] = [
  ...simpleCations(1, 'Li Na K Rb Cs Tl H'),
  ...simpleCations(2, 'Be Mg Ca Sr Ba Pb'),
  ...simpleCations(3, 'Al Ga In Bi La Ce Pr Nd Sm Eu Gd Tb Dy Ho Er Tm Yb Lu'),
  ion('H3O', 1, ['OH3']),
  ion('NH4', 1),
  ion('N2H5', 1),
  ion('NMe4', 1, ['N(CH3)4', 'Me4N', 'TMA'], 'C4H12N'),
  ion('NEt4', 1, ['N(C2H5)4', 'Et4N', 'TEA'], 'C8H20N'),
  ion('NPr4', 1, ['NnPr4', 'Pr4N'], 'C12H28N'),
  ion('NBu4', 1, ['TBA', 'NnBu4', 'nBu4N', 'Bu4N', 'N(C4H9)4', 'N(n-Bu)4', 'n-Bu4N', 'tba'], 'C16H36N'),
  ion('NEt3H', 1, ['HNEt3', 'Et3NH'], 'C6H16N'),
  ion('NH2Me2', 1, ['NMe2H2', 'Me2NH2'], 'C2H8N'),
  ion('PPh4', 1, ['Ph4P', 'P(C6H5)4'], 'C24H20P'),
  ion('AsPh4', 1, ['Ph4As', 'As(C6H5)4'], 'C24H20As'),
  ion('PPN', 1, ['ppn'], 'C36H30NP2'),
  ion('Hpy', 1, ['pyH', 'C5H5NH'], 'C5H6N'),
  ion('enH2', 2, ['H2en'], 'C2H10N2'),
];

/** Anions that stand beside a complex cation. */
export const anions: readonly Ion[] = [
  ...['F', 'Cl', 'Br', 'I', 'OH', 'NO2', 'N3', 'CN', 'SCN', 'NCS', 'HCO3', 'H2PO4', 'SeCN'].map((s) => ion(s, -1)),
  ion('NO3', -1, [], 'NO3', true),
  ion('I3', -1),
  ion('Br3', -1),
  ion('HSO4', -1, [], 'HSO4', true),
  ion('ClO4', -1, ['O4Cl'], 'ClO4', true),
  ion('ClO3', -1, [], 'ClO3', true),
  ion('BrO3', -1, [], 'BrO3', true),
  ion('IO4', -1, [], 'IO4', true),
  ion('BF4', -1, ['F4B'], 'BF4', true),
  ion('PF6', -1, ['F6P'], 'PF6', true),
  ion('AsF6', -1, [], 'AsF6', true),
  ion('SbF6', -1, [], 'SbF6', true),
  ion('BPh4', -1, ['B(C6H5)4', 'Ph4B'], 'C24H20B', true),
  ion('BArF', -1, ['BArF4', 'BArF24'], 'C32H12BF24', true),
  ion('OTf', -1, ['CF3SO3', 'SO3CF3', 'O3SCF3', 'TfO', 'OSO2CF3', 'triflate'], 'CF3SO3', true),
  ion('NTf2', -1, ['Tf2N', 'N(SO2CF3)2'], 'C2F6NO4S2', true),
  ion('OTs', -1, ['tos', 'TsO'], 'C7H7O3S', true),
  ion('OAc', -1, ['CH3COO', 'CH3CO2', 'O2CCH3', 'OOCCH3', 'AcO', 'ac'], 'C2H3O2'),
  ion('tfa', -1, ['CF3COO', 'CF3CO2', 'O2CCF3'], 'C2F3O2'),
  ion('HCOO', -1, ['HCO2'], 'CHO2'),
  ion('pic', -1, ['picrate'], 'C6H2N3O7'),
  ion('BH4', -1),
  ion('SO4', -2, ['O4S'], 'SO4', true),
  ion('SeO4', -2, [], 'SeO4', true),
  ion('SO3', -2),
  ion('S2O3', -2),
  ion('S2O6', -2, [], 'S2O6', true),
  ion('S2O8', -2, [], 'S2O8', true),
  ion('CO3', -2),
  ion('ox', -2, ['C2O4'], 'C2O4'),
  ion('SiF6', -2, [], 'SiF6', true),
  ion('HPO4', -2, [], 'HPO4', true),
  ion('PO4', -3, [], 'PO4', true),
];

/** Oxoanions of d-block metals: entities of their own, whatever stands beside them. */
export const metalOxoanions: Readonly<Record<string, number>> = {
  MnO4: -1,
  ReO4: -1,
  TcO4: -1,
  CrO4: -2,
  Cr2O7: -2,
  MoO4: -2,
  WO4: -2,
  FeO4: -2,
  VO4: -3,
  VO3: -1,
};

/** Neutral molecules met as solvates: spellings, the first written; then the formula. */
export const solvents: readonly { symbol: string; synonyms: readonly string[]; formula: string }[] = [
  { symbol: 'H2O', synonyms: ['OH2', 'aq', 'HOH'], formula: 'H2O' },
  { symbol: 'MeOH', synonyms: ['CH3OH', 'CH4O'], formula: 'CH4O' },
  { symbol: 'EtOH', synonyms: ['C2H5OH', 'CH3CH2OH', 'C2H6O'], formula: 'C2H6O' },
  { symbol: 'MeCN', synonyms: ['CH3CN', 'NCMe', 'NCCH3', 'C2H3N'], formula: 'C2H3N' },
  { symbol: 'CH2Cl2', synonyms: ['DCM', 'dcm'], formula: 'CH2Cl2' },
  { symbol: 'CHCl3', synonyms: [], formula: 'CHCl3' },
  { symbol: 'thf', synonyms: ['THF', 'C4H8O'], formula: 'C4H8O' },
  { symbol: 'dmf', synonyms: ['DMF', 'C3H7NO'], formula: 'C3H7NO' },
  { symbol: 'dmso', synonyms: ['DMSO', '(CH3)2SO', 'Me2SO', 'C2H6OS'], formula: 'C2H6OS' },
  { symbol: 'acetone', synonyms: ['(CH3)2CO', 'Me2CO', 'C3H6O'], formula: 'C3H6O' },
  { symbol: 'Et2O', synonyms: ['(C2H5)2O', 'OEt2', 'C4H10O'], formula: 'C4H10O' },
  { symbol: 'toluene', synonyms: ['C7H8', 'PhMe', 'tol'], formula: 'C7H8' },
  { symbol: 'C6H6', synonyms: ['benzene'], formula: 'C6H6' },
  { symbol: 'C6H14', synonyms: ['hexane'], formula: 'C6H14' },
  { symbol: 'C5H12', synonyms: ['pentane'], formula: 'C5H12' },
  { symbol: 'py', synonyms: ['C5H5N'], formula: 'C5H5N' },
  { symbol: 'MeNO2', synonyms: ['CH3NO2'], formula: 'CH3NO2' },
];
