import type { ComplexSummary } from '#src/contracts/complexes.ts';
import type { GeometryNames } from './words.ts';

type Cell = string | number;

/** Columns of the file with their units; several centres stand in one cell, divided by semicolons. */
const COLUMNS: Record<string, (complex: ComplexSummary, names: GeometryNames) => Cell | null> = {
  accession: ({ accession }) => accession,
  formula: ({ formula }) => formula,
  descriptor: ({ isomer }) => isomer.descriptor,
  chirality: ({ isomer }) => isomer.chirality,
  charge: ({ charge }) => charge,
  hill: ({ hill }) => hill,
  'molar mass (g mol-1)': ({ molarMass }) => molarMass,
  element: ({ centres }) => each(centres, ({ element }) => element),
  'oxidation state': ({ centres }) => each(centres, ({ oxidationState }) => oxidationState.value),
  'd-count': ({ centres }) => each(centres, ({ dCount }) => dCount),
  'spin state': ({ centres }) => each(centres, ({ spinState }) => spinState),
  'polyhedral symbol': ({ centres }) => each(centres, ({ geometry }) => geometry),
  geometry: ({ centres }, names) => each(centres, ({ geometry }) => geometry && (names[geometry] ?? geometry)),
  'point group': ({ pointGroup }) => pointGroup,
  'donor-set group': ({ donorSetGroup }) => donorSetGroup,
  ligands: ({ ligands }) => ligands.map(({ abbreviation, count }) => `${count} ${abbreviation}`).join('; '),
  'bands (cm-1)': ({ strip }) => strip.map(({ wavenumber }) => Math.round(wavenumber)).join('; '),
  'epsilon (dm3 mol-1 cm-1)': ({ strip }) => strip.map(({ epsilon }) => epsilon ?? '').join('; '),
  'band classes': ({ strip }) => strip.map((band) => band.class).join('; '),
  'solution colour (sRGB)': ({ colour }) => colour,
  'home lab': ({ lab }) => lab.name,
  'labs that measured': ({ labs }) => labs,
  spectra: ({ spectra }) => spectra,
  state: ({ state }) => state,
  changed: ({ updatedAt }) => updatedAt,
};

function each<T>(items: readonly T[], cellOf: (item: T) => Cell | null): Cell | null {
  if (items.length === 1) return cellOf(items[0]!);
  return items.map((item) => cellOf(item) ?? '').join('; ');
}

export const csvHeads = (): string[] => Object.keys(COLUMNS);

/** One row a complex, in the order of the heads; what is not there is an empty cell. */
export const csvRows = (complexes: readonly ComplexSummary[], names: GeometryNames): Cell[][] =>
  complexes.map((complex) => Object.values(COLUMNS).map((cellOf) => cellOf(complex, names) ?? ''));

/**
 * The table as CSV (RFC 4180). A text that a spreadsheet would run as a formula gets an apostrophe before it; numbers
 * stay numbers.
 */
export async function toCsv(heads: readonly string[], rows: readonly Cell[][]): Promise<string> {
  const { default: Papa } = await import('papaparse');
  return `${Papa.unparse({ fields: [...heads], data: [...rows] }, { escapeFormulae: true, newline: '\r\n' })}\r\n`;
}

/** Hands a text to the browser as a file. The byte order mark tells a spreadsheet that it is UTF-8. */
export function saveText(text: string, fileName: string): void {
  const url = URL.createObjectURL(new Blob(['\uFEFF', text], { type: 'text/csv;charset=utf-8' }));
  const link = document.createElement('a');
  link.href = url;
  link.download = fileName;
  link.click();
  setTimeout(() => URL.revokeObjectURL(url), 10_000);
}
