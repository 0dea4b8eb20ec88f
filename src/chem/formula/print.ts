import { findElement } from '../elements.ts';
import { findLigand } from '../ligands/index.ts';
import { fragmentKey, ligandKey } from './assemble.ts';
import { chargeOf } from './charge-text.ts';
import type { Fragment, RawEntity, RawLigand, RawMetal, RawSalt } from './raw.ts';

/**
 * Order of symbols in a formula: by alphabet, letter by letter of element symbols, so that CO comes before Cl.
 *
 * @see Red Book 2005, IR-4.4.3.2
 */
export function compareSymbols(a: string, b: string): number {
  const [left, right] = [symbolTokens(a), symbolTokens(b)];
  for (let i = 0; i < Math.max(left.length, right.length); i += 1) {
    const [x, y] = [left[i], right[i]];
    if (x === undefined) return -1;
    if (y === undefined) return 1;
    const order =
      x.toLowerCase() < y.toLowerCase() ? -1 : x.toLowerCase() > y.toLowerCase() ? 1 : x < y ? -1 : x > y ? 1 : 0;
    if (order !== 0) return order;
  }
  return 0;
}

function symbolTokens(text: string): string[] {
  return text.match(/[A-Z][a-z]*|[a-z]+|\d+|./g) ?? [];
}

const count = (n: number) => (n === 1 ? '' : String(n));

function ligandText(ligand: RawLigand, bare: boolean): string {
  const key = ligandKey(ligand);
  const hapto = ligand.hapticity !== null && !/η/.test(key) && /^C\d/.test(key) ? `η${ligand.hapticity}-` : '';
  const mark = /^(μ\d?-)?/.exec(key)?.[0] ?? '';
  const body = `${mark}${hapto}${key.slice(mark.length)}`;
  const atom = findElement(body) !== null && !(body === 'N' && ligand.count > 1); // N2 and N3 are molecules
  return atom && bare ? `${body}${count(ligand.count)}` : `(${body})${count(ligand.count)}`;
}

/** Ligands in order: terminal before bridging, each by alphabet; atoms bare unless they would run into the one before. */
function ligandsText(ligands: readonly RawLigand[]): string {
  const order = [...ligands].sort(
    (a, b) =>
      Number(a.mu !== null) - Number(b.mu !== null) ||
      compareSymbols(a.ligand.abbreviation, b.ligand.abbreviation) ||
      compareSymbols(ligandKey(a), ligandKey(b)),
  );
  let text = '';
  for (const ligand of order) {
    const bare = ligandText(ligand, true);
    text += /[A-Za-z]$/.test(text) || runsInto(text, bare) ? ligandText(ligand, false) : bare;
  }
  return text;
}

/** Whether the bare atoms before and the next ones would read as one ligand: two hydrides and an oxide as H2O. */
function runsInto(before: string, next: string): boolean {
  const run = /[A-Za-z\d]*$/.exec(before)![0];
  for (let from = 0; from < run.length; from += 1) {
    const rest = run.slice(from) + next;
    for (let end = run.length - from + 1; end <= rest.length; end += 1) if (findLigand(rest.slice(0, end))) return true;
  }
  return false;
}

function metalsText(metals: readonly RawMetal[]): string {
  return [...metals]
    .sort((a, b) => compareSymbols(a.element, b.element))
    .map((m) => `${m.element}${count(m.count)}`)
    .join('');
}

function fragmentText(fragment: Fragment): string {
  return `{${metalsText(fragment.metals)}${ligandsText(fragment.ligands)}}${count(fragment.count)}`;
}

/** An entity without its charge: `[Cr(ox)3]`; a bare metal ion is its symbol. */
export function entityBody(entity: RawEntity): string {
  if (entity.ligands.length === 0 && entity.metals.length === 1 && entity.metals[0]!.count === 1)
    return metalsText(entity.metals);
  if (entity.fragments.length === 0) return `[${metalsText(entity.metals)}${ligandsText(entity.ligands)}]`;
  const fragments = [...entity.fragments].sort((a, b) => (fragmentKey(a) < fragmentKey(b) ? -1 : 1));
  const rest = outsideFragments(entity);
  return `[${metalsText(rest.metals)}${fragments.map(fragmentText).join('')}${ligandsText(rest.ligands)}]`;
}

