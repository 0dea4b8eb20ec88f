/** Units of the abscissa. */
export type XUnit = 'nm' | 'um' | 'cm-1' | 'eV' | 'THz';

/** Quantities of the ordinate; transmittance and reflectance are fractions unless they say percent. */
export type YUnit =
  | 'absorbance'
  | 'transmittance'
  | 'percent-transmittance'
  | 'epsilon'
  | 'log-epsilon'
  | 'kubelka-munk'
  | 'reflectance'
  | 'percent-reflectance'
  | 'delta-epsilon'
  | 'emission'
  | 'arbitrary';

/**
 * Something a person should know about how a file was read. Codes that begin with `ask-` want an answer
 * (a unit that the file does not state) before the spectrum can be used. `line` is 1-based.
 */
export interface SpectrumWarning {
  code: string;
  detail: string;
  line?: number;
}

/** How delimited text was taken apart; `columns` and `columnNames` count the abscissa. */
export interface Dialect {
  delimiter: string;
  decimalComma: boolean;
  headerLines: number;
  columns: number;
  columnNames: string[];
}

/**
 * One spectrum of a file, in the file's own units and order; NaN in `y` is a gap.
 *
 * A unit that the file does not state, or states against its own numbers, is null; what the numbers suggest stands
 * in `suggestedXUnit` and `suggestedYUnit`, for a person to confirm.
 */
export interface SpectrumBlock {
  title: string;
  kind: 'curve' | 'peaks';
  xUnit: XUnit | null;
  yUnit: YUnit | null;
  xUnitText: string;
  yUnitText: string;
  points: number;
  x: number[];
  y: number[];
  /** Text of each peak, of a table of peak assignments. */
  labels?: string[];
  metadata: Record<string, string>;
  warnings: SpectrumWarning[];
  format: 'jcamp-dx' | 'delimited';
  dialect?: Dialect;
  suggestedXUnit?: XUnit;
  suggestedYUnit?: YUnit;
}

/** What a person says about a file; each answer goes before what the file says. Columns and blocks count from 0. */
export interface ReadOptions {
  block?: number;
  columns?: { x: number; y: number[] };
  xUnit?: XUnit;
  yUnit?: YUnit;
  decimalComma?: boolean;
  delimiter?: string;
  skipLines?: number;
}

/** Bounds that hold before anything is expanded (a repeat count of nine digits would grow without end). */
export const limits = {
  bytes: 50 * 1024 * 1024,
  lines: 2_000_000,
  /** Characters; the standard has 80, a table of many columns some thousands. */
  lineLength: 10_000,
  pointsPerBlock: 1_000_000,
  pointsPerFile: 4_000_000,
  blocks: 64,
} as const;
