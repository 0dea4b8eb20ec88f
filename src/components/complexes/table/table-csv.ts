import type { DataColumn } from '#src/components/ui/table-csv.ts';
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

/** The columns of the file, whatever the screen shows; what is not there is an empty cell. */
export const csvColumns = (names: GeometryNames): DataColumn<ComplexSummary>[] =>
  Object.entries(COLUMNS).map(([header, cellOf]) => ({
    id: header,
    header,
    value: (complex) => cellOf(complex, names),
  }));
