import { ligands } from '#src/chem/ligands/index.ts';
import { HttpError } from '../http.ts';

type OCL = typeof import('openchemlib');

interface Indexed {
  abbreviation: string;
  molecule: InstanceType<OCL['Molecule']>;
  index: number[];
}

let library: Promise<{ ocl: OCL; indexed: Indexed[] }> | undefined;

/** The library's structures with the index that a search needs, made once a process and only when it is asked for. */
function open() {
  library ??= import('openchemlib').then((ocl) => {
    const searcher = new ocl.SSSearcherWithIndex();
    const indexed = ligands.map(({ abbreviation, smiles }) => {
      const molecule = ocl.Molecule.fromSmiles(smiles);
      return { abbreviation, molecule, index: searcher.createIndex(molecule) };
    });
    return { ocl, indexed };
  });
  return library;
}

/**
 * Abbreviations of the ligands whose structure holds a fragment.
 *
 * Charges and hydrogens count as drawn: an unwritten hydrogen of the fragment is a place for anything.
 *
 * @param smiles - the fragment, such as `c1ccncc1`
 * @throws {HttpError} 400 for what is no SMILES
 */
export async function ligandsWithFragment(smiles: string): Promise<string[]> {
  const { ocl, indexed } = await open();
  const fragment = readFragment(ocl, smiles);
  const searcher = new ocl.SSSearcherWithIndex();
  searcher.setFragment(fragment, searcher.createIndex(fragment));
  return indexed
    .filter(({ molecule, index }) => {
      searcher.setMolecule(molecule, index);
      return searcher.isFragmentInMolecule();
    })
    .map(({ abbreviation }) => abbreviation);
}

function readFragment(ocl: OCL, smiles: string) {
  const refuse = (detail: string) =>
    new HttpError(400, 'The substructure cannot be searched for', { errors: [{ pointer: '#/substructure', detail }] });
  // The parser closes what is left open without a word.
  if (smiles.split('(').length !== smiles.split(')').length) throw refuse('A parenthesis has no partner');
  let fragment: InstanceType<OCL['Molecule']>;
  try {
    fragment = ocl.Molecule.fromSmiles(smiles);
  } catch {
    throw refuse('Give the fragment as SMILES, such as c1ccncc1');
  }
  if (fragment.getAllAtoms() === 0) throw refuse('The fragment has no atom');
  fragment.setFragment(true);
  return fragment;
}
