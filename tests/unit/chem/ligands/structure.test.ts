import { MF } from 'mf-parser';
import { Molecule } from 'openchemlib';
import { describe, expect, test } from 'vitest';
import { molarMass } from '#src/chem/elements.ts';
import { type Ligand, ligands } from '#src/chem/ligands/index.ts';

/** Atoms of a molecule, implicit hydrogens included, and its charge. */
function contents(molecule: Molecule): { composition: Record<string, number>; charge: number } {
  const composition: Record<string, number> = {};
  const add = (symbol: string, n: number) => {
    if (n > 0) composition[symbol] = (composition[symbol] ?? 0) + n;
  };
  let charge = 0;
  for (let i = 0; i < molecule.getAllAtoms(); i += 1) {
    add(molecule.getAtomLabel(i), 1);
    charge += molecule.getAtomCharge(i);
    if (i < molecule.getAtoms()) add('H', molecule.getImplicitHydrogens(i));
  }
  return { composition, charge };
}

function neighbours(molecule: Molecule, atom: number): number[] {
  return Array.from({ length: molecule.getAllConnAtoms(atom) }, (_, i) => molecule.getConnAtom(atom, i));
}

/** Bonds on the shortest way between two atoms. */
function distance(molecule: Molecule, from: number, to: number): number {
  const seen = new Map([[from, 0]]);
  for (const atom of seen.keys()) {
    if (atom === to) return seen.get(atom)!;
    for (const next of neighbours(molecule, atom)) if (!seen.has(next)) seen.set(next, seen.get(atom)! + 1);
  }
  return Number.POSITIVE_INFINITY;
}

/**
 * Atoms that can be the donors in their order: of the right element, all
 * different, bite-linked pairs in rings of 4 to 7 with the metal. Null when there are none.
 */
function placeDonors(molecule: Molecule, l: Ligand): number[] | null {
  const atoms = Array.from({ length: molecule.getAllAtoms() }, (_, i) => i);
  const fits = (placed: number[]): boolean =>
    contiguous(molecule, l, placed) &&
    l.bite.every(([i, j]) => {
      const [a, b] = [placed[i], placed[j]];
      if (a === undefined || b === undefined) return true;
      const size = distance(molecule, a, b) + 2; // bonds between them and the two to the metal
      return size >= smallestRing(l) && size <= 7;
    });
  const search = (placed: number[]): number[] | null => {
    if (placed.length === l.donors.length) return placed;
    for (const atom of atoms) {
      if (molecule.getAtomLabel(atom) !== l.donors[placed.length] || placed.includes(atom)) continue;
      if (!canDonate(molecule, atom)) continue;
      const next = [...placed, atom];
      const found = fits(next) ? search(next) : null;
      if (found) return found;
    }
    return null;
  };
  return search([]);
}

/** Atoms bound side-on are a chain of neighbours. */
function contiguous(molecule: Molecule, l: Ligand, placed: readonly number[]): boolean {
  const [before, last] = placed.slice(-2);
  return l.hapticity === null || before === undefined || last === undefined || distance(molecule, before, last) === 1;
}

/** A quaternary ammonium nitrogen or saturated carbon has nothing to give; carbon donates as an anion, carbene, π bond or CO. */
function canDonate(molecule: Molecule, atom: number): boolean {
  const label = molecule.getAtomLabel(atom);
  const valence = molecule.getAllConnAtoms(atom) + molecule.getImplicitHydrogens(atom);
  if (label === 'N') return !(valence >= 4) && molecule.getAtomCharge(atom) <= 0;
  return (
    label !== 'C' || molecule.getAtomCharge(atom) < 0 || molecule.getAtomPi(atom) > 0 || molecule.isAromaticAtom(atom)
  );
}

/** Side-on dioxygen closes a ring of three; all others four (carboxylates) and more. */
const smallestRing = (l: Ligand) => (l.abbreviation === 'O2' ? 3 : 4);

const parse = (l: Ligand) => Molecule.fromSmiles(l.smiles);

describe.each(ligands.map((l) => [l.abbreviation, l] as const))('%s', (_, l) => {
  test('SMILES, formula and charge are of one species', () => {
    expect(contents(parse(l))).toEqual({ composition: l.composition, charge: l.charge });
  });

  test('every donor is an atom of it, and chelate rings have four to seven members', () => {
    if (l.donors.every((d) => d === 'H')) return; // hydrogens are implicit in a SMILES
    expect(placeDonors(parse(l), l), l.smiles).not.toBeNull();
  });

  test('every field is filled in, with a source where there is a value', () => {
    expect(l.name).not.toBe('');
    expect(l.smiles).not.toBe('');
    expect(l.denticities.every((d) => d >= 1 && d <= l.donors.length)).toBe(true);
    expect(l.bite.length === 0).toBe(l.donors.length === 1 || l.hapticity !== null);
    if (l.hapticity !== null) expect(l.donors).toHaveLength(l.hapticity);
    const values = [l.f, l.opticalElectronegativity, l.seriesRank];
    if (values.some((v) => v !== undefined)) expect(l.source).toBeTruthy();
  });

  test('molar mass as openchemlib has it', () => {
    // Some of its weights are older: S 32.066, which lies 1.9e-4 off
    const theirs = parse(l).getMolecularFormula().relativeWeight;
    expect(Math.abs(molarMass(l.composition) / theirs - 1)).toBeLessThan(2e-4);
  });

  test('molar mass as mf-parser has it', () => {
    // It weighs each element by its isotopic composition; standard weights lie up to 1.5e-4 from that (S, Se)
    const theirs = new MF(l.formula).getInfo().mass;
    expect(Math.abs(molarMass(l.composition) / theirs - 1)).toBeLessThan(1.6e-4);
  });
});

test('there are more than 150', () => expect(ligands.length).toBeGreaterThanOrEqual(150));
