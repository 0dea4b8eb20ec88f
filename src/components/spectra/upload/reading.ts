import type * as z from 'zod';
import { checkConditions, type Flag } from '#src/chem/spectra/conditions.ts';
import type { YUnit as ChemYUnit } from '#src/chem/spectra/types.ts';
import type { ReadBlock as ReadBlockSchema, ReadingOptions } from '#src/contracts/spectra.ts';
import { asMeasured, type FetchedCurve } from '../page/curves.ts';
import type { PlotSeries } from '../plot/types.ts';
import type { YUnit } from '../plot/units.ts';
import { type ConditionsDraft, solventNames, type Technique } from './conditions-draft.ts';
import { readNumber } from './read-number.ts';

export type ReadBlock = z.infer<typeof ReadBlockSchema>;

/** How delimited text was taken apart, as the preview tells it. */
export interface DialectTold {
  delimiter: string;
  decimalComma: boolean;
  headerLines: number;
  columns: number;
  columnNames: string[];
}

export const dialectOf = ({ dialect }: ReadBlock): DialectTold | null => (dialect as DialectTold | undefined) ?? null;

const DELIMITERS: Record<string, string> = {
  '\t': 'tabs',
  ';': 'semicolons',
  ',': 'commas',
  ' ': 'spaces',
  '|': 'bars',
};

/** The dialect in a sentence: "columns divided by semicolons, decimal comma, 2 columns, 3 lines of head". */
export function dialectText({ delimiter, decimalComma, headerLines, columns }: DialectTold): string {
  const divided = DELIMITERS[delimiter] ?? (delimiter.trim() === '' ? 'spaces' : `"${delimiter}"`);
  const head = headerLines === 1 ? '1 line' : `${headerLines} lines`;
  const count = columns === 1 ? '1 column' : `${columns} columns`;
  return `${count} divided by ${divided}, decimal ${decimalComma ? 'comma' : 'point'}, ${head} of head`;
}

/** Name of a column as its head says, or by its place. */
export const columnName = (dialect: DialectTold, at: number): string => {
  const name = dialect.columnNames[at]?.trim();
  return name ? `${at + 1}: ${name}` : `column ${at + 1}`;
};

/** What must be told before a block can be stored. */
export const missingUnits = ({ xUnit, yUnit }: Pick<ReadBlock, 'xUnit' | 'yUnit'>): ('xUnit' | 'yUnit')[] => [
  ...(xUnit === null ? (['xUnit'] as const) : []),
  ...(yUnit === null ? (['yUnit'] as const) : []),
];

/** A block that can become a spectrum: a curve whose units are settled. */
export const isReady = (block: ReadBlock): boolean => block.kind === 'curve' && missingUnits(block).length === 0;

/** Indices of the blocks that are taken unless a person says otherwise: every curve. */
export const blocksAtFirst = (blocks: readonly ReadBlock[]): number[] =>
  blocks.flatMap(({ kind }, i) => (kind === 'curve' ? [i] : []));

/** Choices of a person, without those that were taken back. */
export const toldOptions = (options: ReadingOptions): ReadingOptions =>
  Object.fromEntries(Object.entries(options).filter(([, value]) => value !== undefined)) as ReadingOptions;

/** cm⁻¹ of an abscissa in the unit of the file. @see CODATA 2018, exact: hc/e and c (from memory) */
const TO_WAVENUMBER: Record<string, (x: number) => number> = {
  nm: (x) => 1e7 / x,
  um: (x) => 1e4 / x,
  'cm-1': (x) => x,
  eV: (x) => x * 8065.543937,
  THz: (x) => x * 33.3564095198152,
};
/** Points that a small plot shows. */
const PREVIEW_POINTS = 3000;

/** The block as a curve in rising wavenumber, of `most` points or so; null while a unit is not settled. */
export function previewCurve(block: ReadBlock, technique: Technique, most = PREVIEW_POINTS): FetchedCurve | null {
  const convert = TO_WAVENUMBER[block.xUnit ?? ''];
  if (!convert || block.yUnit === null) return null;
  const step = Math.ceil(block.x.length / most);
  const points = block.x
    .map((x, i) => [convert(x), block.y[i] ?? null] as const)
    .filter(([x], i) => Number.isFinite(x) && x > 0 && i % step === 0)
    .sort((a, b) => a[0] - b[0]);
  const raw = { quantity: block.yUnit as YUnit, x: points.map(([x]) => x), y: points.map(([, y]) => y) };
  return asMeasured(raw.quantity === 'log-epsilon' ? { ...raw, y: raw.y.map(tenTo) } : raw, technique);
}

const tenTo = (log: number | null) => (log === null ? null : 10 ** log);

/** The chosen blocks as curves of one quantity, for one small plot; those of another quantity are left out. */
export function previewSeries(
  blocks: readonly ReadBlock[],
  chosen: readonly number[],
  technique: Technique,
): { series: PlotSeries[]; quantity: YUnit } | null {
  const curves = chosen.flatMap((i) => {
    const block = blocks[i];
    const curve = block ? previewCurve(block, technique) : null;
    return block && curve && curve.x.length > 1 ? [{ i, block, curve }] : [];
  });
  const quantity = curves[0]?.curve.quantity;
  if (!quantity) return null;
  const series = curves
    .filter(({ curve }) => curve.quantity === quantity)
    .map(({ i, block, curve }) => ({
      id: String(i),
      label: block.title || `spectrum ${i + 1}`,
      x: curve.x,
      y: curve.y,
    }));
  return { series, quantity: quantity === 'log-epsilon' ? 'epsilon' : quantity };
}

/** From where to where a block goes, in its own unit. */
export function blockRange({ x }: Pick<ReadBlock, 'x'>): [number, number] | null {
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const value of x) {
    if (value < low) low = value;
    if (value > high) high = value;
  }
  return low <= high ? [low, high] : null;
}

/** Points that are checked as they are typed; the server checks all of them. */
const CHECKED_POINTS = 100_000;

/** What the typed conditions say against a curve, as the record would be flagged. Only solutions have rules. */
export function flagsSoFar(block: ReadBlock, draft: ConditionsDraft): Flag[] {
  if (draft.technique !== 'solution' || !isReady(block)) return [];
  const curve = previewCurve(block, draft.technique, CHECKED_POINTS);
  if (!curve) return [];
  const known = (text: string) => {
    const value = readNumber(text);
    return value !== null && value > 0 ? value : null;
  };
  return checkConditions({
    x: curve.x,
    absorbance: curve.y.map((y) => y ?? Number.NaN),
    solvent: solventNames(draft).map((name) => ({ name })),
    concentration: known(draft.concentration),
    pathLength: known(draft.pathLength),
    yUnit: block.yUnit as ChemYUnit,
  });
}
