/** A sentence with chemistry in it, in pieces that each know how they are set. */
export type Piece =
  | string
  | { term: string }
  | { irrep: string }
  | { group: string }
  | { operation: string }
  | { sum: readonly { irrep: string; count: number }[] }
  | { direction: string }
  | { unit: string };

/** Pieces with commas between, and “and” before the last. */
export function listed(items: readonly Piece[], last = ' and '): Piece[] {
  return items.flatMap((item, i): Piece[] => (i === 0 ? [item] : [i === items.length - 1 ? last : ', ', item]));
}

/** Factors with ⊗ between. */
export const product = (irreps: readonly string[]): Piece[] =>
  irreps.flatMap((irrep, i): Piece[] => (i === 0 ? [{ irrep }] : [' ⊗ ', { irrep }]));

/** The sentence as plain text: `A2g ⊗ T2g = T1g`. */
export const plainText = (pieces: readonly Piece[]): string =>
  pieces
    .map((piece) => {
      if (typeof piece === 'string') return piece;
      if ('sum' in piece) {
        return piece.sum.map(({ irrep, count }) => `${count > 1 ? count : ''}${irrep}`).join(' + ') || '0';
      }
      return Object.values(piece)[0] as string;
    })
    .join('');
