import type { Isomer, IsomerList } from '#src/chem/geometry/index.ts';
import type { IsomerPick } from './settle.ts';

/** A choice among the isomers, as a card: one form, one hand of a pair, or the pair. */
export interface IsomerCard {
  /** Unique among the cards of a list. */
  value: string;
  pick: NonNullable<IsomerPick>;
  isomer: Isomer;
  title: string;
  remark: string;
}

export const pickValue = (pick: IsomerPick): string => (pick ? `${pick.index}${pick.rac ? ' rac' : ''}` : 'none');

/**
 * The cards of a list, in its order: achiral forms, and of each pair of mirror images the pair first, then the hands
 * where they have a name. Hands without one cannot be told apart in a record, so only the pair is offered.
 */
export function isomerCards({ isomers }: IsomerList): IsomerCard[] {
  const cards: IsomerCard[] = [];
  const card = (index: number, rac: boolean, hand: string, remark: string) => {
    const isomer = isomers[index]!;
    const title = [isomer.descriptor, hand].filter(Boolean).join(', ') || 'the one form';
    cards.push({ value: pickValue({ index, rac }), pick: { index, rac }, isomer, title, remark });
  };
  for (let index = 0; index < isomers.length; index++) {
    const one = isomers[index]!;
    if (!one.chiral) {
      card(index, false, '', 'no mirror pair');
      continue;
    }
    const other = isomers[index + 1];
    card(index, true, 'rac', 'racemate, or hand not known');
    if (one.chirality && other?.chirality) {
      card(index, false, one.chirality, `mirror image of ${other.chirality}`);
      card(index + 1, false, other.chirality, `mirror image of ${one.chirality}`);
    }
    index += 1;
  }
  return cards;
}

/** "3 possible, one pair of mirror images". */
export function countSentence({ count, enantiomericPairs }: IsomerList): string {
  const possible = count === 1 ? '1 possible' : `${count} possible`;
  if (enantiomericPairs === 0) return possible;
  return `${possible}, ${enantiomericPairs === 1 ? 'one pair' : `${enantiomericPairs} pairs`} of mirror images`;
}
