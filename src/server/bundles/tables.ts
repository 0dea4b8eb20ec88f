import Papa from 'papaparse';
import { guardCell } from '#src/chem/spectra/index.ts';
import type { Content } from './content.ts';
import { csvPath, jcampPath, originalPath } from './paths.ts';

type Cell = string | number | boolean | null | undefined;
export interface Column<Row> {
  name: string;
  type: 'string' | 'number' | 'integer' | 'boolean';
  description: string;
  of: (row: Row) => Cell;
}

/** A text cell is guarded against being taken for a formula by a spreadsheet; a number is left alone. */
const cell = (value: Cell): string | number => {
  if (value === null || value === undefined) return '';
  if (typeof value === 'boolean') return value ? 'true' : 'false';
  return typeof value === 'number' ? value : guardCell(value);
};

/** A table as CSV (RFC 4180) with a line of names. */
export function csvOf<Row>(columns: readonly Column<Row>[], rows: readonly Row[]): string {
  const data = rows.map((row) => columns.map((column) => cell(column.of(row))));
  return `${Papa.unparse({ fields: columns.map((column) => column.name), data }, { newline: '\r\n' })}\r\n`;
}

const column =
  <Row>() =>
  (name: string, type: Column<Row>['type'], description: string, of: (row: Row) => Cell): Column<Row> => ({
    name,
    type,
    description,
    of,
  });

/** The three tables of a bundle. Names carry their units. */
export function tablesOf(content: Content) {
  return {
    complexes: { columns: complexColumns(content), rows: content.complexes },
    spectra: { columns: spectrumColumns(content), rows: content.spectra },
    bands: { columns: bandColumns(content), rows: content.bands },
  };
}

function complexColumns({ centres, ligands, labs }: Content) {
  const c = column<Content['complexes'][number]>();
  const joined = (id: string, of: (centre: Content['centres'][number]) => string | number | null) =>
    centres
      .filter((centre) => centre.complexId === id)
      .map((centre) => of(centre) ?? '')
      .join('; ');
  return [
    c('accession', 'string', 'Number of the complex in this registry', (r) => r.accession),
    c('formula', 'string', 'Coordination entity', (r) => r.formula),
    c('charge', 'integer', 'Charge number of the entity', (r) => r.charge),
    c('hill', 'string', 'Composition in Hill order', (r) => r.hill),
    c('molar_mass_g_per_mol', 'number', 'Molar mass of the entity', (r) => r.molarMass),
    c('metals', 'string', 'Centres', (r) => joined(r.id, (centre) => centre.element)),
    c('oxidation_states', 'string', 'Of each centre', (r) => joined(r.id, (centre) => centre.oxidationState)),
    c('d_counts', 'string', 'd electrons of each centre', (r) => joined(r.id, (centre) => centre.dCount)),
    c('geometries', 'string', 'IUPAC polyhedral symbol of each centre', (r) =>
      joined(r.id, (centre) => centre.geometry),
    ),
    c('spin_states', 'string', 'Of each centre', (r) => joined(r.id, (centre) => centre.spinState)),
    c('ligands', 'string', 'Ligands with counts', (r) =>
      ligands
        .filter((ligand) => ligand.complexId === r.id)
        .map((ligand) => `${ligand.abbreviation} ${ligand.count}`)
        .join('; '),
    ),
    c('descriptor', 'string', 'Relative configuration, where stated', (r) => r.descriptor),
    c('chirality', 'string', 'Where stated', (r) => r.chirality),
    c('point_group', 'string', 'Of donors and chelate edges', (r) => r.pointGroup),
    c('donor_set_group', 'string', 'Of the donors alone', (r) => r.donorSetGroup),
    c('state', 'string', 'draft, registered or withdrawn', (r) => r.state),
    c('lab', 'string', 'Home laboratory', (r) => labs.get(r.labId)),
    c('updated_at', 'string', 'Last change, ISO 8601', (r) => r.updatedAt),
  ];
}

