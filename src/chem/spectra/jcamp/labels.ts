import { type JcampRecord, normaliseLabel } from './records.ts';

/** Standard spelling of the labels that a UV-vis-NIR file may hold (McDonald & Wilks 1988; Lampen et al. 1999). */
const STANDARD = [
  ...[
    'TITLE',
    'JCAMP-DX',
    'DATA TYPE',
    'DATA CLASS',
    'ORIGIN',
    'OWNER',
    'DATE',
    'TIME',
    'LONGDATE',
    'BLOCKS',
    'BLOCK_ID',
  ],
  ...['SPECTROMETER/DATA SYSTEM', 'INSTRUMENT PARAMETERS', 'SAMPLING PROCEDURE', 'SAMPLE DESCRIPTION', 'STATE'],
  ...['CONCENTRATIONS', 'SOLVENT NAME', 'PATHLENGTH', 'TEMPERATURE', 'PRESSURE', 'RESOLUTION', 'MOLFORM', 'NAMES'],
  ...['CAS REGISTRY NO', 'CAS NAME', 'SOURCE REFERENCE', 'CROSS REFERENCE', 'DATA PROCESSING', 'AUDIT TRAIL', 'CLASS'],
  ...['XUNITS', 'YUNITS', 'XLABEL', 'YLABEL', 'XFACTOR', 'YFACTOR', 'FIRSTX', 'LASTX', 'DELTAX', 'NPOINTS', 'FIRSTY'],
  ...['MAXX', 'MINX', 'MAXY', 'MINY', 'MW', 'PAGE'],
];
const spellings = new Map(STANDARD.map((label) => [normaliseLabel(label), label]));

/** Name under which a record is handed on: the standard's spelling, or the file's own for a label it does not know. */
export function metadataName(record: JcampRecord): string {
  // `.SOLVENT NAME` is the form of 5.01 for NMR; both are met in UV-vis files.
  if (record.label === '.SOLVENTNAME') return 'SOLVENT NAME';
  return spellings.get(record.label) ?? record.spelling;
}
