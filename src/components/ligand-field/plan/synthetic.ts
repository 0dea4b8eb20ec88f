import type { PlannedBand } from '#src/chem/planning/index.ts';

/** Full width at half height in cm⁻¹ that such bands usually have (common practice). */
const WIDTH = { 'd-d': 3500, 'spin-forbidden': 1000, LMCT: 6000 } as const;
const FROM = 12_500;
const TO = 26_500;
const STEP = 100;

/** A spectrum of Gaussians of the typical strength, over the visible: for a hint of the colour and no more. */
export function syntheticSpectrum(
  bands: readonly Pick<PlannedBand, 'kind' | 'wavenumber' | 'spinAllowed' | 'epsilon'>[],
): {
  x: number[];
  epsilon: number[];
} {
  const x = Array.from({ length: (TO - FROM) / STEP + 1 }, (_, i) => FROM + i * STEP);
  const epsilon = x.map((wavenumber) =>
    bands.reduce((sum, band) => {
      const width = band.kind === 'd-d' && !band.spinAllowed ? WIDTH['spin-forbidden'] : WIDTH[band.kind];
      return sum + band.epsilon.typical * Math.exp(-4 * Math.LN2 * ((wavenumber - band.wavenumber) / width) ** 2);
    }, 0),
  );
  return { x, epsilon };
}
