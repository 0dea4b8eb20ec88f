import { writeCsv, writeJcamp } from '#src/chem/spectra/index.ts';
import type { DemoBand } from './demo-complex.ts';

/** Uniform numbers 0 … 1 from a seed (mulberry32), so that the demo data are the same on every machine. */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  };
}

export const hash = (text: string): number => [...text].reduce((h, c) => (Math.imul(h, 31) + c.charCodeAt(0)) >>> 0, 7);

const range = (from: number, to: number, step: number) =>
  Array.from({ length: Math.round((to - from) / step) + 1 }, (_, i) => from + i * step);

/** Gaussian of a band at a wavenumber, in units of its ε. */
const gaussian = (wavenumber: number, centre: number, fwhm: number) =>
  Math.exp(-4 * Math.LN2 * ((wavenumber - centre) / fwhm) ** 2);

export interface SyntheticCurve {
  /** nm, rising */
  x: number[];
  absorbance: number[];
  /** mol dm⁻³ */
  concentration: number;
}

/** A concentration of one significant figure at which the strongest band from 300 nm on has an absorbance near 0.9. */
export function usefulConcentration(bands: readonly DemoBand[]): number {
  const seen = bands.filter(([nm]) => nm >= 300);
  const strongest = Math.max(...(seen.length ? seen : bands).map(([, epsilon]) => epsilon));
  const raw = Math.min(0.9 / strongest, 0.5);
  const power = 10 ** Math.floor(Math.log10(raw));
  return Number((Math.round(raw / power) * power).toPrecision(1));
}

/**
 * Absorbance from band parameters: Gaussians on the wavenumber axis, an instrument's noise and a lamp's limit. Two
 * labs never get quite the same: `scale` is what one's weighing and path are off by, `shift` its wavelength error in nm.
 */
export function syntheticCurve(
  bands: readonly DemoBand[],
  {
    seed,
    scale,
    shift,
    from,
    to,
    step,
  }: { seed: number; scale: number; shift: number; from: number; to: number; step: number },
): SyntheticCurve {
  const random = seeded(seed);
  const concentration = usefulConcentration(bands);
  const x = range(from, to, step);
  const absorbance = x.map((nm) => {
    const wavenumber = 1e7 / (nm - shift);
    const epsilon = bands.reduce(
      (sum, [centre, height, fwhm]) => sum + height * gaussian(wavenumber, 1e7 / centre, fwhm),
      0,
    );
    const noise = (random() + random() - 1) * 0.0006;
    // Stray light of 2 parts in 10 000 bends the curve where little comes through.
    const ideal = epsilon * concentration * scale;
    return Number((-Math.log10((10 ** -ideal + 2e-4) / (1 + 2e-4)) + noise).toFixed(5));
  });
  return { x, absorbance, concentration };
}

export type FileForm = 'jcamp' | 'csv' | 'decimal-comma';

/** The curve as a file of the kind an instrument exports; its title says that it is synthetic. */
export function asFile(
  curve: SyntheticCurve,
  form: FileForm,
  facts: { title: string; lab: string; solvent: string; temperature: number },
): { name: string; bytes: Uint8Array } {
  const title = `${facts.title} SYNTHETIC`;
  const encode = (text: string) => new TextEncoder().encode(text);
  const stem = facts.title.replace(/[^A-Za-z0-9]+/g, '-').replace(/^-|-$/g, '');
  if (form === 'jcamp') {
    const text = writeJcamp({
      title,
      x: curve.x,
      y: curve.absorbance,
      xUnit: 'nm',
      yUnit: 'absorbance',
      origin: `${facts.lab} (invented)`,
      owner: 'CC0-1.0',
      solvent: facts.solvent,
      concentration: curve.concentration,
      pathLength: 1,
      temperature: facts.temperature,
      processing: 'SYNTHETIC: computed from band parameters, not measured',
    });
    return { name: `${stem}.jdx`, bytes: encode(text) };
  }
  if (form === 'csv')
    return {
      name: `${stem}.csv`,
      bytes: encode(writeCsv({ x: curve.x, y: curve.absorbance, xUnit: 'nm', yUnit: 'absorbance' })),
    };
  const comma = (value: number) => String(value).replace('.', ',');
  const lines = [
    `# ${title}`,
    'Wavelength (nm);Absorbance',
    ...curve.x.map((nm, i) => `${comma(nm)};${comma(curve.absorbance[i]!)}`),
  ];
  return { name: `${stem}.txt`, bytes: encode(`${lines.join('\r\n')}\r\n`) };
}
