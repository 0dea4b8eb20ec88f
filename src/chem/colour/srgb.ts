import type { Triple } from './tristimulus.ts';

/** A colour for a screen. */
export interface ScreenColour {
  /** Linear components before clipping; outside 0..1 where no screen of sRGB can show the colour. */
  linear: Triple;
  /** Encoded components, 0..255, each clipped by itself. */
  sRGB: Triple;
  hex: string;
  inGamut: boolean;
}

/** Linear components may leave 0..1 by so much through the four digits of the matrix alone (white gives 1.0003). */
const GAMUT_SLACK = 0.002;

/**
 * sRGB of tristimulus values under D65 (Y = 100 for white).
 *
 * @see IEC 61966-2-1:1999 (matrix and encoding)
 */
export function xyzToSrgb(xyz: Triple): ScreenColour {
  const [x, y, z] = xyz.map((value) => value / 100) as Triple;
  const linear: Triple = [
    3.2406 * x - 1.5372 * y - 0.4986 * z,
    -0.9689 * x + 1.8758 * y + 0.0415 * z,
    0.0557 * x - 0.204 * y + 1.057 * z,
  ];
  const sRGB = linear.map((value) => Math.round(255 * srgbEncode(Math.min(1, Math.max(0, value))))) as Triple;
  return {
    linear,
    sRGB,
    hex: `#${sRGB.map((value) => value.toString(16).padStart(2, '0')).join('')}`,
    inGamut: linear.every((value) => value >= -GAMUT_SLACK && value <= 1 + GAMUT_SLACK),
  };
}

/** Encoded component 0..1 of a linear one 0..1 (IEC 61966-2-1: 12.92 v up to 0.0031308, a power of 1/2.4 above). */
export function srgbEncode(linear: number): number {
  return linear <= 0.0031308 ? 12.92 * linear : 1.055 * linear ** (1 / 2.4) - 0.055;
}

/** Linear component of an encoded one, both 0..1. */
export function srgbDecode(encoded: number): number {
  return encoded <= 0.04045 ? encoded / 12.92 : ((encoded + 0.055) / 1.055) ** 2.4;
}