/** Metals and ligands of an entity that belong to none of its fragments. */
function outsideFragments(entity: RawEntity): { metals: RawMetal[]; ligands: RawLigand[] } {
  const inFragments = (pick: (f: Fragment) => number) =>
    entity.fragments.reduce((sum, f) => sum + f.count * pick(f), 0);
  const metals = entity.metals.map((m) => ({
    ...m,
    count: m.count - inFragments((f) => f.metals.reduce((sum, x) => sum + (x.element === m.element ? x.count : 0), 0)),
  }));
  const ligands = entity.ligands.map((l) => ({
    ...l,
    count:
      l.count -
      inFragments((f) => f.ligands.reduce((sum, x) => sum + (ligandKey(x) === ligandKey(l) ? x.count : 0), 0)),
  }));
  return { metals: metals.filter((m) => m.count > 0), ligands: ligands.filter((l) => l.count > 0) };
}

/** An entity with its charge: `[Cr(ox)3]3-`. */
export function entityText(entity: RawEntity, charge: number | null): string {
  return `${entityBody(entity)}${charge === null ? '' : chargeOf(charge)}`;
}

/** A free ion as the reader reads it back: `K+`, `SO4^2-`. */
export function ionText(symbol: string, charge: number): string {
  return `${symbol}${/\d$/.test(symbol) && Math.abs(charge) > 1 ? '^' : ''}${chargeOf(charge)}`;
}

/** What is needed to print all of a salt: charges of its entities and bare metals, and whether to write them. */
export interface PrintCharges {
  entities: readonly (number | null)[];
  bareMetals: readonly (number | null)[];
  /** Write the charges of the entities: when the whole is charged, or the charges were a choice. */
  written: boolean;
}

/** All of a salt in Red Book order: cations, then entities by falling charge, then anions; solvates after dots. */
export function saltText(salt: RawSalt, charges: PrintCharges): string {
  const ions = salt.ions.map(({ ion, count: n }) => ({
    text: groupedIon(ion.symbol, n),
    charge: ion.charge,
    symbol: ion.symbol,
  }));
  const bare = salt.bareMetals.map((m, i) => ({
    text: `${m.element}${charges.written && charges.bareMetals[i] ? `^${chargeOf(charges.bareMetals[i])}` : ''}${count(m.count)}`,
    charge: 1,
    symbol: m.element,
  }));
  const byAlphabet = (a: { symbol: string }, b: { symbol: string }) => compareSymbols(a.symbol, b.symbol);
  const cations = [...ions.filter((one) => one.charge > 0), ...bare].sort(byAlphabet).map((one) => one.text);
  const anions = ions
    .filter((one) => one.charge < 0)
    .sort(byAlphabet)
    .map((one) => one.text);
  const entities = salt.entities
    .map((entity, i) => ({ entity, charge: charges.entities[i] ?? null }))
    .sort((a, b) => Math.sign(b.charge ?? 0) - Math.sign(a.charge ?? 0))
    .map(({ entity, charge }) => countedEntity(entity, charges.written ? charge : null));
  const solvates = [...salt.solvates]
    .sort(byAlphabet)
    .map((s) => `·${s.count === 1 ? '' : Number(s.count.toFixed(4))}${s.symbol}`);
  return [...cations, ...entities, ...anions, ...solvates].join('');
}

function groupedIon(symbol: string, n: number): string {
  return n > 1 && findElement(symbol) === null ? `(${symbol})${n}` : `${symbol}${count(n)}`;
}

function countedEntity(entity: RawEntity, charge: number | null): string {
  const prefix = entity.configuration === null ? '' : `${entity.configuration}-`;
  const body = entityText(entity, charge);
  if (entity.count === 1) return `${prefix}${body}`;
  return charge === null || charge === 0 ? `${prefix}${body}${entity.count}` : `(${prefix}${body})${entity.count}`;
}
