import { type Composition, hillFormula } from '../elements.ts';
import { fragmentKey, ligandKey } from './assemble.ts';
import { chargeOf } from './charge-text.ts';
import type { RawEntity } from './raw.ts';

/**
 * Canonical key of an entity: composition, charge, ligands with linkage and bridges, and who holds what where fragments
 * differ. Independent of order, spelling, salt, solvate, isomer and oxidation state.
 */
export function identityOf(entity: RawEntity, composition: Composition, charge: number | null): string {
  const ligands = entity.ligands.map((l) => `${ligandKey(l)}*${l.count}`).sort();
  const parts = [hillFormula(composition), charge === null ? '?' : chargeOf(charge) || '0', ligands.join(',')];
  // Like fragments tell no more than the sums: {Ru(NH3)5}2 and Ru2(NH3)10 are one.
  if (entity.fragments.length > 1)
    parts.push(
      entity.fragments
        .map((f) => `{${fragmentKey(f)}}${f.count}`)
        .sort()
        .join(''),
    );
  return parts.join(';');
}
