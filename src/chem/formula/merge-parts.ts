import { isDBlock } from '../elements.ts';
import type { RawEntity, RawSalt } from './raw.ts';

/** `[Co(NCS)4][Hg]`: a metal alone in brackets beside a complex is a free ion. */
export function separateBracketedIons(salt: RawSalt): void {
  const isIon = (e: RawEntity) =>
    e.ligands.length === 0 && e.metals.length === 1 && e.metals[0]!.count === 1 && isDBlock(e.metals[0]!.element);
  if (!salt.entities.some((e) => e.ligands.length > 0)) return;
  for (const { metals, count, charge, start } of salt.entities.filter(isIon))
    salt.bareMetals.push({ element: metals[0]!.element, count, charge, start });
  salt.entities = salt.entities.filter((e) => !isIon(e));
}

/** Like ions together, in the order first met. */
export function mergeIons(ions: RawSalt['ions']): RawSalt['ions'] {
  const merged = new Map<string, RawSalt['ions'][number]>();
  for (const one of ions) {
    const key = `${one.ion.symbol}${one.ion.charge}`;
    merged.set(key, { ion: one.ion, count: one.count + (merged.get(key)?.count ?? 0) });
  }
  return [...merged.values()];
}

/** Like solvates together. */
export function mergeSolvates(solvates: RawSalt['solvates']): RawSalt['solvates'] {
  const merged = new Map<string, RawSalt['solvates'][number]>();
  for (const one of solvates)
    merged.set(one.symbol, { ...one, count: one.count + (merged.get(one.symbol)?.count ?? 0) });
  return [...merged.values()];
}
