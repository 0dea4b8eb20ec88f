import Papa from 'papaparse';
import { requirePoints, type SpectrumToWrite } from './jcamp/write.ts';
import { xUnitNames, yUnitNames } from './unit-names.ts';

/**
 * The points as CSV (RFC 4180): one line of column heads with their units, then x and y with a full stop as decimal
 * sign and every digit, an empty cell for a gap, CR LF. A head that a spreadsheet would take for a formula gets an
 * apostrophe before it.
 *
 * @param yName - head of the second column, where there is a better one than the quantity
 * @throws {DomainError} as `writeJcamp`
 */
export function writeCsv(spectrum: Pick<SpectrumToWrite, 'x' | 'y' | 'xUnit' | 'yUnit'> & { yName?: string }): string {
  requirePoints(spectrum);
  const { x, y, xUnit, yUnit, yName } = spectrum;
  const heads = [xUnitNames[xUnit].column, yName ? `${yName} (${yUnitNames[yUnit].column})` : yUnitNames[yUnit].column];
  const head = Papa.unparse([heads.map(guardCell)], { newline: '\r\n' });
  const rows = Array.from(x, (value, i) => `${value},${Number.isFinite(y[i]) ? y[i] : ''}`);
  return `${[head, ...rows].join('\r\n')}\r\n`;
}

/**
 * A cell of text that no spreadsheet takes for a formula: an apostrophe goes before `=`, `+`, `-`, `@`, tab and line
 * ends. For text only: a negative number is none.
 *
 * @see OWASP, CSV Injection (from memory)
 */
export function guardCell(text: string): string {
  return /^[=+\-@\t\r\n]/.test(text.trimStart()) || /^[\t\r\n]/.test(text) ? `'${text}` : text;
}
