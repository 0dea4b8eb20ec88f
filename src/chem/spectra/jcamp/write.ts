import { DomainError } from '../../errors.ts';
import { toAscii } from '../ascii.ts';
import type { XUnit, YUnit } from '../types.ts';
import { rangeOf, xUnitNames, yUnitNames } from '../unit-names.ts';

/**
 * A spectrum as our writers take it: points in the given units and order, NaN for a gap, and what is known of how it
 * was measured. What is left out is left out of the file.
 */
export interface SpectrumToWrite {
  title: string;
  kind?: 'curve' | 'peaks';
  xUnit: XUnit;
  yUnit: YUnit;
  x: ArrayLike<number>;
  y: ArrayLike<number>;
  /** Laboratory. */
  origin?: string;
  /** Rights holder or licence. */
  owner?: string;
  /** Moment of the measurement, ISO 8601 with date and time. */
  measuredAt?: string;
  instrument?: string;
  solvent?: string;
  /** What the concentration is of; the title when left out. */
  solute?: string;
  /** mol dm⁻³. */
  concentration?: number;
  /** cm. */
  pathLength?: number;
  /** kelvin. */
  temperature?: number;
  /** Spectral bandwidth, nm. */
  bandwidth?: number;
  molecularFormula?: string;
  sample?: string;
  source?: string;
  processing?: string;
}

const WIDTH = 80;
const DATA_TYPES: Partial<Record<YUnit, string>> = {
  'delta-epsilon': 'CIRCULAR DICHROISM SPECTRUM',
  emission: 'FLUORESCENCE SPECTRUM',
};

/**
 * The spectrum as one JCAMP-DX 5.01 block: ASCII, lines up to 80 columns, CR LF.
 *
 * Numbers are written as they are (AFFN, factors 1), so that reading gives the same numbers back: as XYDATA where the
 * abscissae are those of an equal grid, else as XYPOINTS. A record whose value is not known is left out; ORIGIN and
 * OWNER, which the standard demands, then say so.
 *
 * @throws {DomainError} `empty` without points, `out-of-range` when x and y differ in length or an abscissa is not finite
 * @see P. Lampen et al., Pure Appl. Chem. 71 (1999) 1549; order of records after McDonald & Wilks 1988
 */
export function writeJcamp(spectrum: SpectrumToWrite): string {
  requirePoints(spectrum);
  const { x, y, kind = 'curve' } = spectrum;
  const isGrid = kind === 'curve' && isEqualGrid(x);
  const dataClass = kind === 'peaks' ? 'PEAK TABLE' : isGrid ? 'XYDATA' : 'XYPOINTS';
  const dataType = DATA_TYPES[spectrum.yUnit] ?? 'UV/VIS SPECTRUM';
  const last = x.length - 1;
  const [minX, maxX] = rangeOf(x);
  const [minY, maxY] = rangeOf(y);
  const isCurve = kind === 'curve';
  const records: (readonly [label: string, value: string | undefined])[] = [
    ['TITLE', toAscii(spectrum.title) || 'untitled'],
    ['JCAMP-DX', '5.01'],
    ['DATA TYPE', kind === 'peaks' ? dataType.replace('SPECTRUM', 'PEAK TABLE') : dataType],
    ['DATA CLASS', dataClass],
    ['ORIGIN', spectrum.origin || 'not stated'],
    ['OWNER', spectrum.owner || 'not stated'],
    ['LONGDATE', longDate(spectrum.measuredAt)],
    ['SPECTROMETER/DATA SYSTEM', spectrum.instrument],
    ['SAMPLE DESCRIPTION', spectrum.sample],
    ['SOLVENT NAME', spectrum.solvent],
    ['CONCENTRATIONS', concentrations(spectrum)],
    ['PATHLENGTH', textOfNumber(spectrum.pathLength)],
    ['TEMPERATURE', textOfNumber(celsius(spectrum.temperature))],
    ['RESOLUTION', spectrum.xUnit === 'nm' ? textOfNumber(spectrum.bandwidth) : undefined], // in XUNITS
    ['MOLFORM', spectrum.molecularFormula],
    ['SOURCE REFERENCE', spectrum.source],
    ['DATA PROCESSING', spectrum.processing],
    ['XUNITS', xUnitNames[spectrum.xUnit].jcamp],
    ['YUNITS', yUnitNames[spectrum.yUnit].jcamp],
    ['XFACTOR', isCurve ? '1' : undefined],
    ['YFACTOR', isCurve ? '1' : undefined],
    ['FIRSTX', isCurve ? affn(x[0]!) : undefined],
    ['LASTX', isCurve ? affn(x[last]!) : undefined],
    ['DELTAX', isGrid && last > 0 ? affn(gridStep(x)) : undefined],
    ['MAXX', isCurve ? affn(maxX) : undefined],
    ['MINX', isCurve ? affn(minX) : undefined],
    ['MAXY', isCurve ? textOfNumber(maxY) : undefined],
    ['MINY', isCurve ? textOfNumber(minY) : undefined],
    ['NPOINTS', String(x.length)],
    ['FIRSTY', isCurve ? textOfNumber(y[0]) : undefined],
  ];
  const head = records.flatMap(([label, value]) => (value === undefined || value === '' ? [] : record(label, value)));
  const table = isGrid
    ? ['##XYDATA= (X++(Y..Y))', ...gridLines(x, y)]
    : [`##${dataClass}= (XY..XY)`, ...pairLines(x, y)];
  return `${[...head, ...table, '##END='].join('\r\n')}\r\n`;
}

