import { type Ligand, ligand, ring } from './ligand.ts';

const JORGENSEN = 'f: C. K. Jørgensen, Modern Aspects of Ligand Field Theory, 1971, p. 347 (reprinted table)';
const SERIES = 'series: common practice';

/** Ligands bound by nitrogen alone, and Schiff bases. Names and abbreviations: Red Book 2005, table VII (from memory). */
export const nitrogenLigands: readonly Ligand[] = [
  ligand('en', 'C2H8N2', 0, 'N N', 'ethane-1,2-diamine', 'NCCN', 'none', {
    synonyms: ['NH2CH2CH2NH2', 'H2NCH2CH2NH2', 'NH2C2H4NH2', 'H2NC2H4NH2'],
    f: 1.28,
    seriesRank: 16,
    source: JORGENSEN,
  }),
  ligand('pn', 'C3H10N2', 0, 'N N', 'propane-1,2-diamine', 'CC(N)CN', 'none'),
  ligand('tn', 'C3H10N2', 0, 'N N', 'propane-1,3-diamine', 'NCCCN', 'none', { synonyms: ['dap'] }),
  ligand('chxn', 'C6H14N2', 0, 'N N', 'cyclohexane-1,2-diamine', 'NC1CCCCC1N', 'none', { synonyms: ['dach'] }),
  ligand('tmeda', 'C6H16N2', 0, 'N N', 'N,N,N′,N′-tetramethylethane-1,2-diamine', 'CN(C)CCN(C)C', 'none', {
    synonyms: ['TMEDA', 'tmen'],
  }),
  ligand('dien', 'C4H13N3', 0, 'N N N', 'N-(2-aminoethyl)ethane-1,2-diamine', 'NCCNCCN', 'none', {
    synonyms: ['DIEN'],
  }),
  ligand('trien', 'C6H18N4', 0, 'N N N N', 'N,N′-bis(2-aminoethyl)ethane-1,2-diamine', 'NCCNCCNCCN', 'none', {
    synonyms: ['TRIEN'],
  }),
  ligand('tren', 'C6H18N4', 0, 'N N N N', 'tris(2-aminoethyl)amine', 'NCCN(CCN)CCN', 'none', {
    bite: [
      [0, 1],
      [0, 2],
      [0, 3],
    ],
  }),
  ligand('cyclam', 'C10H24N4', 0, 'N N N N', '1,4,8,11-tetraazacyclotetradecane', 'C1CNCCNCCCNCCNC1', 'none', {
    bite: ring(4),
  }),
  ligand('cyclen', 'C8H20N4', 0, 'N N N N', '1,4,7,10-tetraazacyclododecane', 'C1CNCCNCCNCCN1', 'none', {
    bite: ring(4),
  }),
  ligand('tacn', 'C6H15N3', 0, 'N N N', '1,4,7-triazacyclononane', 'C1CNCCNCCN1', 'none', {
    synonyms: ['9aneN3', '[9]aneN3'],
    bite: ring(3),
    span: 'fac',
  }),
  ligand('sep', 'C12H30N8', 0, 'N N N N N N', 'sepulchrate', 'C1CNCN2CNCCNCN(CN1)CNCCNC2', 'none', {
    synonyms: ['sepulchrate'],
    bite: [
      [0, 1],
      [2, 3],
      [4, 5],
      [0, 2],
      [2, 4],
      [0, 4],
      [1, 3],
      [3, 5],
      [1, 5],
    ],
  }),
  ligand('py', 'C5H5N', 0, 'N', 'pyridine', 'c1ccncc1', 'acceptor', {
    synonyms: ['NC5H5', 'pyridine'],
    seriesRank: 14,
    source: SERIES,
  }),
  ligand('pyz', 'C4H4N2', 0, 'N', 'pyrazine', 'c1cnccn1', 'acceptor', {
    synonyms: ['pz', 'pyrazine'],
    canBridge: true,
  }),
  // Written out, since pz stands for pyrazine as well
  ligand('pyrazolato', 'C3H3N2', -1, 'N', 'pyrazolato', 'c1cn[n-]c1', 'donor', {
    synonyms: ['pyrazolate'],
    canBridge: true,
  }),
  ligand('Hpz', 'C3H4N2', 0, 'N', '1H-pyrazole', 'c1cn[nH]c1', 'acceptor', { synonyms: ['pzH'] }),
  ligand('Htrz', 'C2H3N3', 0, 'N', '4H-1,2,4-triazole', 'c1nnc[nH]1', 'acceptor', {
    synonyms: ['trzH'],
    canBridge: true,
  }),
  ligand('trz', 'C2H2N3', -1, 'N', '1,2,4-triazolato', 'c1nc[n-]n1', 'donor', { canBridge: true }),
  ligand('NH2trz', 'C2H4N4', 0, 'N', '4-amino-4H-1,2,4-triazole', 'Nn1cnnc1', 'acceptor', { canBridge: true }),
  ligand('ptz', 'C4H8N4', 0, 'N', '1-propyl-1H-tetrazole', 'CCCn1cnnn1', 'acceptor'),
  ligand('bpe', 'C12H10N2', 0, 'N', '1,2-di(pyridin-4-yl)ethene', 'C(=C/c1ccncc1)\\c1ccncc1', 'acceptor', {
    canBridge: true,
  }),
  ligand('dca', 'C2N3', -1, 'N', 'dicyanamido', 'N#C[N-]C#N', 'donor', { synonyms: ['N(CN)2'], canBridge: true }),
  ligand('Him', 'C3H4N2', 0, 'N', '1H-imidazole', 'c1c[nH]cn1', 'donor', { synonyms: ['imH', 'im', 'imidazole'] }),
  ligand('imidazolato', 'C3H3N2', -1, 'N', 'imidazolato', 'c1c[n-]cn1', 'donor', {
    synonyms: ['imidazolate'],
    canBridge: true,
  }),
  ligand('Meim', 'C4H6N2', 0, 'N', '1-methyl-1H-imidazole', 'Cn1ccnc1', 'donor', {
    synonyms: ['1-MeIm', 'N-MeIm', 'mim'],
  }),
  ligand('4,4′-bpy', 'C10H8N2', 0, 'N', '4,4′-bipyridine', 'c1cc(ccn1)-c1ccncc1', 'acceptor', {
    synonyms: ["4,4'-bpy", "4,4'-bipy", '4,4′-bipy', 'bpy44'],
    canBridge: true,
  }),
  ligand('isn', 'C6H6N2O', 0, 'N', 'isonicotinamide', 'NC(=O)c1ccncc1', 'acceptor', { synonyms: ['isonicotinamide'] }),
  ligand('MeCN', 'C2H3N', 0, 'N', 'acetonitrile', 'CC#N', 'acceptor', {
    synonyms: ['CH3CN', 'NCMe', 'NCCH3', 'acn', 'ACN'],
    f: 1.22,
    seriesRank: 13,
    source: JORGENSEN,
  }),
  ligand('PhCN', 'C7H5N', 0, 'N', 'benzonitrile', 'N#Cc1ccccc1', 'acceptor', {
    synonyms: ['NCPh', 'C6H5CN', 'NCC6H5'],
  }),
  ligand('NMe3', 'C3H9N', 0, 'N', 'trimethylamine', 'CN(C)C', 'none', { synonyms: ['N(CH3)3', 'Me3N'] }),
  ligand('NH2Me', 'CH5N', 0, 'N', 'methanamine', 'CN', 'none', { synonyms: ['MeNH2', 'CH3NH2', 'NH2CH3'] }),
  ligand('NEt3', 'C6H15N', 0, 'N', 'triethylamine', 'CCN(CC)CC', 'none', { synonyms: ['Et3N'] }),
  ligand('bpy', 'C10H8N2', 0, 'N N', '2,2′-bipyridine', 'c1ccnc(c1)-c1ccccn1', 'acceptor', {
    synonyms: ['bipy', 'bipyridine', "2,2'-bpy", "2,2'-bipy", '2,2′-bpy', '2,2′-bipy'],
    f: 1.33,
    seriesRank: 17,
    source: JORGENSEN,
  }),
  ligand('dmbpy', 'C12H12N2', 0, 'N N', '4,4′-dimethyl-2,2′-bipyridine', 'Cc1ccnc(c1)-c1cc(C)ccn1', 'acceptor', {
    synonyms: ['dmb', 'Me2bpy'],
  }),
  ligand(
    'dtbbpy',
    'C18H24N2',
    0,
    'N N',
    '4,4′-di-tert-butyl-2,2′-bipyridine',
    'CC(C)(C)c1ccnc(c1)-c1cc(ccn1)C(C)(C)C',
    'acceptor',
    {
      synonyms: ['dtbpy', 'tBu2bpy'],
    },
  ),
  ligand(
    'dcbpy',
    'C12H6N2O4',
    -2,
    'N N',
    '2,2′-bipyridine-4,4′-dicarboxylato',
    '[O-]C(=O)c1ccnc(c1)-c1cc(ccn1)C(=O)[O-]',
    'acceptor',
  ),
  ligand(
    'H2dcbpy',
    'C12H8N2O4',
    0,
    'N N',
    '2,2′-bipyridine-4,4′-dicarboxylic acid',
    'OC(=O)c1ccnc(c1)-c1cc(ccn1)C(=O)O',
    'acceptor',
    {
      synonyms: ['dcbpyH2'],
    },
  ),
  ligand('phen', 'C12H8N2', 0, 'N N', '1,10-phenanthroline', 'c1cnc2c(c1)ccc1cccnc12', 'acceptor', {
    synonyms: ['o-phen', 'phenanthroline'],
    seriesRank: 18,
    source: SERIES,
  }),
  ligand('dmp', 'C14H12N2', 0, 'N N', '2,9-dimethyl-1,10-phenanthroline', 'Cc1ccc2ccc3ccc(C)nc3c2n1', 'acceptor', {
    synonyms: ['dmphen', 'neocuproine'],
  }),
  ligand(
    'dpphen',
    'C24H16N2',
    0,
    'N N',
    '4,7-diphenyl-1,10-phenanthroline',
    'c1ccc(cc1)-c1ccnc2c1ccc1c(ccnc12)-c1ccccc1',
    'acceptor',
    {
      synonyms: ['dip', 'bathophen', 'bphen'],
    },
  ),
  ligand(
    'dppz',
    'C18H10N4',
    0,
    'N N',
    'dipyrido[3,2-a:2′,3′-c]phenazine',
    'c1ccc2nc3c4cccnc4c4ncccc4c3nc2c1',
    'acceptor',
  ),
  ligand('tap', 'C10H6N4', 0, 'N N', '1,4,5,8-tetraazaphenanthrene', 'c1cnc2c(n1)ccc1nccnc12', 'acceptor', {
    synonyms: ['TAP'],
  }),
  ligand('bpym', 'C8H6N4', 0, 'N N', '2,2′-bipyrimidine', 'c1cnc(nc1)-c1ncccn1', 'acceptor', { canBridge: true }),
  ligand(
    'phendione',
    'C12H6N2O2',
    0,
    'N N',
    '1,10-phenanthroline-5,6-dione',
    'O=C1C(=O)c2cccnc2-c2ncccc21',
    'acceptor',
    {
      redoxActive: true,
    },
  ),
  ligand(
    'tppz',
    'C24H16N6',
    0,
    'N N N',
    'tetra(pyridin-2-yl)pyrazine',
    'c1ccnc(c1)-c1nc(-c2ccccn2)c(-c2ccccn2)nc1-c1ccccn1',
    'acceptor',
    { canBridge: true, span: 'mer' },
  ),
  ligand('bpa', 'C12H13N3', 0, 'N N N', 'bis(pyridin-2-ylmethyl)amine', 'C(NCc1ccccn1)c1ccccn1', 'acceptor'),
  ligand(
    'tpa',
    'C18H18N4',
    0,
    'N N N N',
    'tris(pyridin-2-ylmethyl)amine',
    'C(N(Cc1ccccn1)Cc1ccccn1)c1ccccn1',
    'acceptor',
    {
      synonyms: ['tmpa', 'TPA'],
      bite: [
        [0, 1],
        [0, 2],
        [0, 3],
      ],
    },
  ),
  ligand('Me6tren', 'C12H30N4', 0, 'N N N N', 'tris(2-dimethylaminoethyl)amine', 'CN(C)CCN(CCN(C)C)CCN(C)C', 'none', {
    bite: [
      [0, 1],
      [0, 2],
      [0, 3],
    ],
  }),
  ligand('Me3tacn', 'C9H21N3', 0, 'N N N', '1,4,7-trimethyl-1,4,7-triazacyclononane', 'CN1CCN(C)CCN(C)CC1', 'none', {
    bite: ring(3),
    span: 'fac',
  }),
  ligand('tmc', 'C14H32N4', 0, 'N N N N', 'tetramethylcyclam', 'CN1CCCN(C)CCN(C)CCCN(C)CC1', 'none', {
    synonyms: ['Me4cyclam', 'TMC'],
    bite: ring(4),
  }),
  ligand('bpz', 'C8H6N4', 0, 'N N', '2,2′-bipyrazine', 'c1cnc(cn1)-c1cnccn1', 'acceptor'),
  ligand('tpy', 'C15H11N3', 0, 'N N N', '2,2′:6′,2″-terpyridine', 'c1ccnc(c1)-c1cccc(n1)-c1ccccn1', 'acceptor', {
    synonyms: ['terpy', 'trpy', 'terpyridine'],
    span: 'mer',
  }),
  ligand('bpp', 'C11H9N5', 0, 'N N N', '2,6-di(pyrazol-1-yl)pyridine', 'c1cnn(c1)-c1cccc(n1)-n1cccn1', 'acceptor', {
    span: 'mer',
  }),
  ligand('pic', 'C6H4NO2', -1, 'N O', 'picolinato', '[O-]C(=O)c1ccccn1', 'acceptor', { synonyms: ['picolinato'] }),
  ligand('dipic', 'C7H3NO4', -2, 'O N O', 'dipicolinato', '[O-]C(=O)c1cccc(n1)C(=O)[O-]', 'acceptor', {
    synonyms: ['pdc'],
    span: 'mer',
  }),
  ligand('q', 'C9H6NO', -1, 'N O', 'quinolin-8-olato', '[O-]c1cccc2cccnc12', 'acceptor', {
    synonyms: ['quin', 'oxine'],
  }),
  ligand('dmg', 'C4H6N2O2', -2, 'N N', 'butane-2,3-dione dioximato', 'CC(=N[O-])C(C)=N[O-]', 'acceptor'),
  ligand('Hdmg', 'C4H7N2O2', -1, 'N N', 'hydrogen butane-2,3-dione dioximato', 'CC(=NO)C(C)=N[O-]', 'acceptor', {
    synonyms: ['dmgH', 'HDMG'],
  }),
  ligand('biguanide', 'C2H7N5', 0, 'N N', 'biguanide', 'NC(=N)NC(N)=N', 'none', { synonyms: ['bigH'] }),
  ligand('Tp', 'C9H10BN6', -1, 'N N N', 'hydrotris(pyrazol-1-yl)borato', '[BH-](n1cccn1)(n1cccn1)n1cccn1', 'none', {
    synonyms: ['HBpz3', 'HB(pz)3'],
    bite: ring(3),
    span: 'fac',
  }),
  ligand(
    'salen',
    'C16H14N2O2',
    -2,
    'O N N O',
    'N,N′-bis(salicylidene)ethylenediaminato',
    '[O-]c1ccccc1C=NCCN=Cc1ccccc1[O-]',
    'donor',
    { planar: true },
  ),
  ligand(
    'salophen',
    'C20H14N2O2',
    -2,
    'O N N O',
    'N,N′-bis(salicylidene)-1,2-phenylenediaminato',
    '[O-]c1ccccc1C=Nc1ccccc1N=Cc1ccccc1[O-]',
    'donor',
    {
      synonyms: ['salphen'],
      planar: true,
    },
  ),
  ligand('sal', 'C7H5O2', -1, 'O O', 'salicylaldehydato', '[O-]c1ccccc1C=O', 'donor'),
  ligand(
    'TPP',
    'C44H28N4',
    -2,
    'N N N N',
    '5,10,15,20-tetraphenylporphyrinato',
    '[n-]1c2ccc1c(-c1ccccc1)c1ccc(n1)c(-c1ccccc1)c1ccc([n-]1)c(-c1ccccc1)c1ccc(n1)c2-c1ccccc1',
    'acceptor',
    {
      synonyms: ['tpp'],
      bite: ring(4),
      planar: true,
    },
  ),
  ligand(
    'OEP',
    'C36H44N4',
    -2,
    'N N N N',
    'octaethylporphyrinato',
    'CCc1c(CC)c2cc3[n-]c(cc4nc(cc5[n-]c(cc1n2)c(CC)c5CC)c(CC)c4CC)c(CC)c3CC',
    'acceptor',
    {
      synonyms: ['oep'],
      bite: ring(4),
      planar: true,
    },
  ),
  ligand(
    'pc',
    'C32H16N8',
    -2,
    'N N N N',
    'phthalocyaninato',
    '[n-]1c2nc3nc(nc4[n-]c(nc5nc(nc1c1ccccc21)c1ccccc51)c1ccccc41)c1ccccc31',
    'acceptor',
    {
      synonyms: ['Pc'],
      bite: ring(4),
      planar: true,
    },
  ),
];
