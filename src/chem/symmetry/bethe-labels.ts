/** What a number is given to. */
interface Numbered {
  label: string;
  pair: boolean;
  /** Half-integer irreps follow the others. */
  spinor: boolean;
}

/** Orders in which Koster numbers otherwise than the tables print: by label, or by j for the half-integer ones. */
const hexagonal = ['1/2', '5/2', '3/2'];
const own: Record<string, { single?: readonly string[]; spinors?: readonly string[] }> = {
  D2: { single: ['A', 'B2', 'B1', 'B3'] },
  C2v: { single: ['A1', 'B1', 'A2', 'B2'] },
  D2h: { single: ['Ag', 'B2g', 'B1g', 'B3g', 'Au', 'B2u', 'B1u', 'B3u'] },
  D3h: { single: ["A1'", "A2'", "A1''", "A2''", "E''", "E'"], spinors: hexagonal },
  D6: { spinors: hexagonal },
  C6v: { spinors: hexagonal },
  D6h: { spinors: hexagonal },
};

/**
 * Bethe's numbers for the irreps of a double group, those of one parity numbered by themselves: Γ1 … for those of the
 * point group, then on for the half-integer ones.
 *
 * The order is that of Koster, Dimmock, Wheeler and Statz (1963, from memory) for O, Oh, Td, D4, D4h, D3, D3d, T, D6
 * and those above; groups that are no crystal classes, and the cyclic ones, are numbered by the same rule in the order
 * of the table.
 *
 * @param irreps - in the order of the table
 */
export function betheLabels(symbol: string, irreps: readonly Numbered[]): string[] {
  const labels = irreps.map(() => '');
  for (const sign of ['+', '-', ''] as const) {
    const members = irreps.map((irrep, k) => ({ ...irrep, k })).filter(({ label }) => signOf(label) === sign);
    let next = 1;
    for (const { k, pair } of members.sort((a, b) => rank(symbol, a, a.k) - rank(symbol, b, b.k))) {
      labels[k] = pair ? `Γ${next}${sign},Γ${next + 1}${sign}` : `Γ${next}${sign}`;
      next += pair ? 2 : 1;
    }
  }
  return labels;
}

const signOf = (label: string): '+' | '-' | '' => (label.endsWith('g') ? '+' : label.endsWith('u') ? '-' : '');

function rank(symbol: string, { label, spinor }: Numbered, place: number): number {
  const { single, spinors } = own[symbol] ?? {};
  if (!spinor) return single ? single.indexOf(label) : place;
  const at = spinors?.findIndex((j) => label.includes(j)) ?? -1;
  return 1000 + (at < 0 ? place : at);
}
