import { findElement, isDBlock } from '../elements.ts';
import { commonStates, type LigandField } from './oxidation-states.ts';
import type { RawEntity, RawLigand, RawMetal } from './raw.ts';

/** Atoms inside an entity that keep one state: heteroatoms of polyoxometalates, and s-block cations between oxides. */
const FIXED: Readonly<Record<string, number>> = {
  P: 5,
  As: 5,
  Sb: 5,
  Si: 4,
  Ge: 4,
  Sn: 4,
  B: 3,
  Al: 3,
  Ga: 3,
  In: 3,
  Bi: 3,
  Tl: 1,
  Pb: 2,
  Te: 6,
  Li: 1,
  Na: 1,
  K: 1,
  Rb: 1,
  Cs: 1,
  Mg: 2,
  Ca: 2,
  Sr: 2,
  Ba: 2,
};

/** Charge counted for each ligand of an entity: that of the library unless a person or the metal says otherwise. */
export type LigandCharges = ReadonlyMap<RawLigand, number>;

/** Facts about the ligands that tell believable from unbelievable oxidation states. */
export function ligandField(entity: RawEntity): LigandField {
  const ligands = entity.ligands.map(({ ligand }) => ligand);
  return {
    acceptor: ligands.some(
      (l) => l.donors.some((d) => /^(C|H|P|As|Sn|S)$/.test(d)) || /^(NO|N2)$/.test(l.abbreviation),
    ),
    diimine: ligands.some(isDiimine),
    strongDonor: ligands.some((l) => /^(O|F|N|O2|OOH|S|OH)$/.test(l.abbreviation)),
    allNeutral: ligands.length > 0 && ligands.every((l) => l.charge === 0),
  };
}

/** Chelating N-heterocycles, which take up electrons before a metal reaches zero: bpy, phen, tpy. */
export function isDiimine({ piCharacter, donors, denticity }: RawLigand['ligand']): boolean {
  return piCharacter === 'acceptor' && denticity > 1 && donors.every((d) => d === 'N');
}

/** Charge left for the d-block centres once ligands and atoms of fixed state have theirs; null when a ligand is open. */
export function chargeOnMetals(entity: RawEntity, charge: number, charges?: LigandCharges): number | null {
  if (entity.ligands.some((l) => !l.known)) return null;
  const bound = entity.ligands.reduce((sum, l) => sum + l.count * (charges?.get(l) ?? l.ligand.charge), 0);
  const fixed = entity.metals.reduce((sum, m) => sum + m.count * (isDBlock(m.element) ? 0 : fixedState(m.element)), 0);
  return charge - bound - fixed;
}

function fixedState(symbol: string): number {
  return FIXED[symbol] ?? (findElement(symbol)?.block === 'f' ? 3 : 0);
}

export function dMetals(entity: RawEntity): RawMetal[] {
  return entity.metals.filter((m) => isDBlock(m.element));
}

/** Entity charges that give the metal one of its usual states, usual first; for one kind of d-block metal only. */
export function usualCharges(entity: RawEntity): { charge: number; state: number }[] {
  const [metal, other] = dMetals(entity);
  const zero = chargeOnMetals(entity, 0);
  if (zero === null || other) return [];
  // Without a d-block centre all states are fixed, and so is the charge: [Al(H2O)6]3+
  if (!metal) return [{ charge: -zero || 0, state: fixedState(entity.metals[0]?.element ?? '') }];
  return commonStates(metal.element).map((state) => ({ charge: state * metal.count - zero || 0, state }));
}
