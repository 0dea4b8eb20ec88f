import { findElement } from '../elements.ts';
import { mergeLigands } from './assemble.ts';
import type { Context } from './entity.ts';
import type { RawEntity, RawLigand } from './raw.ts';

/** Polyhedral symbols by coordination number, usual first. @see Red Book 2005, table IR-9.2 */
const POLYHEDRA: Readonly<Record<number, readonly string[]>> = {
  2: ['L-2', 'A-2'],
  3: ['TP-3', 'TPY-3', 'TS-3'],
  4: ['T-4', 'SP-4', 'SPY-4', 'SS-4'],
  5: ['TBPY-5', 'SPY-5'],
  6: ['OC-6', 'TPR-6'],
  7: ['PBPY-7', 'OCF-7', 'TPRS-7'],
  8: ['SAPR-8', 'DD-8', 'CU-8', 'HBPY-8', 'OCT-8', 'TPRT-8', 'TPRS-8'],
  9: ['TPRS-9', 'HBPY-9'],
};

/** Geometries a coordination number allows, usual first; a d8 centre of four ligands is square planar first. */
export function geometriesFor(coordinationNumber: number | null, dCount: number | null): string[] {
  if (coordinationNumber === null) return [];
  const symbols = [...(POLYHEDRA[coordinationNumber] ?? [])];
  if (coordinationNumber !== 4 || dCount !== 8) return symbols;
  return ['SP-4', ...symbols.filter((s) => s !== 'SP-4')];
}

type Denticities = ReadonlyMap<RawLigand, number>;

/** Vertices that one copy of a ligand takes at its centre, and the sum over all. */
export interface Coordination {
  number: number | null;
  denticity: Denticities;
}

/** Oxygen donors that hold a centre by one atom as readily as by two. */
const EITHER_WAY = /^(NO3|ONO|SO4|CO3|PO4|OAc|tfa|HCOO|OBz)$/;
const MOST_WAYS = 64;

/**
 * Coordination number of a mononuclear entity: donor atoms, a hapto ligand counting one (its centroid). Ligands that
 * can hold by one or two atoms (carbonate, nitrate, acetate) take what makes six, or else four, donors, unless a κ
 * says how they hold. Null for several centres, for a bare ion, and while a ligand is unknown.
 */
export function coordination(entity: RawEntity): Coordination {
  const usual = new Map(entity.ligands.map((l) => [l, usualDenticity(l)] as const));
  if (!hasOneKnownSphere(entity)) return { number: null, denticity: usual };
  const taken = takenWay(entity, usual);
  return { number: donorSum(taken), denticity: taken };
}

function usualDenticity(l: RawLigand): number {
  if (l.denticity !== null) return l.denticity;
  return l.hapticity === null ? Math.min(l.ligand.denticity, l.donors.length) : 1;
}

function hasOneKnownSphere(entity: RawEntity): boolean {
  const single = entity.metals.length === 1 && entity.metals[0]!.count === 1;
  return single && entity.ligands.length > 0 && entity.ligands.every((l) => l.known);
}

const donorSum = (way: Denticities) => [...way].reduce((sum, [l, d]) => sum + l.count * d, 0);

const isFlexible = (l: RawLigand) =>
  l.denticity === null && l.hapticity === null && l.ligand.denticities.length > 1 && l.donors.length > 1;

/** All ways in which the flexible ligands can hold, their usual ways first. */
function waysOf(entity: RawEntity, usual: Denticities): Denticities[] {
  return entity.ligands
    .filter(isFlexible)
    .sort((a, b) => (a.ligand.abbreviation < b.ligand.abbreviation ? -1 : 1))
    .reduce<Denticities[]>(
      (ways, l) => ways.flatMap((w) => l.ligand.denticities.map((d) => new Map(w).set(l, d))).slice(0, MOST_WAYS),
      [usual],
    );
}

function takenWay(entity: RawEntity, usual: Denticities): Denticities {
  if ([4, 6].includes(donorSum(usual))) return usual;
  const ways = waysOf(entity, usual);
  return ways.find((w) => donorSum(w) === 6) ?? ways.find((w) => donorSum(w) === 4) ?? usual;
}

/** Numbers of donors as likely as each other for a centre: more than six for the large ones on the left. */
function likelyNumbers(symbol: string): readonly number[] {
  if (/^(Pd|Pt|Au)$/.test(symbol)) return [4];
  const group = findElement(symbol)?.group ?? 0;
  if (group === 3) return [6, 8, 9];
  return group <= 5 ? [4, 6, 8] : [4, 6];
}

/**
 * Settle how ligands hold that can do so by one atom or two: as written by a κ, as the sphere implies, else as a
 * person says. What the sphere implies is never kept as a statement, so that both spellings are one entity.
 *
 * @returns the entity, and whether the coordination number hangs on an open question
 */
export function settleBinding(entity: RawEntity, context: Context): { entity: RawEntity; open: boolean } {
  if (!hasOneKnownSphere(entity)) return { entity: withoutStated(entity, (l) => l.ligand.denticity), open: false };
  const silent = { ...entity, ligands: entity.ligands.map((l) => ({ ...l, denticity: null })) };
  const { denticity: implied } = coordination(silent);
  if (!isUndecided(silent))
    return { entity: withoutStated(entity, (_, i) => implied.get(silent.ligands[i]!) ?? null), open: false };
  let open = false;
  const ligands = entity.ligands.map((l) => {
    if (!EITHER_WAY.test(l.ligand.abbreviation) || !isFlexible(l)) return l;
    const code = context.codeAt('denticity', l.start);
    const answer = Number(context.answers[code]);
    if (l.ligand.denticities.includes(answer)) return { ...l, denticity: answer };
    context.ask({
      code,
      detail: `${l.ligand.abbreviation} can hold ${entity.metals[0]!.element} by one atom or by two, and the sphere allows both.`,
      choices: l.ligand.denticities.map((d) => ({ value: String(d), label: waysLabel(l, d, entity) })),
      position: context.source.at[l.start],
    });
    open = true;
    return l;
  });
  return { entity: { ...entity, ligands: mergeLigands(ligands) }, open };
}

function waysLabel(l: RawLigand, denticity: number, entity: RawEntity): string {
  const rest = donorSum(new Map(entity.ligands.filter((o) => o !== l).map((o) => [o, usualDenticity(o)])));
  const atoms = denticity === 1 ? 'κO, by one atom' : `κ${denticity}O,O′, chelating`;
  return `${atoms}: ${rest + l.count * denticity} donors`;
}

function isUndecided(entity: RawEntity): boolean {
  const flexible = entity.ligands.filter(isFlexible);
  if (!flexible.some((l) => EITHER_WAY.test(l.ligand.abbreviation))) return false;
  const usual = new Map(entity.ligands.map((l) => [l, usualDenticity(l)] as const));
  const numbers = new Set(waysOf(entity, usual).map(donorSum));
  return likelyNumbers(entity.metals[0]!.element).filter((n) => numbers.has(n)).length > 1;
}

/** Drop what a κ states where it is implied anyway. */
function withoutStated(entity: RawEntity, implied: (l: RawLigand, index: number) => number | null): RawEntity {
  if (entity.ligands.every((l) => l.denticity === null)) return entity;
  const ligands = entity.ligands.map((l, i) => (l.denticity === implied(l, i) ? { ...l, denticity: null } : l));
  return { ...entity, ligands: mergeLigands(ligands) };
}
