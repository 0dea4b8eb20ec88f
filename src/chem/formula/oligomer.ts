import { assembleEntity } from './assemble.ts';
import type { Context, Part } from './entity.ts';
import type { RawEntity, RawSalt } from './raw.ts';

const CODE = 'bridges';

/**
 * `[RhCl(cod)]2` alone: the count is that of the parts of one molecule, and which ligands hold them together is not
 * written. Asked about; the answer is in the printed formula, `[{Rh(cod)(μ-Cl)}2]` or `[{RhCl(cod)}2]`.
 */
export function settleOligomer(salt: RawSalt, context: Context): RawSalt {
  const [entity] = salt.entities;
  const alone = salt.entities.length === 1 && salt.ions.length + salt.bareMetals.length === 0;
  if (!entity || !alone || !isCountedPart(entity)) return salt;
  const bridging = entity.ligands.filter((l) => l.ligand.canBridge && l.known).map((l) => l.ligand.abbreviation);
  if (bridging.length === 0) return salt;
  const code = context.codeAt(CODE, entity.start);
  const answer = context.answers[code];
  if (answer !== 'none' && !bridging.includes(answer ?? '')) {
    context.ask({
      code,
      detail: `One molecule of ${entity.count} parts; the formula does not say what holds them together.`,
      choices: [
        ...bridging.map((symbol) => ({ value: symbol, label: `one ${symbol} of each part bridges` })),
        { value: 'none', label: 'the bridges are not stated' },
      ],
      position: context.source.at[entity.start],
    });
  }
  return { ...salt, entities: [oligomerOf(entity, answer ?? 'none')] };
}

function isCountedPart(entity: RawEntity): boolean {
  const [metal] = entity.metals;
  const mononuclear = entity.metals.length === 1 && metal?.count === 1 && entity.fragments.length === 0;
  return (
    mononuclear && entity.bracketed && entity.charge === null && entity.count >= 2 && Number.isInteger(entity.count)
  );
}

function oligomerOf(entity: RawEntity, bridge: string): RawEntity {
  const ligands = entity.ligands.flatMap((l) => {
    if (l.ligand.abbreviation !== bridge) return [l];
    return [...(l.count > 1 ? [{ ...l, count: l.count - 1 }] : []), { ...l, count: 1, mu: 2 }];
  });
  const part: Part = { kind: 'fragment', fragment: { metals: [...entity.metals], ligands, count: entity.count } };
  return assembleEntity([part], { ...entity, count: 1 });
}
