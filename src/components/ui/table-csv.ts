import Papa from 'papaparse';
import type { ReactNode } from 'react';
import { guardCell } from '#src/chem/spectra/write-csv.ts';

/** A column: what it sorts, filters and exports by, and how a cell is drawn where that is not the plain value. */
export interface DataColumn<T> {
  id: string;
  header: string;
  value: (row: T) => string | number | null;
  cell?: (row: T) => ReactNode;
  /** Set in figures, at the right. */
  figures?: boolean;
}

/**
 * Rows as CSV (RFC 4180) with one line of heads. A text that a spreadsheet would run as a formula gets an apostrophe
 * before it; numbers stay numbers, negative ones too.
 */
export function tableCsv<T>(columns: readonly DataColumn<T>[], rows: readonly T[]): string {
  const guarded = (cell: string | number | null) => (typeof cell === 'string' ? guardCell(cell) : (cell ?? ''));
  const fields = columns.map(({ header }) => guardCell(header));
  const data = rows.map((row) => columns.map(({ value }) => guarded(value(row))));
  return Papa.unparse({ fields, data }, { newline: '\r\n' });
}