function spectrumColumns({ complexes, solvents, labs, instruments }: Content) {
  const c = column<Content['spectra'][number]>();
  const accession = new Map(complexes.map((complex) => [complex.id, complex.accession]));
  const of = (r: Content['spectra'][number]) => accession.get(r.complexId) ?? '';
  const solventOf = (id: string) =>
    solvents
      .filter((solvent) => solvent.spectrumId === id)
      .map(({ name, volumeFraction }) => (volumeFraction === 1 ? name : `${name} ${volumeFraction}`))
      .join('; ');
  return [
    c('id', 'string', 'Spectrum', (r) => r.id),
    c('accession', 'string', 'Its complex', of),
    c('title', 'string', 'Title', (r) => r.title),
    c('synthetic', 'boolean', 'SYNTHETIC: computed from band parameters, not measured', (r) => r.synthetic),
    c('lab', 'string', 'Measuring laboratory', (r) => labs.get(r.labId)),
    c('technique', 'string', 'Technique', (r) => r.technique),
    c('phase', 'string', 'Phase', (r) => r.phase),
    c('solvent', 'string', 'Solvents with volume fractions', (r) => solventOf(r.id)),
    c('pH', 'number', 'pH', (r) => r.pH),
    c('ionic_strength_mol_per_dm3', 'number', 'Ionic strength', (r) => r.ionicStrength),
    c('electrolyte', 'string', 'Electrolyte', (r) => r.electrolyte),
    c('atmosphere', 'string', 'Atmosphere', (r) => r.atmosphere),
    c('age', 'string', 'Time since dissolution', (r) => r.age),
    c('concentration_mol_per_dm3', 'number', 'Of the entity', (r) => r.concentration),
    c('concentration_u_mol_per_dm3', 'number', 'Standard uncertainty, k = 1', (r) => r.concentrationUncertainty),
    c('path_length_cm', 'number', 'Path length', (r) => r.pathLength),
    c('path_length_u_cm', 'number', 'Standard uncertainty, k = 1', (r) => r.pathLengthUncertainty),
    c('temperature_K', 'number', 'Temperature', (r) => r.temperature),
    c('bandwidth_nm', 'number', 'Spectral bandwidth', (r) => r.bandwidth),
    c('instrument', 'string', 'Instrument', (r) => (r.instrumentId ? instruments.get(r.instrumentId) : null)),
    c('measured_at', 'string', 'ISO 8601', (r) => r.measuredAt),
    c('x_unit', 'string', 'Unit of the abscissa in the original', (r) => r.xUnit),
    c('y_unit', 'string', 'Quantity of the ordinate in the original', (r) => r.yUnit),
    c('points', 'integer', 'Number of points', (r) => r.points),
    c('x_min_per_cm', 'number', 'Lowest wavenumber', (r) => r.xMin),
    c('x_max_per_cm', 'number', 'Highest wavenumber', (r) => r.xMax),
    c('block', 'integer', 'Block of the original file, from 0', (r) => r.block),
    c('column', 'integer', 'Ordinate column of the block, from 0', (r) => r.column),
    c('flags', 'string', 'What the checks found', (r) => r.flags.map((flag) => flag.code).join('; ')),
    c('state', 'string', 'draft, registered or withdrawn', (r) => r.state),
    c('original', 'string', 'Path of the original file', (r) => originalPath(r)),
    c('original_sha256', 'string', 'SHA-256 of the original file', (r) => r.fileSha256),
    c('jcamp', 'string', 'Path of the JCAMP-DX file', (r) => jcampPath(of(r), r)),
    c('csv', 'string', 'Path of the CSV file', (r) => csvPath(of(r), r)),
    c('updated_at', 'string', 'Last change, ISO 8601', (r) => r.updatedAt),
  ];
}

function bandColumns({ complexes, spectra }: Content) {
  const c = column<Content['bands'][number]>();
  const accession = new Map(complexes.map((complex) => [complex.id, complex.accession]));
  const of = new Map(spectra.map((spectrum) => [spectrum.id, accession.get(spectrum.complexId)]));
  return [
    c('id', 'string', 'Band', (r) => r.id),
    c('spectrum', 'string', 'Its spectrum', (r) => r.spectrumId),
    c('accession', 'string', 'Its complex', (r) => of.get(r.spectrumId)),
    c('wavenumber_per_cm', 'number', 'Position', (r) => r.wavenumber),
    c('wavelength_nm', 'number', 'Position, as 1e7 / wavenumber', (r) => Number((1e7 / r.wavenumber).toPrecision(8))),
    c('uncertainty_per_cm', 'number', 'Standard uncertainty of the wavenumber, k = 1', (r) => r.uncertainty),
    c('height', 'number', 'In the quantity named next', (r) => r.height),
    c('quantity', 'string', 'Quantity of the height', (r) => r.quantity),
    c('epsilon_dm3_per_mol_per_cm', 'number', 'Molar absorption coefficient per mole of entity', (r) => r.epsilon),
    c('fwhm_per_cm', 'number', 'Full width at half height', (r) => r.fwhm),
    c('shoulder', 'boolean', 'Whether it is a shoulder', (r) => r.shoulder),
    c('oscillator_strength', 'number', 'Oscillator strength', (r) => r.oscillatorStrength),
    c('found', 'string', 'picked, fitted or typed', (r) => r.found),
    c('class', 'string', 'Class of the assignment', (r) => r.class),
    c('centre', 'integer', 'Centre, from 0', (r) => r.centreOrdinal),
    c('ligand', 'string', 'Ligand', (r) => r.ligand),
    c('from', 'string', 'Lower term or orbital', (r) => r.from),
    c('to', 'string', 'Upper term or orbital', (r) => r.to),
    c('reason', 'string', 'Reason given', (r) => r.reason),
    c('state', 'string', 'proposed, attested or disputed', (r) => r.state),
  ];
}
