import { findLigand } from '../ligands/index.ts';
import type { Context } from './entity.ts';
import { chargeOnMetals, dMetals, ligandField } from './metal-charge.ts';
import { plausibility, stateLabel } from './oxidation-states.ts';
import type { RawEntity, RawLigand } from './raw.ts';

/** A symbol that the literature uses for two ligands, which differ in protons. */
interface DoubleMeaning {
  spelling: RegExp;
  /** Abbreviations in the library, the usual one first. */
  ligands: readonly [string, string];
  /** The one offered first. */
  likelier: string;
  /** Which of the two is meant, or null where nobody can tell. */
  decide(entity: RawEntity, ligand: RawLigand, usual: readonly [boolean, boolean], charge: number): string | null;
}

const CODE = 'ligand-meaning';

/** The one that gives the metal a usual state; null where both do. */
const byState =
  (first: string, second: string): DoubleMeaning['decide'] =>
  (_entity, _ligand, [a, b]) =>
    a && b ? null : b ? second : first;

const DOUBLE_MEANINGS: readonly DoubleMeaning[] = [
  {
    spelling: /^pz$/i,
    ligands: ['pyz', 'pyrazolato'],
    likelier: 'pyz',
    // One alone between two metals is pyrazine; pyrazolates bridge in pairs.
    decide: (entity, ligand, usual, charge) =>
      ligand.mu === 2 && ligand.count === 1 && usual[0]
        ? 'pyz'
        : byState('pyz', 'pyrazolato')(entity, ligand, usual, charge),
  },
  { spelling: /^im$/, ligands: ['Him', 'imidazolato'], likelier: 'Him', decide: byState('Him', 'imidazolato') },
  {
    spelling: /^dmg$/i,
    ligands: ['dmg', 'Hdmg'],
    likelier: 'Hdmg',
    // In [Ni(dmg)2] and its like each dmg is written without the proton that bridges to its neighbour.
    decide: (_entity, _ligand, [asTyped, protonated], charge) =>
      !protonated || (asTyped && charge < 0) ? 'dmg' : null,
  },
];

/**
 * Say which ligand is meant by `pz`, `im` and `dmg`: by the oxidation state that each would give, else by asking.
 * While a question is open the usual one stands in the reading, and no oxidation state.
 */
export function settleMeanings(entity: RawEntity, charge: number | null, context: Context): RawEntity {
  if (charge === null) return entity;
  let settled = entity;
  for (const ligand of entity.ligands) {
    const meaning = DOUBLE_MEANINGS.find(
      (m) => m.spelling.test(ligand.typed) && m.ligands.includes(ligand.ligand.abbreviation),
    );
    if (meaning) settled = settleOne(settled, ligand, meaning, charge, context);
  }
  return settled;
}

function settleOne(entity: RawEntity, ligand: RawLigand, meaning: DoubleMeaning, charge: number, context: Context) {
  const [metal, other] = dMetals(entity);
  if (!metal || other) return entity;
  const [first, second] = meaning.ligands;
  const choices = [first, second].map((abbreviation) => {
    const changed = withLigand(entity, ligand, abbreviation);
    const left = chargeOnMetals(changed, charge);
    const state = left === null ? null : left / metal.count;
    return { abbreviation, changed, state };
  });
  const fits = choices.map(
    ({ changed, state }) => state !== null && plausibility(metal.element, state, ligandField(changed)) === 'usual',
  );
  const code = context.codeAt(CODE, ligand.start);
  const answer = choices.find((c) => c.abbreviation === context.answers[code]);
  const decided = meaning.decide(entity, ligand, [fits[0]!, fits[1]!], charge);
  const likelier = (c: { abbreviation: string }) => c.abbreviation === meaning.likelier;
  const taken = answer ?? choices.find((c) => c.abbreviation === decided);
  if (taken) return taken.changed;
  context.ask({
    code,
    detail: `${ligand.typed} is written for two ligands that differ in a proton, and each gives ${metal.element} a state that is met.`,
    choices: [...choices]
      .sort((a, b) => Number(likelier(b)) - Number(likelier(a)))
      .map((c) => ({ value: c.abbreviation, label: label(ligand.typed, c, metal.element) })),
    position: context.source.at[ligand.start],
  });
  return withLigand(entity, ligand, first, false);
}

function label(
  typed: string,
  { abbreviation, state }: { abbreviation: string; state: number | null },
  element: string,
): string {
  const { charge, name } = findLigand(abbreviation)!;
  const sign = charge === 0 ? '' : charge === -1 ? '⁻' : '²⁻';
  return `${typed} means ${abbreviation}${sign} here (${name})${state === null ? '' : `: ${stateLabel(element, state)}`}`;
}

/** The entity with another ligand in one place, in its fragments too. */
function withLigand(entity: RawEntity, ligand: RawLigand, abbreviation: string, known = true): RawEntity {
  const wanted = findLigand(abbreviation)!;
  const change = (l: RawLigand): RawLigand =>
    l.typed === ligand.typed && l.ligand === ligand.ligand && l.mu === ligand.mu
      ? { ...l, ligand: wanted, donors: wanted.donors, hapticity: wanted.hapticity, known }
      : l;
  return {
    ...entity,
    ligands: entity.ligands.map(change),
    fragments: entity.fragments.map((f) => ({ ...f, ligands: f.ligands.map(change) })),
  };
}
