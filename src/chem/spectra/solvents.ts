/** A solvent and the wavelength in nm below which it is not transparent (A = 1 in 1 cm, against water or air). */
export interface Solvent {
  name: string;
  cutoffNm: number;
  synonyms: readonly string[];
}

/**
 * Cut-offs as handbooks collect them (Burdick & Jackson High Purity Solvent Guide 1984, in the CRC Handbook; from
 * memory). Tables differ by some 5 nm with grade and stabiliser.
 */
export const solvents: readonly Solvent[] = [
  { name: 'water', cutoffNm: 190, synonyms: ['H2O', 'aqueous', 'aq', 'aqueous solution'] },
  { name: 'deuterium oxide', cutoffNm: 190, synonyms: ['D2O', 'heavy water'] },
  { name: 'acetonitrile', cutoffNm: 190, synonyms: ['MeCN', 'CH3CN', 'ACN', 'methyl cyanide'] },
  { name: 'pentane', cutoffNm: 190, synonyms: ['n-pentane'] },
  { name: 'hexane', cutoffNm: 195, synonyms: ['n-hexane', 'hexanes'] },
  { name: 'cyclopentane', cutoffNm: 198, synonyms: [] },
  { name: 'cyclohexane', cutoffNm: 200, synonyms: ['C6H12'] },
  { name: 'heptane', cutoffNm: 200, synonyms: ['n-heptane'] },
  { name: 'methanol', cutoffNm: 205, synonyms: ['MeOH', 'CH3OH', 'methyl alcohol'] },
  { name: '2-propanol', cutoffNm: 205, synonyms: ['isopropanol', 'propan-2-ol', 'iPrOH', 'isopropyl alcohol'] },
  { name: 'ethanol', cutoffNm: 210, synonyms: ['EtOH', 'C2H5OH', 'ethyl alcohol'] },
  { name: '1-propanol', cutoffNm: 210, synonyms: ['n-propanol', 'propan-1-ol', 'nPrOH'] },
  { name: 'tert-butyl methyl ether', cutoffNm: 210, synonyms: ['MTBE', 'methyl tert-butyl ether', 't-BuOMe'] },
  { name: '2-methoxyethanol', cutoffNm: 210, synonyms: ['methyl cellosolve'] },
  { name: 'tetrahydrofuran', cutoffNm: 212, synonyms: ['THF', 'oxolane'] },
  { name: 'diethyl ether', cutoffNm: 215, synonyms: ['Et2O', 'ether', 'ethoxyethane'] },
  { name: '1,4-dioxane', cutoffNm: 215, synonyms: ['dioxane', 'p-dioxane'] },
  { name: '1-butanol', cutoffNm: 215, synonyms: ['n-butanol', 'butan-1-ol', 'nBuOH'] },
  { name: '2,2,4-trimethylpentane', cutoffNm: 215, synonyms: ['isooctane', 'iso-octane'] },
  { name: '1,2-dimethoxyethane', cutoffNm: 220, synonyms: ['DME', 'glyme', 'monoglyme'] },
  { name: 'propylene carbonate', cutoffNm: 220, synonyms: ['PC', '4-methyl-1,3-dioxolan-2-one'] },
  { name: '1,2-dichloroethane', cutoffNm: 228, synonyms: ['DCE', 'ethylene dichloride', 'ClCH2CH2Cl'] },
  { name: 'dichloromethane', cutoffNm: 233, synonyms: ['DCM', 'CH2Cl2', 'methylene chloride'] },
  { name: 'chloroform', cutoffNm: 245, synonyms: ['CHCl3', 'trichloromethane'] },
  { name: 'ethyl acetate', cutoffNm: 256, synonyms: ['EtOAc', 'AcOEt', 'ethyl ethanoate'] },
  { name: 'acetic acid', cutoffNm: 260, synonyms: ['AcOH', 'CH3COOH', 'ethanoic acid', 'glacial acetic acid'] },
  { name: 'carbon tetrachloride', cutoffNm: 265, synonyms: ['CCl4', 'tetrachloromethane'] },
  { name: 'N,N-dimethylformamide', cutoffNm: 268, synonyms: ['DMF', 'dimethylformamide'] },
  { name: 'N,N-dimethylacetamide', cutoffNm: 268, synonyms: ['DMAc', 'DMA', 'dimethylacetamide'] },
  { name: 'dimethyl sulfoxide', cutoffNm: 268, synonyms: ['DMSO', 'dimethyl sulphoxide', 'Me2SO'] },
  { name: 'benzene', cutoffNm: 278, synonyms: ['C6H6'] },
  { name: 'toluene', cutoffNm: 285, synonyms: ['methylbenzene', 'PhMe', 'C6H5CH3'] },
  {
    name: 'N-methyl-2-pyrrolidone',
    cutoffNm: 285,
    synonyms: ['NMP', 'N-methylpyrrolidone', '1-methylpyrrolidin-2-one'],
  },
  { name: 'chlorobenzene', cutoffNm: 287, synonyms: ['PhCl', 'C6H5Cl'] },
  { name: 'o-xylene', cutoffNm: 288, synonyms: ['1,2-dimethylbenzene', 'xylene'] },
  { name: '1,2-dichlorobenzene', cutoffNm: 295, synonyms: ['o-dichlorobenzene', 'ODCB'] },
  { name: 'pyridine', cutoffNm: 305, synonyms: ['py', 'C5H5N'] },
  { name: '2-butanone', cutoffNm: 329, synonyms: ['MEK', 'methyl ethyl ketone', 'butanone'] },
  { name: 'acetone', cutoffNm: 330, synonyms: ['propanone', 'Me2CO', 'CH3COCH3', 'propan-2-one'] },
  { name: '4-methyl-2-pentanone', cutoffNm: 334, synonyms: ['MIBK', 'methyl isobutyl ketone'] },
  { name: 'nitromethane', cutoffNm: 380, synonyms: ['MeNO2', 'CH3NO2'] },
  { name: 'carbon disulfide', cutoffNm: 380, synonyms: ['CS2', 'carbon disulphide'] },
];

const byName = new Map(
  solvents.flatMap((solvent) => [solvent.name, ...solvent.synonyms].map((name) => [key(name), solvent] as const)),
);

function key(name: string): string {
  return name
    .normalize('NFKC')
    .toLowerCase()
    .replace(/[\s\-‐–]/g, '');
}

/** The solvent of a name, formula or abbreviation, however it is spaced or capitalised; null when it is not listed. */
export function findSolvent(name: string): Solvent | null {
  return byName.get(key(name)) ?? null;
}
