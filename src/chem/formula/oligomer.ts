import { assembleEntity } from './assemble.ts';
import type { Context, Part } from './entity.ts';
import type { RawEntity, RawLigand, RawSalt } from './raw.ts';
import type { Group, Item } from './syntax.ts';

const CODE = 'bridges';

/**
 * `[RhCl(cod)]2` alone: the count is that of the parts of one molecule, and which ligands hold them together is not
 * written. Asked about; the answer is in the printed formula, `[{Rh(cod)(μ-Cl)}2]` or `[{RhCl(cod)}2]`.
 */
export function settleOligomer(salt: RawSalt, context: Context): RawSalt {
  const [entity] = salt.entities;
  const alone = salt.entities.length === 1 && salt.ions.length + salt.bareMetals.length === 0;
  if (!entity || !alone || !isCountedPart(entity)) return salt;
  const bridges = entity.ligands.filter((l) => l.ligand.canBridge && l.known).flatMap(bridgesOf);
  if (bridges.length === 0) return salt;
  const code = context.codeAt(CODE, entity.start);
  const answer = context.answers[code];
  const chosen = bridges.find(({ value }) => value === answer);
  if (answer !== 'none' && !chosen) {
    context.ask({
      code,
      detail: `One molecule of ${entity.count} parts; the formula does not say what holds them together.`,
      choices: [
        ...bridges.map(({ value, label }) => ({ value, label })),
        { value: 'none', label: 'the bridges are not stated' },
      ],
      position: context.source.at[entity.start],
    });
  }
  return { ...salt, entities: [oligomerOf(entity, chosen ?? null)] };
}

function isCountedPart(entity: RawEntity): boolean {
  const [metal] = entity.metals;
  const mononuclear = entity.metals.length === 1 && metal?.count === 1 && entity.fragments.length === 0;
  return (
    mononuclear && entity.bracketed && entity.charge === null && entity.count >= 2 && Number.isInteger(entity.count)
  );
}

interface Bridge {
  ligand: RawLigand;
  /** How many of that ligand in each part hold the next one, too. */
  each: number;
  /** `Cl`, `OAc*2` */
  value: string;
  label: string;
}

/** One of the ligand in each part, or, of two, both (as acetates of copper do). */
function bridgesOf(ligand: RawLigand): Bridge[] {
  const { abbreviation } = ligand.ligand;
  const one = { ligand, each: 1, value: abbreviation, label: `one ${abbreviation} of each part bridges` };
  const both = { ligand, each: 2, value: `${abbreviation}*2`, label: `both ${abbreviation} of each part bridge` };
  if (ligand.count !== 2) return [one];
  return ligand.ligand.donors.length > 1 ? [both, one] : [one, both];
}

function oligomerOf(entity: RawEntity, bridge: Bridge | null): RawEntity {
  const ligands = entity.ligands.flatMap((l) => {
    if (!bridge || l !== bridge.ligand) return [l];
    const rest = l.count - bridge.each;
    return [...(rest > 0 ? [{ ...l, count: rest }] : []), { ...l, count: bridge.each, mu: 2 }];
  });
  const part: Part = { kind: 'fragment', fragment: { metals: [...entity.metals], ligands, count: entity.count } };
  return assembleEntity([part], { ...entity, count: 1 });
}

/** `[Fe(salen)]2O`: an oxide or sulfide behind a pair of parts holds them together. */
export function bridgedPair([part, bridge, more]: readonly Item[]): Group | null {
  if (part?.kind !== 'group' || bridge?.kind !== 'run' || more || !/^(O|S)$/.test(bridge.text)) return null;
  if (part.open !== '[' || part.count !== 2 || part.charge !== null) return null;
  const inside: Item[] = [{ ...part, open: '{' }, bridge];
  return { ...part, open: '[', items: inside, inner: `{${part.inner}}2${bridge.text}`, count: 1 };
}
