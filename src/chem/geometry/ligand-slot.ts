import { DomainError } from '../errors.ts';
import type { Geometry } from './catalogue.ts';

/** A kind of ligand and how many of it the metal carries. */
export interface LigandSlot {
  /** What its donors are called; the donors of a chelate that is not symmetric get primes: B, B′ written `B'`. */
  label?: string;
  /** Denticity; follows from `pattern` where that is given. */
  donors?: number;
  count: number;
  /** Whether all donors of a chelate without `pattern` are alike; true unless told otherwise. */
  symmetric?: boolean;
  /** For three donors: ends adjacent (fac), not adjacent (mer), or both (either, the default). */
  span?: 'fac' | 'mer' | 'either';
  /** Donor kinds in the order of the chain. */
  pattern?: string[];
  /** Pairs of donors (indices into the pattern) joined by a chelate ring; by default neighbours in the chain. */
  links?: [number, number][];
  /** Donors in one plane, as in a macrocycle, whose chain is then closed to a ring unless `links` says otherwise. */
  planar?: boolean;
}

/** A ligand slot with every default filled in. Slots of the same ligand are one kind. */
export interface LigandKind {
  count: number;
  pattern: readonly string[];
  links: readonly (readonly [number, number])[];
  span: 'fac' | 'mer' | 'either';
  planar: boolean;
}

/**
 * Ligand kinds for a geometry, checked.
 *
 * @throws {DomainError} field `ligands`: `empty`; `out-of-range` for a count, denticity, link or sum of donors that
 *   does not fit; `unsupported` for a span that needs three donors
 */
export function ligandKinds(slots: readonly LigandSlot[], geometry: Geometry): LigandKind[] {
  if (slots.length === 0) throw new DomainError('empty', 'no ligands were given', 'ligands');
  const kinds = new Map<string, LigandKind>();
  for (const slot of slots) {
    const kind = toKind(slot);
    const key = JSON.stringify([slot.label, kind.pattern, kind.links, kind.span, kind.planar]);
    kinds.set(key, { ...kind, count: kind.count + (kinds.get(key)?.count ?? 0) });
  }
  const list = [...kinds.values()];
  const donors = list.reduce((sum, { count, pattern }) => sum + count * pattern.length, 0);
  if (donors !== geometry.coordinationNumber) {
    refuse(`the ligands bring ${donors} donors, ${geometry.symbol} takes ${geometry.coordinationNumber}`);
  }
  return list;
}

function toKind(slot: LigandSlot): LigandKind {
  const name = slot.label ?? slot.pattern?.join('') ?? '';
  const denticity = slot.donors ?? slot.pattern?.length ?? 1;
  if (name === '') throw new DomainError('empty', 'a ligand needs a label or a pattern', 'ligands');
  if (!Number.isInteger(slot.count) || slot.count < 1) refuse(`count of ${name} is ${slot.count}, not a whole number`);
  if (!Number.isInteger(denticity) || denticity < 1 || denticity > 9) {
    refuse(`${name} has ${denticity} donors, outside 1 to 9`);
  }
  if (slot.pattern && slot.pattern.length !== denticity) {
    refuse(`the pattern of ${name} names ${slot.pattern.length} donors, not ${denticity}`);
  }
  const span = slot.span ?? 'either';
  if (span !== 'either' && denticity !== 3) {
    throw new DomainError('unsupported', `span ${span} needs three donors, ${name} has ${denticity}`, 'ligands');
  }
  const planar = slot.planar ?? false;
  return {
    count: slot.count,
    pattern: slot.pattern ?? Array.from({ length: denticity }, (_, k) => donorLabel(name, k, slot.symmetric)),
    links: checkedLinks(name, denticity, slot.links ?? chain(denticity, planar)),
    span,
    planar,
  };
}

const donorLabel = (name: string, k: number, symmetric = true): string => (symmetric ? name : name + "'".repeat(k));

function chain(denticity: number, closed: boolean): [number, number][] {
  const links = Array.from({ length: denticity - 1 }, (_, k): [number, number] => [k, k + 1]);
  return closed && denticity > 3 ? [...links, [0, denticity - 1]] : links;
}

/** Links in a canonical order. They must join all donors, since what is not joined would be another ligand. */
function checkedLinks(name: string, denticity: number, links: readonly [number, number][]): [number, number][] {
  const reached = new Set([0]);
  for (const [a, b] of links) {
    const valid = [a, b].every((k) => Number.isInteger(k) && k >= 0 && k < denticity) && a !== b;
    if (!valid) refuse(`link [${a}, ${b}] of ${name} does not join two of its ${denticity} donors`);
  }
  for (let round = 0; round < denticity; round++) {
    for (const [a, b] of links) {
      if (reached.has(a) || reached.has(b)) reached.add(a).add(b);
    }
  }
  if (reached.size < denticity) refuse(`the links of ${name} leave some of its ${denticity} donors apart`);
  const keys = new Set(links.map(([a, b]) => `${Math.min(a, b)},${Math.max(a, b)}`));
  return [...keys].sort().map((key) => key.split(',').map(Number) as [number, number]);
}

function refuse(detail: string): never {
  throw new DomainError('out-of-range', detail, 'ligands');
}
