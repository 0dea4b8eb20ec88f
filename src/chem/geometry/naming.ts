import { type Geometry, transPairs } from './catalogue.ts';
import { pillarsText, ringText, trianglesText } from './site-texts.ts';

/** What a name can be read from: donor labels, ligands and chelate links at the vertices. */
export interface LabelledArrangement {
  sites: string[];
  ligandOfSite: number[];
  chelates: [number, number][];
}

const WITH_AXIS = new Set(['TBPY-5', 'PBPY-7', 'HBPY-8', 'HBPY-9']);
const WITH_TRANS_PAIRS = new Set(['TS-3', 'SP-4', 'SPY-4', 'SS-4', 'SPY-5', 'OC-6']);

/**
 * Names that tell isomers apart, mirror images being named alike.
 *
 * A short name (cis, trans, fac, mer, all-cis, trans-A, cis-α, axial: A, B …) where it fits one form only; else with
 * the trans pairs, the order round the ring or the triangles, or these alone; null where that is still not enough, or where there is only one form.
 *
 * @param forms - one arrangement of each form, all of the same ligands
 */
export function descriptors(geometry: Geometry, forms: readonly LabelledArrangement[]): (string | null)[] {
  if (forms.length < 2) return forms.map(() => null);
  const view = new Forms(geometry, forms);
  const short = forms.map((form) => view.shortName(form));
  const text = forms.map((form) => view.fullText(form));
  const both = short.map((name, n) => [name, text[n]].filter(Boolean).join('; ') || null);
  const unique = (list: (string | null)[], n: number): string | null => {
    const name = list[n] ?? null;
    return name !== null && list.filter((other) => other === name).length === 1 ? name : null;
  };
  return forms.map((_, n) => unique(short, n) ?? unique(both, n));
}

class Forms {
  private readonly trans: readonly [number, number][];
  private readonly tally: Map<string, number>;
  /** Labels of exactly two donors that face each other in at least one form. */
  private readonly twins: string[];
  private readonly allOrNone: boolean;

  constructor(
    private readonly geometry: Geometry,
    forms: readonly LabelledArrangement[],
  ) {
    this.trans = WITH_TRANS_PAIRS.has(geometry.symbol) ? transPairs(geometry) : [];
    this.tally = new Map();
    for (const label of forms[0]!.sites) this.tally.set(label, (this.tally.get(label) ?? 0) + 1);
    const pairs = this.labelsWith(2);
    this.twins = pairs.filter((label) => forms.some((form) => this.isTrans(form, label)));
    this.allOrNone = forms.every((form) => {
      const facing = this.facingTwins(form).length;
      return facing === 0 || facing === this.twins.length;
    });
  }

  shortName(form: LabelledArrangement): string | null {
    const { symbol } = this.geometry;
    if (WITH_AXIS.has(symbol)) return `axial: ${[form.sites[0]!, form.sites[1]!].sort().join(', ')}`;
    if (symbol === 'SPY-5') return `apical: ${form.sites[0]}`;
    if (symbol === 'TPR-6') return pillarsText(form.sites);
    if (symbol === 'TS-3') return `stem: ${form.sites[0]}`;
    if (symbol === 'OC-6') return this.polydentateName(form) ?? this.tripleName(form) ?? this.pairName(form);
    return symbol === 'SP-4' || symbol === 'SPY-4' ? this.pairName(form) : null;
  }

  fullText(form: LabelledArrangement): string | null {
    if (this.geometry.symbol === 'TPR-6') return trianglesText(form.sites);
    if (this.trans.length === 0) return ringText(this.geometry, form.sites);
    const pairs = this.trans.map((pair) =>
      pair
        .map((vertex) => form.sites[vertex]!)
        .sort()
        .join('–'),
    );
    return `trans: ${pairs.sort().join(', ')}`;
  }

  /** fac and mer of tridentates; trans, cis-α and cis-β of tetradentates. */
  private polydentateName(form: LabelledArrangement): string | null {
    const ligands = [...new Set(form.ligandOfSite)].map((owner) =>
      form.ligandOfSite.flatMap((other, vertex) => (other === owner ? [vertex] : [])),
    );
    const four = ligands.find((vertices) => vertices.length === 4);
    if (four) return this.tetradentateName(form, four);
    const threes = ligands.filter((vertices) => vertices.length === 3);
    if (threes.length === 0) return null;
    const names = new Set(threes.map((vertices) => (this.pairsWithin(vertices).length > 0 ? 'mer' : 'fac')));
    if (names.size > 1) return null;
    const [name] = names;
    const middles = threes.map((vertices) => vertices.find((vertex) => this.linksAt(form, vertex) === 2));
    const sameKind =
      new Set(
        threes.map((vertices) =>
          vertices
            .map((v) => form.sites[v])
            .sort()
            .join(),
        ),
      ).size === 1;
    if (name !== 'fac' || threes.length !== 2 || !sameKind || middles.includes(undefined)) return name ?? null;
    return this.areFacing(middles[0]!, middles[1]!) ? 'sym-fac' : 'unsym-fac';
  }

  private tetradentateName(form: LabelledArrangement, vertices: readonly number[]): string {
    const facing = this.pairsWithin(vertices);
    if (facing.length === 2) return 'trans';
    const ends = vertices.filter((vertex) => this.linksAt(form, vertex) === 1);
    const isChain = ends.length === 2 && vertices.every((vertex) => this.linksAt(form, vertex) <= 2);
    if (!isChain) return 'cis';
    return this.areFacing(ends[0]!, ends[1]!) ? 'cis-α' : 'cis-β';
  }

  private tripleName(form: LabelledArrangement): string | null {
    const triples = this.labelsWith(3);
    if (triples.length === 0) return null;
    return triples.some((label) => this.isTrans(form, label)) ? 'mer' : 'fac';
  }

  /** By the pairs of like donors, or by the two single donors beside four like ones or symmetric chelates. */
  private pairName(form: LabelledArrangement): string | null {
    const facing = this.facingTwins(form);
    if (this.twins.length === 0) {
      const singles = form.sites.flatMap((label, vertex) => (this.tally.get(label) === 1 ? [vertex] : []));
      if (singles.length !== 2) return null;
      return this.areFacing(singles[0]!, singles[1]!) ? 'trans' : 'cis';
    }
    if (this.allOrNone && this.twins.length * 2 < form.sites.length) return facing.length > 0 ? 'trans' : 'cis';
    if (this.allOrNone && this.trans.length === 2) return facing.length > 0 ? 'trans' : 'cis';
    if (facing.length === 0) return 'all-cis';
    if (facing.length * 2 === form.sites.length) return 'all-trans';
    return facing.map((label) => `trans-${label}`).join(', ');
  }

  private labelsWith(count: number): string[] {
    return [...this.tally].flatMap(([label, n]) => (n === count ? [label] : [])).sort();
  }

  private facingTwins(form: LabelledArrangement): string[] {
    return this.twins.filter((label) => this.isTrans(form, label));
  }

  private isTrans(form: LabelledArrangement, label: string): boolean {
    return this.trans.some(([i, j]) => form.sites[i] === label && form.sites[j] === label);
  }

  private areFacing(a: number, b: number): boolean {
    return this.trans.some(([i, j]) => (i === a && j === b) || (i === b && j === a));
  }

  private pairsWithin(vertices: readonly number[]): readonly [number, number][] {
    return this.trans.filter(([i, j]) => vertices.includes(i) && vertices.includes(j));
  }

  private linksAt(form: LabelledArrangement, vertex: number): number {
    return form.chelates.filter((pair) => pair.includes(vertex)).length;
  }
}
