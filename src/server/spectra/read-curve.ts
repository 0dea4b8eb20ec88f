import { DomainError } from '#src/chem/errors.ts';
import type { ReadOptions, SpectrumBlock, XUnit, YUnit } from '#src/chem/spectra/index.ts';
import type { ReadingOptions } from '#src/contracts/spectra.ts';
import { runInWorker } from '#src/server/worker-pool.ts';
import { refuse } from './refuse.ts';
import { ascendingOrder } from './stored-points.ts';

/** A curve of a file, ready to be stored. */
export interface ReadCurve {
  title: string;
  block: number;
  column: number;
  xUnit: XUnit;
  yUnit: YUnit;
  /** As they stand in the file. */
  x: number[];
  y: number[];
  /** cm⁻¹, ascending, and the place in the file of each. */
  wavenumber: Float64Array;
  order: Float64Array;
  warnings: { code: string; detail: string }[];
  /** How the file was read, so that it can be read so again. */
  reading: Record<string, unknown>;
}

const TIMEOUT_MS = 30_000;
const OPTIONS = ['columns', 'xUnit', 'yUnit', 'decimalComma', 'delimiter', 'skipLines'] as const;

/** The spectra of a file, read in a worker thread. @throws {DomainError} as `readSpectrumFile` */
export function readBlocks(bytes: Uint8Array, options: ReadingOptions, signal?: AbortSignal): Promise<SpectrumBlock[]> {
  const given = Object.fromEntries(
    [...OPTIONS, 'block' as const].map((name) => [name, options[name]]).filter(([, value]) => value !== undefined),
  ) as ReadOptions;
  return runInWorker(
    'spectrumFile',
    { bytes, options: given },
    { timeoutMs: TIMEOUT_MS, field: 'file', ...(signal ? { signal } : {}) },
  );
}

/**
 * The one curve that an upload means: the block told, else the first curve of the file.
 *
 * @throws {HttpError} 422 where a unit must be told, with what the numbers suggest
 * @throws {DomainError} where the file cannot be read
 */
export async function readCurve(bytes: Uint8Array, told: ReadingOptions): Promise<ReadCurve> {
  const blocks = await readBlocks(bytes, { ...told, block: undefined });
  if (told.block !== undefined && !blocks[told.block])
    throw new DomainError(
      'out-of-range',
      `Block ${told.block} was asked for; the file has ${blocks.length}, counted from 0`,
      'block',
    );
  const block = told.block ?? blocks.findIndex(({ kind }) => kind === 'curve');
  const found = blocks[block];
  if (found?.kind !== 'curve') throw refuse('#/block', 'This is a table of peaks, not a curve: its bands can be typed');

  const xUnit = found.xUnit ?? refuseUnit('xUnit', 'abscissa', found.suggestedXUnit);
  const yUnit = found.yUnit ?? refuseUnit('yUnit', 'ordinate', found.suggestedYUnit);
  const { wavenumber, order } = ascendingOrder(found.x, xUnit);
  if (wavenumber.length < found.x.length || !(wavenumber[0]! > 0))
    throw new DomainError('out-of-range', 'The abscissa has values that are no wavelength or wavenumber', 'file');

  const curves = blocks.filter(({ kind }) => kind === 'curve').length;
  const warnings = found.warnings.map(({ code, detail }) => ({ code, detail }));
  if (told.block === undefined && curves > 1)
    warnings.push({ code: 'several-spectra', detail: `The file holds ${curves} spectra; this is the first of them` });
  const { format, dialect } = found;
  const answers = Object.fromEntries(
    OPTIONS.map((name) => [name, told[name]]).filter(([, value]) => value !== undefined),
  );
  return {
    title: found.title,
    block,
    column: told.columns?.y[block % told.columns.y.length] ?? 0,
    xUnit,
    yUnit,
    x: found.x,
    y: found.y,
    wavenumber,
    order,
    warnings,
    reading: { format, block, xUnit, yUnit, ...(dialect ? { dialect } : {}), told: answers },
  };
}

function refuseUnit(field: 'xUnit' | 'yUnit', axis: string, suggestion: string | undefined): never {
  const hint = suggestion ? `; the numbers would suit ${suggestion}` : '';
  throw refuse(`#/${field}`, `The file does not settle the unit of the ${axis}: tell ${field}${hint}`);
}
