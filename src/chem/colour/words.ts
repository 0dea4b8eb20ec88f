import { DomainError } from '../errors.ts';
import { type Triple, whiteD65 } from './tristimulus.ts';

/** A stretch of the visible, the word for light of it, and the word for what is seen when it is taken away. */
interface Stretch {
  fromNm: number;
  toNm: number;
  absorbed: string;
  seen: string;
}

/** Absorbed and complementary colours (common practice, e.g. A. I. Vogel, Quantitative Inorganic Analysis, from memory). */
const STRETCHES: readonly Stretch[] = [
  { fromNm: 400, toNm: 435, absorbed: 'violet', seen: 'yellow-green' },
  { fromNm: 435, toNm: 480, absorbed: 'blue', seen: 'yellow' },
  { fromNm: 480, toNm: 490, absorbed: 'green-blue', seen: 'orange' },
  { fromNm: 490, toNm: 500, absorbed: 'blue-green', seen: 'red' },
  { fromNm: 500, toNm: 560, absorbed: 'green', seen: 'purple' },
  { fromNm: 560, toNm: 580, absorbed: 'yellow-green', seen: 'violet' },
  { fromNm: 580, toNm: 595, absorbed: 'yellow', seen: 'blue' },
  { fromNm: 595, toNm: 650, absorbed: 'orange', seen: 'green-blue' },
  { fromNm: 650, toNm: 750, absorbed: 'red', seen: 'blue-green' },
];

/**
 * Word for the light that a single band absorbs, and for what is then seen. With two bands in the visible the words
 * fail and the colour must be computed.
 *
 * @param nm - the band's maximum
 * @returns null outside 400–750 nm, where a band does not colour by itself
 */
export function complementaryColour(nm: number): { absorbed: string; seen: string } | null {
  if (!Number.isFinite(nm)) throw new DomainError('out-of-range', `${nm} is not a wavelength`, 'wavelength');
  const last = STRETCHES.length - 1;
  const found = STRETCHES.find(({ fromNm, toNm }, i) => nm >= fromNm && (nm < toNm || (i === last && nm === toNm)));
  return found ? { absorbed: found.absorbed, seen: found.seen } : null;
}

/** Words by the hue angle of CIELAB, each up to its bound in degrees (common practice, chosen on named pigments). */
const HUES: readonly (readonly [bound: number, word: string])[] = [
  ...([
    [15, 'pink'],
    [45, 'red'],
    [72, 'orange'],
    [102, 'yellow'],
    [122, 'yellow-green'],
    [170, 'green'],
  ] as const),
  ...([
    [215, 'blue-green'],
    [290, 'blue'],
    [315, 'violet'],
    [350, 'purple'],
    [360, 'pink'],
  ] as const),
];

/**
 * The colour in words: lightness, strength and hue of CIELAB under D65, such as "pale blue" or "deep violet".
 *
 * @see CIE 015:2018 for CIELAB (from memory); the words are ours
 */
export function nameColour(xyz: Triple): string {
  const { lightness, chroma, hue } = cielab(xyz);
  if (chroma < 4) {
    if (lightness > 97) return 'colourless';
    return lightness < 12 ? 'black' : lightness > 75 ? 'pale grey' : 'grey';
  }
  if (lightness < 8) return 'nearly black';
  let word = HUES.find(([bound]) => hue < bound)?.[1] ?? 'pink';
  if (word === 'pink' && lightness < 60) word = 'red';
  if (word === 'orange' && lightness < 50) word = 'brown';
  if (chroma < 20 && lightness > 70) return `pale ${word}`;
  if (lightness < 40 && word !== 'brown') return `deep ${word}`;
  return word;
}

/** Lightness 0..100, chroma, and hue angle in degrees 0..360. */
export function cielab(xyz: Triple): { lightness: number; chroma: number; hue: number } {
  const [x, y, z] = xyz.map((value, i) => cubeRoot(value / whiteD65[i]!)) as Triple;
  const [a, b] = [500 * (x - y), 200 * (y - z)];
  const degrees = (Math.atan2(b, a) * 180) / Math.PI;
  return { lightness: 116 * y - 16, chroma: Math.hypot(a, b), hue: (degrees + 360) % 360 };
}

/** Cube root with the straight part near zero that CIELAB has. */
function cubeRoot(ratio: number): number {
  return ratio > (6 / 29) ** 3 ? Math.cbrt(ratio) : (ratio * (29 / 6) ** 2) / 3 + 4 / 29;
}
