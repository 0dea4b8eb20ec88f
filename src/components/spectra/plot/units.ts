/** Units of the horizontal axis. */
export type XUnit = 'nm' | 'cm-1' | 'eV';
/** Quantities of the vertical axis: those that can be chosen, and those of techniques that give neither ε nor A. */
export type YUnit =
  | 'epsilon'
  | 'absorbance'
  | 'log-epsilon'
  | 'transmittance'
  | 'percent-transmittance'
  | 'kubelka-munk'
  | 'reflectance'
  | 'percent-reflectance'
  | 'delta-epsilon'
  | 'emission'
  | 'arbitrary';

/** Wavenumber in cm⁻¹ of one electronvolt, e/(hc). @see CODATA 2018 (exact by the SI of 2019) */
export const PER_CM_OF_EV = 8065.543937;

/** A wavenumber (cm⁻¹) in another unit of the axis. */
export function fromWavenumber(wavenumber: number, unit: XUnit): number {
  if (unit === 'nm') return 1e7 / wavenumber;
  return unit === 'eV' ? wavenumber / PER_CM_OF_EV : wavenumber;
}

/** A place on the axis as a wavenumber (cm⁻¹). */
export function toWavenumber(x: number, unit: XUnit): number {
  if (unit === 'nm') return 1e7 / x;
  return unit === 'eV' ? x * PER_CM_OF_EV : x;
}

/** Name and unit of an axis: the name as words or symbol, the unit in plain text, empty where there is none. */
export interface AxisTitle {
  name: string;
  unit: string;
}

export const X_TITLES: Record<XUnit, AxisTitle> = {
  nm: { name: 'wavelength', unit: 'nm' },
  'cm-1': { name: 'wavenumber', unit: 'cm-1' },
  eV: { name: 'photon energy', unit: 'eV' },
};

export const Y_TITLES: Record<YUnit, AxisTitle> = {
  epsilon: { name: 'ε', unit: 'dm3 mol-1 cm-1' },
  absorbance: { name: 'A', unit: '' },
  'log-epsilon': { name: 'log ε', unit: 'dm3 mol-1 cm-1' },
  transmittance: { name: 'T', unit: '' },
  'percent-transmittance': { name: 'T', unit: '%' },
  'kubelka-munk': { name: 'F(R)', unit: '' },
  reflectance: { name: 'R', unit: '' },
  'percent-reflectance': { name: 'R', unit: '%' },
  'delta-epsilon': { name: 'Δε', unit: 'dm3 mol-1 cm-1' },
  emission: { name: 'emission intensity', unit: '' },
  arbitrary: { name: 'ordinate, no unit', unit: '' },
};

/** Figures with which a place on the axis is told. */
export const X_FIGURES: Record<XUnit, number> = { nm: 4, 'cm-1': 5, eV: 4 };
