import type { SpectrumRecord, SpectrumSummary } from '#src/contracts/spectra.ts';

type Technique = SpectrumSummary['technique'];

/** Techniques as people name them; the words the cautions look for are among them. */
export const TECHNIQUES: Record<Technique, string> = {
  solution: 'solution absorption',
  reflectance: 'diffuse reflectance',
  transmission: 'transmission',
  emission: 'emission',
  'circular-dichroism': 'circular dichroism',
};

export const PHASES: Record<string, string> = {
  solution: 'solution',
  glass: 'frozen glass',
  film: 'film',
  crystal: 'crystal',
  powder: 'powder',
};

/** Flags in a word or two, for tables; the sentence of the flag itself tells more. */
export const FLAGS: Record<string, string> = {
  'below-cutoff': 'below cut-off',
  'unknown-solvent': 'solvent not listed',
  'no-solvent': 'no solvent',
  'absorbance-high': 'absorbance high',
  saturated: 'saturated',
  'negative-absorbance': 'negative absorbance',
  'no-concentration': 'no concentration',
  'no-path-length': 'no path length',
};

/** Units and quantities of a file, in words. */
export const UNIT_WORDS: Record<string, string> = {
  nm: 'wavelength in nm',
  um: 'wavelength in µm',
  'cm-1': 'wavenumber in cm⁻¹',
  eV: 'photon energy in eV',
  THz: 'frequency in THz',
  absorbance: 'absorbance',
  transmittance: 'transmittance',
  'percent-transmittance': 'transmittance in %',
  epsilon: 'molar absorption coefficient ε',
  'log-epsilon': 'log ε',
  'kubelka-munk': 'Kubelka–Munk F(R)',
  reflectance: 'reflectance',
  'percent-reflectance': 'reflectance in %',
  'delta-epsilon': 'Δε',
  emission: 'emission intensity',
  arbitrary: 'arbitrary',
};

/** Symbols of the quantities a band's height is told in. */
export const HEIGHTS: Record<string, string> = {
  epsilon: 'ε',
  absorbance: 'A',
  'kubelka-munk': 'F(R)',
  'delta-epsilon': 'Δε',
  emission: 'intensity',
};

const percent = (fraction: number) => `${Number((100 * fraction).toPrecision(3))} %`;

/** "water", or "ethanol 80 %, water 20 %"; null where none is stated. */
export function solventText(solvent: SpectrumSummary['solvent']): string | null {
  const [only, ...others] = solvent;
  if (!only) return null;
  if (others.length === 0) return only.name;
  return solvent.map(({ name, volumeFraction }) => `${name} ${percent(volumeFraction)}`).join(', ');
}

/** Solvent and temperature of a measurement in one line: "water, 298 K". */
export function mediumText({ solvent, temperature }: Pick<SpectrumSummary, 'solvent' | 'temperature'>): string {
  const parts = [solventText(solvent), temperature === null ? null : `${Number(temperature.toPrecision(4))} K`];
  return parts.filter((part) => part !== null).join(', ');
}

/** Range of a spectrum in nm, rounded outwards to whole ones: "200–800 nm". */
export function rangeText({ xMin, xMax }: Pick<SpectrumRecord, 'xMin' | 'xMax'>): string {
  const [from, to] = [1e7 / xMax, 1e7 / xMin].map((nm) => Math.round(nm));
  return `${from}–${to} nm`;
}
