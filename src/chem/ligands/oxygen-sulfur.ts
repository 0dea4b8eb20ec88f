import { type Ligand, ligand, ring } from './ligand.ts';

const JORGENSEN = 'f: C. K. Jørgensen, Modern Aspects of Ligand Field Theory, 1971, p. 347 (reprinted table)';

/** Organic ligands bound by oxygen or sulfur (aminocarboxylates with them). */
export const oxygenSulfurLigands: readonly Ligand[] = [
  ligand('ox', 'C2O4', -2, 'O O', 'oxalato', '[O-]C(=O)C(=O)[O-]', 'donor', {
    synonyms: ['oxalato', 'O4C2', 'OOCCOO', 'O2CCO2'],
    f: 0.99,
    seriesRank: 10,
    canBridge: true,
    source: JORGENSEN,
  }),
  ligand('mal', 'C3H2O4', -2, 'O O', 'malonato', '[O-]C(=O)CC(=O)[O-]', 'donor', { synonyms: ['malonato'] }),
  ligand('acac', 'C5H7O2', -1, 'O O', 'acetylacetonato', 'CC(=O)[CH-]C(C)=O', 'donor', {
    synonyms: ['acetylacetonato'],
  }),
  ligand('hfac', 'C5HF6O2', -1, 'O O', 'hexafluoroacetylacetonato', 'FC(F)(F)C(=O)[CH-]C(=O)C(F)(F)F', 'donor', {
    synonyms: ['hfacac'],
  }),
  ligand('tfac', 'C5H4F3O2', -1, 'O O', 'trifluoroacetylacetonato', 'CC(=O)[CH-]C(=O)C(F)(F)F', 'donor', {
    synonyms: ['tfacac'],
  }),
  ligand('dpm', 'C11H19O2', -1, 'O O', 'dipivaloylmethanato', 'CC(C)(C)C(=O)[CH-]C(=O)C(C)(C)C', 'donor', {
    synonyms: ['thd', 'tmhd'],
  }),
  ligand('dbm', 'C15H11O2', -1, 'O O', 'dibenzoylmethanato', 'O=C([CH-]C(=O)c1ccccc1)c1ccccc1', 'donor'),
  ligand('OAc', 'C2H3O2', -1, 'O', 'acetato', 'CC(=O)[O-]', 'donor', {
    synonyms: ['CH3COO', 'CH3CO2', 'O2CCH3', 'OOCCH3', 'AcO', 'ac', 'O2CMe', 'MeCO2', 'OCOCH3'],
    denticities: [1, 2],
    canBridge: true,
  }),
  ligand('tfa', 'C2F3O2', -1, 'O', 'trifluoroacetato', '[O-]C(=O)C(F)(F)F', 'donor', {
    synonyms: ['CF3COO', 'CF3CO2', 'O2CCF3'],
    denticities: [1, 2],
    canBridge: true,
  }),
  ligand('HCOO', 'CHO2', -1, 'O', 'formato', '[O-]C=O', 'donor', {
    synonyms: ['HCO2', 'O2CH', 'OOCH'],
    denticities: [1, 2],
    canBridge: true,
  }),
  ligand('OBz', 'C7H5O2', -1, 'O', 'benzoato', '[O-]C(=O)c1ccccc1', 'donor', {
    synonyms: ['C6H5COO', 'PhCOO', 'PhCO2', 'O2CPh'],
    denticities: [1, 2],
    canBridge: true,
  }),
  ligand('OTf', 'CF3SO3', -1, 'O', 'trifluoromethanesulfonato', '[O-]S(=O)(=O)C(F)(F)F', 'donor', {
    synonyms: ['CF3SO3', 'OSO2CF3', 'O3SCF3', 'TfO', 'triflate'],
  }),
  ligand('OMe', 'CH3O', -1, 'O', 'methanolato', 'C[O-]', 'donor', { synonyms: ['OCH3', 'MeO'], canBridge: true }),
  ligand('OEt', 'C2H5O', -1, 'O', 'ethanolato', 'CC[O-]', 'donor', { synonyms: ['OC2H5', 'EtO'], canBridge: true }),
  ligand('OiPr', 'C3H7O', -1, 'O', 'propan-2-olato', 'CC(C)[O-]', 'donor', { synonyms: ['OPri', 'O-iPr'] }),
  ligand('OPh', 'C6H5O', -1, 'O', 'phenolato', '[O-]c1ccccc1', 'donor', { synonyms: ['OC6H5', 'PhO'] }),
  ligand('MeOH', 'CH4O', 0, 'O', 'methanol', 'CO', 'donor', { synonyms: ['CH3OH', 'HOMe', 'HOCH3'] }),
  ligand('EtOH', 'C2H6O', 0, 'O', 'ethanol', 'CCO', 'donor', { synonyms: ['C2H5OH', 'HOEt', 'CH3CH2OH'] }),
  ligand('thf', 'C4H8O', 0, 'O', 'tetrahydrofuran', 'C1CCOC1', 'donor', { synonyms: ['THF'] }),
  ligand('Et2O', 'C4H10O', 0, 'O', 'diethyl ether', 'CCOCC', 'donor', { synonyms: ['OEt2', '(C2H5)2O'] }),
  ligand('dme', 'C4H10O2', 0, 'O O', '1,2-dimethoxyethane', 'COCCOC', 'donor', { synonyms: ['glyme'] }),
  ligand('acetone', 'C3H6O', 0, 'O', 'acetone', 'CC(C)=O', 'donor', { synonyms: ['Me2CO', 'OCMe2', '(CH3)2CO'] }),
  ligand('dmf', 'C3H7NO', 0, 'O', 'N,N-dimethylformamide', 'CN(C)C=O', 'donor', { synonyms: ['DMF'] }),
  ligand('dmso', 'C2H6OS', 0, 'O', 'dimethyl sulfoxide', 'CS(C)=O', 'donor', {
    synonyms: ['DMSO', 'OSMe2', 'Me2SO', '(CH3)2SO', 'OS(CH3)2'],
    otherDonors: ['S'],
  }),
  ligand('ur', 'CH4N2O', 0, 'O', 'urea', 'NC(N)=O', 'donor', { synonyms: ['urea', 'CO(NH2)2', 'OC(NH2)2'] }),
  ligand('PyO', 'C5H5NO', 0, 'O', 'pyridine N-oxide', '[O-][n+]1ccccc1', 'donor', { synonyms: ['pyNO', 'pyO'] }),
  ligand('OPPh3', 'C18H15OP', 0, 'O', 'triphenylphosphane oxide', 'O=P(c1ccccc1)(c1ccccc1)c1ccccc1', 'donor', {
    synonyms: ['Ph3PO'],
  }),
  ligand('cat', 'C6H4O2', -2, 'O O', 'catecholato', '[O-]c1ccccc1[O-]', 'donor', {
    alternativeCharges: [-1, 0],
    redoxActive: true,
  }),
  ligand(
    'dbcat',
    'C14H20O2',
    -2,
    'O O',
    '3,5-di-tert-butylcatecholato',
    'CC(C)(C)c1cc([O-])c([O-])c(c1)C(C)(C)C',
    'donor',
    {
      synonyms: ['3,5-dbcat', 'DBCat'],
      alternativeCharges: [-1, 0],
      redoxActive: true,
    },
  ),
  ligand('tropolonato', 'C7H5O2', -1, 'O O', 'tropolonato', '[O-]c1cccccc1=O', 'donor', { synonyms: ['trop'] }),
  ligand(
    'edta',
    'C10H12N2O8',
    -4,
    'O N N O O O',
    'ethylenediaminetetraacetato',
    '[O-]C(=O)CN(CC(=O)[O-])CCN(CC(=O)[O-])CC(=O)[O-]',
    'none',
    {
      synonyms: ['EDTA'],
      // donors: O, N, N, O of one run and one more acetate arm on each nitrogen
      bite: [
        [0, 1],
        [1, 2],
        [2, 3],
        [1, 4],
        [2, 5],
      ],
      seriesRank: 13,
      source: 'series: common practice',
    },
  ),
  ligand(
    'Hedta',
    'C10H13N2O8',
    -3,
    'O N N O O',
    'hydrogenethylenediaminetetraacetato',
    'OC(=O)CN(CC(=O)[O-])CCN(CC(=O)[O-])CC(=O)[O-]',
    'none',
    {
      bite: [
        [0, 1],
        [1, 2],
        [2, 3],
        [1, 4],
      ],
    },
  ),
  ligand('nta', 'C6H6NO6', -3, 'N O O O', 'nitrilotriacetato', '[O-]C(=O)CN(CC(=O)[O-])CC(=O)[O-]', 'none', {
    bite: [
      [0, 1],
      [0, 2],
      [0, 3],
    ],
  }),
  ligand('ida', 'C4H5NO4', -2, 'O N O', 'iminodiacetato', '[O-]C(=O)CNCC(=O)[O-]', 'none'),
  ligand('gly', 'C2H4NO2', -1, 'N O', 'glycinato', 'NCC(=O)[O-]', 'none', {
    synonyms: ['glyc', 'NH2CH2COO', 'NH2CH2CO2'],
  }),
  ligand('ala', 'C3H6NO2', -1, 'N O', 'alaninato', 'CC(N)C(=O)[O-]', 'none'),
  ligand('SPh', 'C6H5S', -1, 'S', 'benzenethiolato', '[S-]c1ccccc1', 'donor', {
    synonyms: ['SC6H5', 'PhS'],
    canBridge: true,
  }),
  ligand('SMe', 'CH3S', -1, 'S', 'methanethiolato', 'C[S-]', 'donor', { synonyms: ['SCH3', 'MeS'], canBridge: true }),
  ligand('SEt', 'C2H5S', -1, 'S', 'ethanethiolato', 'CC[S-]', 'donor', { synonyms: ['SC2H5', 'EtS'], canBridge: true }),
  ligand('SMe2', 'C2H6S', 0, 'S', 'dimethyl sulfide', 'CSC', 'none', { synonyms: ['Me2S', 'dms'] }),
  ligand('9aneS3', 'C6H12S3', 0, 'S S S', '1,4,7-trithiacyclononane', 'C1CSCCSCCS1', 'none', {
    synonyms: ['[9]aneS3', 'ttcn'],
    bite: ring(3),
    span: 'fac',
  }),
  ligand('tu', 'CH4N2S', 0, 'S', 'thiourea', 'NC(N)=S', 'donor', { synonyms: ['thiourea', 'CS(NH2)2', 'SC(NH2)2'] }),
  ligand('dtc', 'C5H10NS2', -1, 'S S', 'diethyldithiocarbamato', 'CCN(CC)C(=S)[S-]', 'donor', {
    synonyms: ['Et2dtc', 'S2CNEt2', 'Et2NCS2', 'dedtc'],
  }),
  ligand('Me2dtc', 'C3H6NS2', -1, 'S S', 'dimethyldithiocarbamato', 'CN(C)C(=S)[S-]', 'donor', {
    synonyms: ['S2CNMe2'],
  }),
  ligand('exan', 'C3H5OS2', -1, 'S S', 'O-ethyl dithiocarbonato', 'CCOC(=S)[S-]', 'donor', {
    synonyms: ['etxan', 'S2COEt'],
  }),
  ligand('mnt', 'C4N2S2', -2, 'S S', 'maleonitriledithiolato', '[S-]/C(C#N)=C(/[S-])C#N', 'donor', {
    synonyms: ['S2C2(CN)2'],
    alternativeCharges: [-1],
    redoxActive: true,
  }),
  ligand('bdt', 'C6H4S2', -2, 'S S', 'benzene-1,2-dithiolato', '[S-]c1ccccc1[S-]', 'donor', {
    alternativeCharges: [-1],
    redoxActive: true,
  }),
  ligand('edt', 'C2H4S2', -2, 'S S', 'ethane-1,2-dithiolato', '[S-]CC[S-]', 'donor'),
  ligand('dmit', 'C3S5', -2, 'S S', '2-thioxo-1,3-dithiole-4,5-dithiolato', '[S-]C1=C([S-])SC(=S)S1', 'donor', {
    alternativeCharges: [-1],
    redoxActive: true,
  }),
];
