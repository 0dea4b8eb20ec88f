import type { Part } from './entity.ts';
import type { Fragment, RawEntity, RawLigand, RawMetal } from './raw.ts';

/** Where an entity stands and what was written about it outside its brackets. */
export interface EntityFrame {
  charge: number | null;
  count: number;
  configuration: string | null;
  bracketed: boolean;
  start: number;
}

/** An entity from its parts in the order written: flat sums, fragments, and bridges seen from the order. */
export function assembleEntity(written: readonly Part[], frame: EntityFrame): RawEntity {
  const parts = linearFragments(written) ?? bridgedOligomer(written, frame) ?? holdTogether(written);
  const oligomer = parts.length === 1 && parts[0]!.kind === 'fragment' && written.length > 1;
  const fragments = parts.flatMap((part) => (part.kind === 'fragment' ? [part.fragment] : []));
  const metals = [
    ...parts.flatMap((part) => (part.kind === 'metal' ? [part.metal] : [])),
    ...fragments.flatMap((f) => f.metals.map((m) => ({ ...m, count: m.count * f.count }))),
  ];
  const ligands = [
    ...parts.flatMap((part) => (part.kind === 'ligand' ? [part.ligand] : [])),
    ...fragments.flatMap((f) => f.ligands.map((l) => ({ ...l, count: l.count * f.count }))),
  ];
  const alone = metals.reduce((sum, metal) => sum + metal.count, 0) === 1;
  return {
    ...frame,
    count: oligomer ? 1 : frame.count,
    metals: mergeMetals(metals),
    // A bridge needs two ends: μ written in a mononuclear entity is kept in the text only.
    ligands: mergeLigands(alone ? ligands.map((l) => ({ ...l, mu: null })) : ligands),
    fragments: mergeFragments(fragments),
  };
}

/** `[Ir(ppy)2(μ-Cl)]2`: where a mononuclear part names its bridge, the count behind it is that of one molecule. */
function bridgedOligomer(parts: readonly Part[], frame: EntityFrame): Part[] | null {
  const metals = parts.flatMap((part) => (part.kind === 'metal' ? [part.metal] : []));
  const ligands = ligandsOf(parts);
  const single = metals.length === 1 && metals[0]!.count === 1 && metals.length + ligands.length === parts.length;
  if (!single || frame.count < 2 || !Number.isInteger(frame.count) || ligands.every((l) => l.mu === null)) return null;
  return [{ kind: 'fragment', fragment: { metals, ligands, count: frame.count } }];
}

/** What stands between fragments and can hold two centres does so: `{Ru(NH3)5}2(pyz)`. */
function holdTogether(parts: readonly Part[]): readonly Part[] {
  const centres = parts.reduce((sum, part) => sum + (part.kind === 'fragment' ? part.fragment.count : 0), 0);
  if (centres !== 2 || parts.some((part) => part.kind === 'metal')) return parts;
  return parts.map((part) =>
    part.kind === 'ligand' && part.ligand.ligand.canBridge && part.ligand.mu === null
      ? { kind: 'ligand', ligand: { ...part.ligand, mu: 2 } }
      : part,
  );
}

/**
 * The linear spelling (NH3)5Ru(μ-pyz)Ru(NH3)5: ligands before the first metal and after the second end on them, what
 * stands between holds both. Null for every other order, which tells nothing of who holds what.
 */
function linearFragments(parts: readonly Part[]): Part[] | null {
  const metalsAt = parts.flatMap((part, i) => (part.kind === 'metal' && part.metal.count === 1 ? [i] : []));
  const [first, second] = metalsAt;
  if (first === undefined || second === undefined || metalsAt.length !== 2 || first === 0) return null;
  if (parts.some((part) => part.kind === 'fragment')) return null;
  const between = ligandsOf(parts.slice(first + 1, second));
  if (!between.every((ligand) => ligand.mu !== null || ligand.ligand.canBridge)) return null;
  const fragment = (metal: Part, ligands: RawLigand[]): Part => ({
    kind: 'fragment',
    fragment: { metals: metal.kind === 'metal' ? [metal.metal] : [], ligands, count: 1 },
  });
  return [
    fragment(parts[first]!, ligandsOf(parts.slice(0, first))),
    fragment(parts[second]!, ligandsOf(parts.slice(second + 1))),
    ...between.map((ligand): Part => ({ kind: 'ligand', ligand: { ...ligand, mu: ligand.mu ?? 2 } })),
  ];
}

function ligandsOf(parts: readonly Part[]): RawLigand[] {
  return parts.flatMap((part) => (part.kind === 'ligand' ? [part.ligand] : []));
}

/** Key that tells ligands apart by what they are and how they are bound. */
export function ligandKey(ligand: RawLigand): string {
  const { abbreviation, hapticity, donors } = ligand.ligand;
  const mu = ligand.mu === null ? '' : `μ${ligand.mu === 2 ? '' : ligand.mu}-`;
  const eta = ligand.hapticity === hapticity ? '' : `η${ligand.hapticity}-`;
  const kappa = ligand.donors.join() !== donors.join() ? `-κ${ligand.donors.join('')}` : kappaText(ligand);
  return `${mu}${eta}${abbreviation}${kappa}`;
}

/** `-κO`, `-κ2O,O′`: the donors used, where they were stated and the sphere does not imply them. */
function kappaText({ denticity, donors }: RawLigand): string {
  if (denticity === null) return '';
  const used = donors.slice(0, denticity);
  const marked = used.map((atom, i) => atom + '′'.repeat(used.slice(0, i).filter((one) => one === atom).length));
  return `-κ${denticity === 1 ? '' : denticity}${marked.join(',')}`;
}

function merge<T extends { count: number }>(all: readonly T[], keyOf: (one: T) => string): T[] {
  const merged = new Map<string, T>();
  for (const one of all) {
    const key = keyOf(one);
    const before = merged.get(key);
    merged.set(key, before ? { ...before, count: before.count + one.count } : one);
  }
  return [...merged.values()];
}

export const mergeLigands = (ligands: readonly RawLigand[]): RawLigand[] => merge(ligands, ligandKey);
export const mergeMetals = (metals: readonly RawMetal[]): RawMetal[] => merge(metals, (metal) => metal.element);

/** Metals and ligands of a fragment as a key, independent of the order written. */
export function fragmentKey(fragment: Fragment): string {
  const metals = mergeMetals(fragment.metals).map((m) => `${m.element}${m.count}`);
  const ligands = mergeLigands(fragment.ligands).map((l) => `${ligandKey(l)}*${l.count}`);
  return [...metals.sort(), ...ligands.sort()].join(',');
}

const mergeFragments = (fragments: readonly Fragment[]): Fragment[] => merge(fragments, fragmentKey);
