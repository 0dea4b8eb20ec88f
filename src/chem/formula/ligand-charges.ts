import { ligandKey } from './assemble.ts';
import { chargeOf } from './charge-text.ts';
import type { Context } from './entity.ts';
import { chargeOnMetals, type LigandCharges, ligandField } from './metal-charge.ts';
import { type Plausibility, plausibility, stateLabel } from './oxidation-states.ts';
import type { RawEntity, RawLigand, RawMetal } from './raw.ts';

/** One way to count the ligands of an entity, and the state it leaves to the metal. */
interface ChargeOption {
  /** `-1`; where several kinds of ligand are open, `NO=1,dmit=-2`. */
  value: string;
  /** `NO counted +` */
  words: string;
  charges: LigandCharges;
  state: number;
  fit: Plausibility;
}

const MOST_OPTIONS = 81;

/** All ways to count the ligands that can be counted in several, each usual way first; whatever the order typed. */
function chargeOptions(entity: RawEntity, open: readonly RawLigand[], charge: number, metal: RawMetal): ChargeOption[] {
  const field = ligandField(entity);
  const usual: LigandCharges = new Map(entity.ligands.map((l) => [l, l.ligand.charge]));
  return open
    .reduce<LigandCharges[]>(
      (ways, l) =>
        ways
          .flatMap((way) => [l.ligand.charge, ...l.ligand.alternativeCharges].map((z) => new Map(way).set(l, z)))
          .slice(0, MOST_OPTIONS),
      [usual],
    )
    .flatMap((charges) => {
      const left = chargeOnMetals(entity, charge, charges);
      if (left === null) return [];
      const state = left / metal.count;
      const each = open.map((l) => ({ symbol: l.ligand.abbreviation, z: charges.get(l) ?? 0 }));
      const value = each.length === 1 ? String(each[0]!.z) : each.map(({ symbol, z }) => `${symbol}=${z}`).join(',');
      const words = each.map(({ symbol, z }) => `${symbol} counted ${chargeOf(z) || '0'}`).join(', ');
      return [{ value, words, charges, state, fit: plausibility(metal.element, state, field) }];
    });
}

/** Ligands that may be counted in several ways: the usual way unless only another one gives the metal a usual state. */
export function chooseLigandCharges(
  entity: RawEntity,
  charge: number,
  metal: RawMetal,
  context: Context,
): (ChargeOption & { alternatives: number[] }) | null {
  const open = entity.ligands
    .filter((l) => l.ligand.alternativeCharges.length > 0)
    .sort((a, b) => (ligandKey(a) < ligandKey(b) ? -1 : 1));
  const options = chargeOptions(entity, open, charge, metal);
  const [first] = options;
  if (!first) return null;
  if (open.length === 0) return { ...first, alternatives: [] };
  const code = context.codeAt('ligand-charge', entity.start);
  const answered = options.find((o) => o.value === context.answers[code]?.replace('+', ''));
  const usual = options.filter((o) => o.fit === 'usual');
  const believable = options.filter((o) => o.fit === 'usual' || o.fit === 'rare');
  const dioxygen = open.some((l) => l.ligand.abbreviation === 'O2');
  const doubtful = dioxygen ? usual.length > 1 : first.fit !== 'usual' && believable.length > 1;
  if (!answered && doubtful) {
    const names = open.map((l) => l.ligand.abbreviation);
    context.ask({
      code,
      detail: `${names.join(' and ')} can be counted in several ways, and each gives ${metal.element} a state of its own.`,
      choices: believable.map((o) => ({ value: o.value, label: `${o.words}: ${stateLabel(metal.element, o.state)}` })),
      position: context.source.at[Math.min(...open.map((l) => l.start))],
    });
    return null;
  }
  const taken =
    answered ??
    (first.fit === 'usual' ? first : (usual[0] ?? (believable.includes(first) ? first : (believable[0] ?? first))));
  const others = believable.filter((o) => o !== taken).map((o) => o.state);
  return { ...taken, alternatives: [...new Set(others)].filter((state) => state !== taken.state) };
}
