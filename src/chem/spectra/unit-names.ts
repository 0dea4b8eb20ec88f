import type { XUnit, YUnit } from './types.ts';

/** Spellings of abscissa units, after `plain`. */
const X_NAMES: Record<XUnit, readonly string[]> = {
  nm: ['nm', 'nanometer', 'nanometers', 'nanometre', 'nanometres', 'millimicron', 'millimicrons'],
  um: ['um', 'micron', 'microns', 'micrometer', 'micrometers', 'micrometre', 'micrometres'],
  'cm-1': ['cm-1', '1/cm', 'cm^-1', 'percm', 'kayser', 'kaysers', 'reciprocalcentimeters', 'reciprocalcentimetres'],
  eV: ['ev', 'electronvolt', 'electronvolts'],
  THz: ['thz', 'terahertz'],
};

/** Spellings of ordinate quantities, after `plain`. Bare letters are in `Y_LETTERS`. */
const Y_NAMES: Record<YUnit, readonly string[]> = {
  absorbance: ['absorbance', 'abs', 'abs.', 'absorbancy', 'od', 'opticaldensity', 'absorbanceunits'],
  transmittance: ['transmittance', 'transmission'],
  'percent-transmittance': [
    ...['%t', 't%', 't(%)', 't/%', '%transmittance', '%transmission', 'transmittance%', 'transmission%'],
    ...['percenttransmittance', 'percenttransmission', 'transmittance(%)', 'transmission(%)', 'transmittance/%'],
  ],
  epsilon: [
    ...['epsilon', 'ε', 'molarabsorptivity', 'molarabsorptioncoefficient', 'molarextinctioncoefficient'],
    ...['m-1cm-1', 'm^-1cm^-1', 'lmol-1cm-1', 'l/(molcm)', 'l/mol/cm', 'dm3mol-1cm-1', 'm-1*cm-1', '1/(mcm)'],
  ],
  'log-epsilon': ['loge', 'logε', 'logepsilon', 'lge', 'lgε', 'log10ε', 'log10(ε)', 'log(ε)', 'log(epsilon)', 'log10e'],
  'kubelka-munk': ['kubelka-munk', 'kubelkamunk', 'km', 'k/s', 'f(r)', 'f(r∞)'],
  reflectance: ['reflectance', 'reflection', 'diffusereflectance'],
  'percent-reflectance': [
    ...['%r', 'r%', 'r(%)', 'r/%', '%reflectance', 'reflectance%', 'percentreflectance', 'reflectance(%)'],
    'reflectance/%',
  ],
  'delta-epsilon': ['δε', 'deltaepsilon', 'delta-epsilon', 'de', 'deltae', 'δe'],
  emission: ['emission', 'emissionintensity', 'fluorescence', 'fluorescenceintensity', 'luminescence', 'pl'],
  arbitrary: ['arbitraryunits', 'arbitrary', 'counts', 'intensity', 'cps'],
};

/** Symbols of one letter: quantities when the other columns say so too, else as likely the names of samples. */
const Y_LETTERS: Record<string, YUnit> = { a: 'absorbance', t: 'transmittance', r: 'reflectance' };

const xByName = invert(X_NAMES);
const yByName = invert(Y_NAMES);

function invert<Unit extends string>(names: Record<Unit, readonly string[]>): Map<string, Unit> {
  const entries = Object.entries(names) as [Unit, readonly string[]][];
  return new Map(entries.flatMap(([unit, spellings]) => spellings.map((spelling) => [spelling, unit] as const)));
}

/** Lower case, one spelling of minus, micro and superscripts, no blanks: what the tables above are written in. */
function plain(text: string): string {
  return text
    .normalize('NFKC') // superscript ⁻¹ becomes −1, µ becomes μ
    .toLowerCase()
    .replace(/[μµ]/g, 'u')
    .replace(/[−–—]/g, '-')
    .replace(/[·⋅]/g, '')
    .replace(/ϵ/g, 'ε')
    .replace(/\s+/g, '');
}

