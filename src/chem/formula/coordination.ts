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

/** Vertices that one copy of a ligand takes at its centre, and the sum over all. */
export interface Coordination {
  number: number | null;
  denticity: ReadonlyMap<RawLigand, number>;
}

/**
 * Coordination number of a mononuclear entity: donor atoms, a hapto ligand counting one (its centroid). Ligands that
 * can hold by one or two atoms (carbonate, nitrate, acetate) take what makes six, or else four, donors. Null for
 * several centres, for a bare ion, and while a ligand is unknown.
 */
export function coordination(entity: RawEntity): Coordination {
  const usual = new Map(entity.ligands.map((l) => [l, l.hapticity === null ? l.ligand.denticity : 1] as const));
  const single = entity.metals.length === 1 && entity.metals[0]!.count === 1;
  if (!single || entity.ligands.length === 0 || entity.ligands.some((l) => !l.known))
    return { number: null, denticity: usual };
  const sum = (denticity: ReadonlyMap<RawLigand, number>) =>
    entity.ligands.reduce((total, l) => total + l.count * (denticity.get(l) ?? 1), 0);
  const flexible = entity.ligands.filter((l) => l.hapticity === null && l.ligand.denticities.length > 1);
  const ways = flexible
    .flatMap((l) => l.ligand.denticities.map((d) => new Map(usual).set(l, d)))
    .concat([new Map(usual)]);
  const taken =
    [4, 6].includes(sum(usual)) || flexible.length === 0
      ? usual
      : (ways.find((w) => sum(w) === 6) ?? ways.find((w) => sum(w) === 4) ?? usual);
  return { number: sum(taken), denticity: taken };
}