/** Both arrays of one length, at least one point, every abscissa finite. */
export function requirePoints({ x, y }: Pick<SpectrumToWrite, 'x' | 'y'>): void {
  if (x.length === 0) throw new DomainError('empty', 'a spectrum without points cannot be written', 'x');
  if (x.length !== y.length) {
    throw new DomainError('out-of-range', `${x.length} abscissae, but ${y.length} ordinates`, 'y');
  }
  const bad = Array.from(x).findIndex((value) => !Number.isFinite(value));
  if (bad >= 0) throw new DomainError('out-of-range', `abscissa ${bad + 1} is not a finite number`, 'x', bad + 1);
}

/** Whether a reader who builds the grid of FIRSTX, LASTX and NPOINTS gets these very numbers. */
function isEqualGrid(x: ArrayLike<number>): boolean {
  if (x.length === 1) return true;
  const step = (x[x.length - 1]! - x[0]!) / (x.length - 1);
  if (step === 0) return false;
  return (
    Array.from(x).every(
      (value, i) => i === 0 || i === x.length - 1 || value === Number((x[0]! + i * step).toPrecision(12)),
    ) && x[0] === Number(x[0]!.toPrecision(12))
  );
}

function gridStep(x: ArrayLike<number>): number {
  return Number(((x[x.length - 1]! - x[0]!) / (x.length - 1)).toPrecision(12));
}

/** Shortest digits that read back as the same number; an exponent has its sign and two digits at least. */
function affn(value: number): string {
  return String(value)
    .replace(/e([+-])(\d+)/, (_, sign: string, digits: string) => `E${sign}${digits.padStart(2, '0')}`)
    .replace(/^-0$/, '0');
}

function ordinate(value: number): string {
  return Number.isFinite(value) ? affn(value) : '?';
}

function textOfNumber(value: number | undefined): string | undefined {
  return value !== undefined && Number.isFinite(value) ? affn(value) : undefined;
}

function celsius(kelvin: number | undefined): number | undefined {
  return kelvin === undefined ? undefined : Number((kelvin - 273.15).toFixed(3));
}

/** `YYYY/MM/DD HH:MM:SS.SSSS +hhmm`; nothing when the moment is not one. */
function longDate(iso: string | undefined): string | undefined {
  const match = iso?.match(
    /^(\d{4})-(\d{2})-(\d{2})T(\d{2}):(\d{2})(?::(\d{2})(?:\.(\d{1,4})\d*)?)?(Z|[+-]\d{2}:?\d{2})$/,
  );
  if (!match) return undefined;
  const [, year, month, day, hour, minute, second = '00', fraction = '0', zone = 'Z'] = match;
  const offset = zone === 'Z' ? '+0000' : zone.replace(':', '');
  return `${year}/${month}/${day} ${hour}:${minute}:${second}.${fraction.padEnd(4, '0')} ${offset}`;
}

function concentrations({ concentration, solute, title }: SpectrumToWrite): string | undefined {
  const value = textOfNumber(concentration);
  if (value === undefined) return undefined;
  const name = toAscii(solute ?? title).replace(/[,()]/g, (sign) => ({ ',': ';', '(': '[', ')': ']' })[sign] ?? sign);
  return `(NCU)\n(${name}, ${value}, mol/L)`;
}

/** A record on as many lines as it needs; no text of a value can open a record or a comment. */
function record(label: string, value: string): string[] {
  const lines = value
    .split('\n')
    .flatMap((line, i) => wrap(`${i === 0 ? `##${label}= ` : ''}${harmless(toAscii(line))}`));
  return lines.filter((line) => line !== '');
}

function harmless(text: string): string {
  return text.replace(/#(?=#)/g, '# ').replace(/\$(?=\$)/g, '$ ');
}

function wrap(text: string): string[] {
  const lines: string[] = [];
  let rest = text;
  while (rest.length > WIDTH) {
    const blank = rest.lastIndexOf(' ', WIDTH);
    const at = blank > WIDTH / 2 ? blank : WIDTH;
    lines.push(rest.slice(0, at).trimEnd());
    rest = rest.slice(at).trimStart();
  }
  lines.push(rest.trimEnd());
  return lines;
}

function gridLines(x: ArrayLike<number>, y: ArrayLike<number>): string[] {
  const lines: string[] = [];
  let line = '';
  for (let i = 0; i < x.length; i++) {
    const next = ordinate(y[i]!);
    if (line !== '' && line.length + 1 + next.length <= WIDTH) {
      line += ` ${next}`;
      continue;
    }
    if (line !== '') lines.push(line);
    line = `${affn(x[i]!)} ${next}`;
  }
  lines.push(line);
  return lines;
}

function pairLines(x: ArrayLike<number>, y: ArrayLike<number>): string[] {
  return Array.from(x, (value, i) => `${affn(value)}, ${ordinate(y[i]!)}`);
}
