import { type Ligand, ligand, ring } from './ligand.ts';

const PPH2 = 'P(c1ccccc1)c1ccccc1';

/** Ligands bound by carbon, phosphorus and arsenic; hapto ligands count one vertex at their centroid. */
export const carbonPhosphorusLigands: readonly Ligand[] = [
  ligand('Cp', 'C5H5', -1, 'C C C C C', 'cyclopentadienyl', '[cH-]1cccc1', 'donor', { synonyms: ['cp'], hapticity: 5 }),
  ligand('Cp*', 'C10H15', -1, 'C C C C C', 'pentamethylcyclopentadienyl', 'C[c-]1c(C)c(C)c(C)c1C', 'donor', {
    synonyms: ['cp*', 'C5Me5', 'C5(CH3)5'],
    hapticity: 5,
  }),
  ligand('C6H6', 'C6H6', 0, 'C C C C C C', 'benzene', 'c1ccccc1', 'acceptor', {
    synonyms: ['bz', 'benzene'],
    hapticity: 6,
  }),
  ligand('p-cym', 'C10H14', 0, 'C C C C C C', 'p-cymene', 'CC(C)c1ccc(C)cc1', 'acceptor', {
    synonyms: ['cym', 'p-cymene', 'cymene'],
    hapticity: 6,
  }),
  ligand('tol', 'C7H8', 0, 'C C C C C C', 'toluene', 'Cc1ccccc1', 'acceptor', {
    synonyms: ['toluene', 'C6H5Me', 'C6H5CH3', 'PhMe'],
    hapticity: 6,
  }),
  ligand('cht', 'C7H8', 0, 'C C C C C C', 'cyclohepta-1,3,5-triene', 'C1C=CC=CC=C1', 'acceptor', {
    synonyms: ['cycloheptatriene'],
    hapticity: 6,
  }),
  ligand('mes', 'C9H12', 0, 'C C C C C C', 'mesitylene', 'Cc1cc(C)cc(C)c1', 'acceptor', {
    synonyms: ['mesitylene', 'C6H3Me3'],
    hapticity: 6,
  }),
  ligand('C6Me6', 'C12H18', 0, 'C C C C C C', 'hexamethylbenzene', 'Cc1c(C)c(C)c(C)c(C)c1C', 'acceptor', {
    synonyms: ['hmb'],
    hapticity: 6,
  }),
  ligand('C2H4', 'C2H4', 0, 'C C', 'ethene', 'C=C', 'acceptor', {
    synonyms: ['H2C=CH2', 'CH2CH2', 'CH2=CH2'],
    hapticity: 2,
  }),
  ligand('dba', 'C17H14O', 0, 'C C', 'dibenzylideneacetone', 'O=C(/C=C/c1ccccc1)/C=C/c1ccccc1', 'acceptor', {
    hapticity: 2,
    canBridge: true,
  }),
  ligand('C3H5', 'C3H5', -1, 'C C C', 'allyl', 'C=C[CH2-]', 'acceptor', { synonyms: ['allyl'], hapticity: 3 }),
  ligand('cod', 'C8H12', 0, 'C C', 'cycloocta-1,5-diene', 'C1CC=CCCC=C1', 'acceptor', {
    synonyms: ['COD', '1,5-cod'],
    source: 'two η2 sites, one vertex each; common practice',
  }),
  ligand('nbd', 'C7H8', 0, 'C C', 'norbornadiene', 'C1=CC2CC1C=C2', 'acceptor', { synonyms: ['NBD'] }),
  ligand('C4H6', 'C4H6', 0, 'C C C C', 'buta-1,3-diene', 'C=CC=C', 'acceptor', {
    synonyms: ['butadiene'],
    hapticity: 4,
  }),
  ligand('CH3', 'CH3', -1, 'C', 'methyl', '[CH3-]', 'none', { synonyms: ['Me'], canBridge: true }),
  ligand('Et', 'C2H5', -1, 'C', 'ethyl', '[CH2-]C', 'none', { synonyms: ['CH2CH3'] }),
  ligand('Ph', 'C6H5', -1, 'C', 'phenyl', '[c-]1ccccc1', 'acceptor'),
  ligand('C2Ph', 'C8H5', -1, 'C', 'phenylethynyl', '[C-]#Cc1ccccc1', 'acceptor', { synonyms: ['CCPh', 'C≡CPh'] }),
  ligand('CNMe', 'C2H3N', 0, 'C', 'methyl isocyanide', 'C[N+]#[C-]', 'acceptor', {
    synonyms: ['CNCH3', 'MeNC', 'CH3NC'],
  }),
  ligand('CNtBu', 'C5H9N', 0, 'C', 'tert-butyl isocyanide', 'CC(C)(C)[N+]#[C-]', 'acceptor', {
    synonyms: ['tBuNC', 'CNBut'],
  }),
  ligand('CNPh', 'C7H5N', 0, 'C', 'phenyl isocyanide', '[C-]#[N+]c1ccccc1', 'acceptor', { synonyms: ['PhNC'] }),
  ligand('ppy', 'C11H8N', -1, 'C N', '2-(pyridin-2-yl)phenyl', '[c-]1ccccc1-c1ccccn1', 'acceptor', {
    synonyms: ['C^N'],
  }),
  ligand(
    'dfppy',
    'C11H6F2N',
    -1,
    'C N',
    '3,5-difluoro-2-(pyridin-2-yl)phenyl',
    '[c-]1cc(F)cc(F)c1-c1ccccn1',
    'acceptor',
    {
      synonyms: ['F2ppy', 'dFppy'],
    },
  ),
  ligand('bzq', 'C13H8N', -1, 'C N', 'benzo[h]quinolin-10-yl', '[c-]1cccc2ccc3cccnc3c12', 'acceptor'),
  ligand('PPh3', 'C18H15P', 0, 'P', 'triphenylphosphane', `c1ccc(cc1)${PPH2}`, 'acceptor', {
    synonyms: ['P(C6H5)3', 'Ph3P', 'tpphos'],
    seriesRank: 20,
    source: 'series: common practice',
  }),
  ligand('PMe3', 'C3H9P', 0, 'P', 'trimethylphosphane', 'CP(C)C', 'acceptor', { synonyms: ['P(CH3)3', 'Me3P'] }),
  ligand('PEt3', 'C6H15P', 0, 'P', 'triethylphosphane', 'CCP(CC)CC', 'acceptor', { synonyms: ['P(C2H5)3'] }),
  ligand('PBu3', 'C12H27P', 0, 'P', 'tributylphosphane', 'CCCCP(CCCC)CCCC', 'acceptor', {
    synonyms: ['PnBu3', 'P(C4H9)3'],
  }),
  ligand('PMe2Ph', 'C8H11P', 0, 'P', 'dimethyl(phenyl)phosphane', 'CP(C)c1ccccc1', 'acceptor', {
    synonyms: ['PPhMe2'],
  }),
  ligand('PCy3', 'C18H33P', 0, 'P', 'tricyclohexylphosphane', 'C1CCC(CC1)P(C1CCCCC1)C1CCCCC1', 'acceptor'),
  ligand('PH3', 'PH3', 0, 'P', 'phosphane', 'P', 'acceptor'),
  ligand('PF3', 'PF3', 0, 'P', 'trifluorophosphane', 'FP(F)F', 'acceptor'),
  ligand('PCl3', 'PCl3', 0, 'P', 'trichlorophosphane', 'ClP(Cl)Cl', 'acceptor'),
  ligand('P(OMe)3', 'C3H9O3P', 0, 'P', 'trimethyl phosphite', 'COP(OC)OC', 'acceptor', { synonyms: ['P(OCH3)3'] }),
  ligand('P(OPh)3', 'C18H15O3P', 0, 'P', 'triphenyl phosphite', 'O(P(Oc1ccccc1)Oc1ccccc1)c1ccccc1', 'acceptor'),
  ligand('dppe', 'C26H24P2', 0, 'P P', '1,2-bis(diphenylphosphanyl)ethane', `C(C${PPH2})${PPH2}`, 'acceptor', {
    synonyms: ['diphos'],
  }),
  ligand('dppm', 'C25H22P2', 0, 'P P', 'bis(diphenylphosphanyl)methane', `C(${PPH2})${PPH2}`, 'acceptor', {
    canBridge: true,
  }),
  ligand('dppp', 'C27H26P2', 0, 'P P', '1,3-bis(diphenylphosphanyl)propane', `C(C${PPH2})C${PPH2}`, 'acceptor'),
  ligand('dmpe', 'C6H16P2', 0, 'P P', '1,2-bis(dimethylphosphanyl)ethane', 'CP(C)CCP(C)C', 'acceptor'),
  ligand(
    'triphos',
    'C41H39P3',
    0,
    'P P P',
    '1,1,1-tris(diphenylphosphanylmethyl)ethane',
    `CC(C${PPH2})(C${PPH2})C${PPH2}`,
    'acceptor',
    {
      bite: ring(3),
      span: 'fac',
    },
  ),
  ligand(
    'IMes',
    'C21H24N2',
    0,
    'C',
    '1,3-dimesitylimidazol-2-ylidene',
    'Cc1cc(C)c(c(C)c1)N1C=CN([C]1)c1c(C)cc(C)cc1C',
    'none',
  ),
  ligand('CNXyl', 'C9H9N', 0, 'C', '2,6-dimethylphenyl isocyanide', '[C-]#[N+]c1c(C)cccc1C', 'acceptor'),
  ligand('diars', 'C10H16As2', 0, 'As As', '1,2-phenylenebis(dimethylarsane)', 'C[As](C)c1ccccc1[As](C)C', 'acceptor', {
    synonyms: ['das'],
  }),
  ligand('AsPh3', 'C18H15As', 0, 'As', 'triphenylarsane', 'c1ccc(cc1)[As](c1ccccc1)c1ccccc1', 'acceptor'),
];
