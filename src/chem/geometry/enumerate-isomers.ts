import { DomainError } from '../errors.ts';
import { isLinear } from '../symmetry/permuting-operations.ts';
import { pointGroup, stabiliser } from '../symmetry/point-group.ts';
import { type Arrangement, arrangementKey, arrangements, donorColours, moved } from './arrangements.ts';
import { burnsideCount } from './burnside.ts';
import { findGeometry, type Geometry, operationsOf } from './catalogue.ts';
import { skewLineChirality } from './handedness.ts';
import { type LigandKind, type LigandSlot, ligandKinds } from './ligand-slot.ts';
import { descriptors } from './naming.ts';
import { viewMirror } from './view.ts';

/** Which ligands on which polyhedron. */
export interface IsomerRequest {
  /** Polyhedral symbol. */
  geometry: string;
  ligands: LigandSlot[];
}

/** One stereoisomer of the ideal polyhedron; ring pucker and substituents are left out. */
export interface Isomer {
  /** Name that tells it from the other forms, mirror images alike; null where there is one form or no such name. */
  descriptor: string | null;
  chiral: boolean;
  /** Δ or Λ where skew chelate edges say so; null otherwise, in chiral isomers too. */
  chirality: 'Δ' | 'Λ' | 'C' | 'A' | null;
  /** Framework group: keeps donors and chelate edges. */
  pointGroup: string;
  /** Group of the donors alone, told apart by their labels. */
  donorSetGroup: string;
  /** Donor label at each vertex. */
  sites: string[];
  /** Which ligand stands at each vertex, numbered through the request. */
  ligandOfSite: number[];
  /** Pairs of vertices i < j joined by a chelate ring. */
  chelates: [number, number][];
}

export interface IsomerList {
  /** Stereoisomers, enantiomers counted as two. */
  count: number;
  enantiomericPairs: number;
  /** Higher symmetry first; enantiomers side by side, Λ before Δ, the second the mirror image of the first as drawn. */
  isomers: Isomer[];
}

/** Isomers that are listed at most. */
const MAX_ISOMERS = 5_040;

/**
 * All stereoisomers of a complex with an ideal coordination polyhedron: the orbits, under the proper rotations, of the
 * ways of setting down its ligands, each chelate ring on an edge.
 *
 * Where the polyhedron has no room for the ligands (any chelate on L-2) the list is empty.
 *
 * @throws {DomainError} field `geometry`: `unsupported` symbol; field `ligands`: see `ligandKinds`, and `too-large`
 *   where more would have to be searched or listed than is reasonable
 */
export function enumerateIsomers(request: IsomerRequest): IsomerList {
  const { geometry, kinds } = resolve(request);
  const forms = findForms(geometry, kinds);
  const names = descriptors(
    geometry,
    forms.map(({ arrangement }) => labelled(arrangement, kinds)),
  );
  const isomers = forms.flatMap(({ arrangement, chiral }, n) => {
    const one = describe(geometry, kinds, arrangement, chiral, names[n]!);
    if (!chiral) return [one];
    const other = describe(geometry, kinds, moved(arrangement, viewMirror(geometry)), chiral, names[n]!);
    return one.chirality === 'Δ' ? [other, one] : [one, other];
  });
  const enantiomericPairs = forms.filter(({ chiral }) => chiral).length;
  return { count: isomers.length, enantiomericPairs, isomers };
}

/**
 * Number of stereoisomers without listing them; see `burnsideCount`.
 *
 * @throws {DomainError} as `enumerateIsomers`
 */
export function countIsomers(request: IsomerRequest): number {
  const { geometry, kinds } = resolve(request);
  return burnsideCount(geometry, kinds);
}

/**
 * Which isomer of a list has these donors at these vertices, in whatever orientation.
 *
 * @param sites - donor label at each vertex
 * @param chelates - linked pairs of vertices; without them the donors alone must decide
 * @returns its index, or null where none fits or several do
 */
export function isomerIndex(
  request: IsomerRequest,
  list: IsomerList,
  sites: readonly string[],
  chelates?: readonly (readonly [number, number])[],
): number | null {
  const { geometry } = resolve(request);
  const key = (labels: readonly string[], links: readonly (readonly [number, number])[]): string =>
    JSON.stringify([labels, links.map(([i, j]) => (i < j ? [i, j] : [j, i])).sort()]);
  const wanted = key(sites, chelates ?? []);
  const fitting = list.isomers.flatMap((isomer, index) => {
    const fits = operationsOf(geometry).some(({ permutation, proper }) => {
      if (!proper) return false;
      const labels: string[] = [];
      permutation.forEach((target, i) => {
        labels[target] = isomer.sites[i]!;
      });
      const links = isomer.chelates.map(([i, j]): [number, number] => [permutation[i]!, permutation[j]!]);
      return key(labels, chelates ? links : []) === wanted;
    });
    return fits ? [index] : [];
  });
  return fitting.length === 1 ? fitting[0]! : null;
}

function resolve(request: IsomerRequest): { geometry: Geometry; kinds: LigandKind[] } {
  const geometry = findGeometry(request.geometry);
  if (!geometry) {
    throw new DomainError('unsupported', `no geometry has the symbol ${request.geometry}`, 'geometry');
  }
  return { geometry, kinds: ligandKinds(request.ligands, geometry) };
}

interface Form {
  arrangement: Arrangement;
  chiral: boolean;
}

/** One arrangement of each form, mirror images taken together. */
function findForms(geometry: Geometry, kinds: readonly LigandKind[]): Form[] {
  const operations = operationsOf(geometry);
  const seen = new Set<string>();
  const forms: (Form & { order: number; key: string })[] = [];
  let listed = 0;
  for (const arrangement of arrangements(geometry, kinds)) {
    if (seen.has(arrangementKey(arrangement))) continue;
    let first = { key: arrangementKey(arrangement), arrangement };
    for (const { permutation, proper } of operations) {
      const image = moved(arrangement, permutation);
      const key = arrangementKey(image);
      seen.add(key);
      if (proper && key < first.key) first = { key, arrangement: image };
    }
    const kept = stabiliser(operations, first.arrangement);
    const chiral = kept.every(({ proper }) => proper);
    listed += chiral ? 2 : 1;
    if (listed > MAX_ISOMERS) {
      throw new DomainError('too-large', `more than ${MAX_ISOMERS} isomers`, 'ligands');
    }
    forms.push({ ...first, chiral, order: kept.length });
  }
  return forms.sort((a, b) => b.order - a.order || (a.key < b.key ? -1 : 1));
}

function labelled({ colours, owners, links }: Arrangement, kinds: readonly LigandKind[]) {
  const { labels } = donorColours(kinds);
  const chelates = [...links].sort(([a, b], [c, d]) => a - c || b - d);
  return { sites: colours.map((colour) => labels[colour]!), ligandOfSite: [...owners], chelates };
}

function describe(
  geometry: Geometry,
  kinds: readonly LigandKind[],
  arrangement: Arrangement,
  chiral: boolean,
  descriptor: string | null,
): Isomer {
  const { sites, ligandOfSite, chelates } = labelled(arrangement, kinds);
  const operations = operationsOf(geometry);
  const linear = isLinear(geometry.vertices);
  return {
    descriptor,
    chiral,
    chirality: chiral ? skewLineChirality(geometry, chelates) : null,
    pointGroup: pointGroup(operations, arrangement, linear),
    donorSetGroup: pointGroup(operations, { colours: sites, links: [] }, linear),
    sites,
    ligandOfSite,
    chelates,
  };
}