/** A label's ways of being read: whole, the part in brackets, what follows a slash, what precedes either. */
function partsOf(label: string): string[] {
  const text = label.slice(0, 120); // longer than any label of a quantity
  const bracketed = [...text.matchAll(/[([]([^()[\]]*(?:\([^()]*\))?[^()[\]]*)[)\]]/g)].map((match) => match[1] ?? '');
  const slash = text.match(/^([^/]*[^/\d\s])\s*\/\s*(.+)$/);
  const before = text.match(/^(.*?)\s*[([]/)?.[1];
  const parts = [text, ...bracketed, slash?.[2] ?? '', slash?.[1] ?? '', before ?? ''].map(plain);
  const comma = text.split(',').map(plain);
  return [...parts, ...(comma.length === 2 ? comma.reverse() : [])].filter((part) => part !== '');
}

/** The unit that a label or a JCAMP-DX XUNITS value states, or null. `Wavelength` alone states none. */
export function xUnitFromText(text: string): XUnit | null {
  for (const part of partsOf(text)) {
    const bare = part.replace(/\((.*)\)/, '$1');
    const unit = xByName.get(part) ?? xByName.get(bare);
    if (unit) return unit;
  }
  return null;
}

/**
 * The quantity that a label or a JCAMP-DX YUNITS value states, or null.
 *
 * @param letters - whether `A`, `T` and `R` alone are taken as quantities
 */
export function yUnitFromText(text: string, letters = true): YUnit | null {
  const parts = partsOf(text);
  const isPercent = parts.includes('%') || parts.includes('percent');
  for (const part of parts) {
    const unit = yByName.get(part) ?? (letters ? Y_LETTERS[part] : undefined);
    if (unit === undefined) continue;
    if (isPercent && unit === 'transmittance') return 'percent-transmittance';
    if (isPercent && unit === 'reflectance') return 'percent-reflectance';
    if (unit === 'epsilon' && parts[0]?.startsWith('δ')) return 'delta-epsilon'; // Δε (M-1 cm-1)
    if (unit === 'epsilon' && /^l(o)?g/.test(parts[0] ?? '')) return 'log-epsilon'; // log ε (M-1 cm-1)
    return unit;
  }
  return null;
}

/** Whether a label speaks of an abscissa, with or without its unit. */
export function isAbscissaLabel(text: string): boolean {
  return xUnitFromText(text) !== null || /^(wave ?length|wave ?number|wl|λ|lambda|ν̃|energy)\b/i.test(text.trim());
}

/** What the size of the numbers suggests; never more than a suggestion. */
export function suggestXUnit(x: readonly number[], label: string): XUnit | undefined {
  if (/wave ?number/i.test(label)) return 'cm-1';
  const [low, high] = rangeOf(x);
  if (low >= 150 && high <= 3500) return 'nm';
  if (low >= 2500 && high <= 70_000) return 'cm-1';
  return undefined;
}

/** Lowest and highest number, gaps apart; [∞, −∞] when there is none. */
export function rangeOf(values: ArrayLike<number>): [number, number] {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (let i = 0; i < values.length; i++) {
    const value = values[i]!;
    if (value < low) low = value;
    if (value > high) high = value;
  }
  return [low, high];
}

/** How our files name the units: JCAMP-DX records (the standard's own word where it has one) and column heads. */
export const xUnitNames: Record<XUnit, { jcamp: string; column: string }> = {
  nm: { jcamp: 'NANOMETERS', column: 'Wavelength (nm)' },
  um: { jcamp: 'MICROMETERS', column: 'Wavelength (um)' },
  'cm-1': { jcamp: '1/CM', column: 'Wavenumber (cm-1)' },
  eV: { jcamp: 'EV', column: 'Energy (eV)' },
  THz: { jcamp: 'THZ', column: 'Frequency (THz)' },
};

/** Same for ordinates. */
export const yUnitNames: Record<YUnit, { jcamp: string; column: string }> = {
  absorbance: { jcamp: 'ABSORBANCE', column: 'Absorbance' },
  transmittance: { jcamp: 'TRANSMITTANCE', column: 'Transmittance' },
  'percent-transmittance': { jcamp: 'PERCENT TRANSMITTANCE', column: 'Transmittance (%)' },
  epsilon: { jcamp: 'MOLAR ABSORPTIVITY', column: 'epsilon (L mol-1 cm-1)' },
  'log-epsilon': { jcamp: 'LOG E', column: 'log epsilon' },
  'kubelka-munk': { jcamp: 'KUBELKA-MUNK', column: 'Kubelka-Munk' },
  reflectance: { jcamp: 'REFLECTANCE', column: 'Reflectance' },
  'percent-reflectance': { jcamp: 'PERCENT REFLECTANCE', column: 'Reflectance (%)' },
  'delta-epsilon': { jcamp: 'DELTA EPSILON', column: 'delta epsilon (L mol-1 cm-1)' },
  emission: { jcamp: 'EMISSION', column: 'Emission intensity' },
  arbitrary: { jcamp: 'ARBITRARY UNITS', column: 'Intensity' },
};
