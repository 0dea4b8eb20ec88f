/** Pigments of donor atoms, for orientation only: the letter in the disc is what tells them apart. */
const BY_ELEMENT: Record<string, string> = {
  N: 'var(--color-zaffre)',
  O: 'var(--color-band-lmct)',
  S: 'var(--color-band-intraligand)',
  Se: 'var(--color-band-intraligand)',
  P: 'var(--color-band-interligand)',
  As: 'var(--color-band-interligand)',
  C: 'var(--color-band-none)',
  F: 'var(--color-band-other)',
  Cl: 'var(--color-band-other)',
  Br: 'var(--color-band-other)',
  I: 'var(--color-band-intervalence)',
  H: 'var(--color-band-none)',
};
const IN_TURN = [
  'var(--color-zaffre)',
  'var(--color-band-intraligand)',
  'var(--color-band-mlct)',
  'var(--color-band-lmct)',
  'var(--color-band-intervalence)',
  'var(--color-band-other)',
];

/**
 * A pigment for each kind of donor that occurs. Element symbols have their own; other labels (A, B, …) take turns in the
 * order in which they first occur.
 */
export function donorColours(sites: readonly string[]): Map<string, string> {
  const kinds = [...new Set(sites)];
  const areElements = kinds.every((kind) => kind in BY_ELEMENT);
  const colours = kinds.map((kind, i) => (areElements ? BY_ELEMENT[kind]! : IN_TURN[i % IN_TURN.length]!));
  return new Map(kinds.map((kind, i) => [kind, colours[i]!]));
}
