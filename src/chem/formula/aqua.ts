import { findLigand } from '../ligands/index.ts';
import type { Context } from './entity.ts';
import { findAnion } from './lexicon.ts';
import type { RawEntity, RawLigand, RawSalt } from './raw.ts';

const CODE = 'aqua-ion';

/**
 * Hydrates written without brackets (`CuSO4·5H2O`, `NiCl2·6H2O`): whether the water sits on the metal is not in the
 * formula. Left as typed, with a question; the answer moves water (and halide) into or out of the sphere.
 *
 * @returns the salt, and whether the question is still open
 */
export function settleAquaIon(salt: RawSalt, context: Context): { salt: RawSalt; open: boolean } {
  const [entity] = salt.entities;
  const water = salt.solvates.find((s) => s.symbol === 'H2O');
  if (salt.entities.length !== 1 || !entity || entity.bracketed || !water || !couldHoldWater(entity, salt))
    return { salt, open: false };
  const each = Math.floor(water.count / entity.count);
  if (each < 1) return { salt, open: false };
  const oxides = countOf(entity, isOxide);
  const halides = countOf(entity, (l) => !isOxide(l));
  if (halides >= (/^(Pd|Pt|Au)$/.test(entity.metals[0]!.element) ? 4 : 6)) return { salt, open: false }; // no room left
  const outside = Math.min(6 - oxides, each);
  const inside = Math.min(6 - oxides - halides, each);
  const answer = context.answers[CODE];
  if (answer === 'aqua') return { salt: withWater(salt, entity, outside, true), open: false };
  if (answer === 'inner' && halides > 0 && inside > 0)
    return { salt: withWater(salt, entity, inside, false), open: false };
  if (answer === 'as-typed') return { salt, open: false };
  const metal = entity.metals[0]!.element + (oxides > 0 ? `O${oxides > 1 ? oxides : ''}` : '');
  context.ask({
    code: CODE,
    detail: `The formula does not say whether the water is bound to ${metal}.`,
    choices: [
      { value: 'aqua', label: `[${metal}(H2O)${outside}] with the anions outside` },
      ...(halides > 0 && inside > 0 ? [{ value: 'inner', label: `anions and ${inside} H2O bound to ${metal}` }] : []),
      { value: 'as-typed', label: 'water in the lattice only' },
    ],
    position: context.source.at[entity.start],
  });
  return { salt, open: true };
}

/** One metal with nothing bound but halides, or a metal oxide cation such as VO2+ beside its anions. */
function couldHoldWater(entity: RawEntity, salt: RawSalt): boolean {
  const anions = salt.ions.some((one) => one.ion.charge < 0) || countOf(entity, (l) => !isOxide(l)) > 0;
  return (
    (anions || countOf(entity, isOxide) === 0) &&
    entity.metals.length === 1 &&
    entity.metals[0]!.count === 1 &&
    entity.ligands.every((l) => /^(F|Cl|Br|I|O)$/.test(l.ligand.abbreviation))
  );
}

const isOxide = (l: RawLigand) => l.ligand.abbreviation === 'O';

function countOf(entity: RawEntity, which: (l: RawLigand) => boolean): number {
  return entity.ligands.filter(which).reduce((sum, l) => sum + l.count, 0);
}

function withWater(salt: RawSalt, entity: RawEntity, waters: number, halidesOut: boolean): RawSalt {
  const aqua = findLigand('H2O')!;
  const water = {
    ligand: aqua,
    count: waters,
    mu: null,
    hapticity: null,
    donors: aqua.donors,
    denticity: null,
    typed: 'H2O',
    known: true,
    start: entity.start,
  };
  const out = halidesOut ? entity.ligands.filter((l) => !isOxide(l)) : [];
  const moved = out.map((l) => ({ ion: findAnion(l.ligand.abbreviation)!, count: l.count * entity.count }));
  return {
    ...salt,
    entities: [{ ...entity, ligands: [...entity.ligands.filter((l) => !out.includes(l)), water] }],
    ions: [...salt.ions, ...moved],
    solvates: salt.solvates
      .map((s) => (s.symbol === 'H2O' ? { ...s, count: s.count - waters * entity.count } : s))
      .filter((s) => s.count > 0),
  };
}
