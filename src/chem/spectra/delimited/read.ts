import { DomainError } from '../../errors.ts';
import { settleUnits } from '../settle-units.ts';
import { limits, type ReadOptions, type SpectrumBlock, type SpectrumWarning, type YUnit } from '../types.ts';
import { xUnitFromText, yUnitFromText } from '../unit-names.ts';
import type { DataLine, Notation } from './cells.ts';
import { findNotation } from './dialect.ts';
import { type Header, pairColumns, readHeader } from './header.ts';
import { type FoundTable, findTables } from './table.ts';

/**
 * Spectra of delimited text: each ordinate column of each table is one.
 *
 * @param lines - lines of the file, without their ends
 * @throws {DomainError} see `readSpectrumFile`
 */
export function readDelimited(lines: readonly string[], options: ReadOptions): SpectrumBlock[] {
  const skipped = Math.max(0, options.skipLines ?? 0);
  const text = lines.map((line, i) => (i < skipped ? '' : line));
  const notation = findNotation(text, options);
  const { tables, footer } = findTables(text, notation);
  if (tables.length === 0) {
    throw new DomainError('unreadable', 'no table of two lines or more was found', 'file', 1);
  }
  const blocks = tables.flatMap((table) => blocksOf(table, notation, options));
  if (blocks.length > limits.blocks) {
    throw new DomainError(
      'too-large',
      `${blocks.length} spectra in one file; up to ${limits.blocks} are read, so choose columns`,
      'file',
    );
  }
  if (blocks.reduce((sum, { points }) => sum + points, 0) > limits.pointsPerFile) {
    throw new DomainError('too-large', `more than ${limits.pointsPerFile} points in one file`, 'file');
  }
  const footerWarnings = footerOf(footer);
  return blocks.map((block) => settleUnits({ ...block, warnings: [...block.warnings, ...footerWarnings] }, options));
}

function footerOf(footer: readonly string[]): SpectrumWarning[] {
  const met = footer.find((text) => text.trim() !== '');
  return met === undefined
    ? []
    : [{ code: 'text-below', detail: `text below the table was left out: "${met.trim().slice(0, 60)}"` }];
}

function blocksOf(table: FoundTable, notation: Notation, options: ReadOptions): SpectrumBlock[] {
  const header = readHeader(table, notation);
  refuseAmbiguousComma(table, header, notation, options);
  const pairs = chosenColumns(table, header, options);
  const yUnits = ordinateUnits(pairs, header);
  const warnings = tableWarnings(table);
  const dialect = {
    delimiter: notation.delimiter,
    decimalComma: notation.decimalComma,
    headerLines: table.rows[0]!.line - 1,
    columns: table.columns,
    columnNames: header.names,
  };
  return pairs.flatMap(([xColumn, yColumn], i): SpectrumBlock[] => {
    const { x, y, rows } = column(table.rows, xColumn, yColumn);
    if (x.length < 2 || y.every(Number.isNaN)) return [];
    const xUnitText = label(header, xColumn);
    return [
      {
        title: titleOf(header, yColumn, pairs.length),
        kind: 'curve',
        xUnit: xUnitFromText(xUnitText) ?? header.xUnit,
        yUnit: yUnits[i] ?? null,
        xUnitText,
        yUnitText: label(header, yColumn),
        points: x.length,
        x,
        y,
        metadata: header.metadata,
        warnings: [...warnings, ...orderWarnings(x, rows)],
        format: 'delimited',
        dialect,
      },
    ];
  });
}

function chosenColumns(table: FoundTable, header: Header, { columns }: ReadOptions): [number, number][] {
  if (!columns) {
    const pairs = pairColumns(table.rows, table.columns, header.names);
    const filled = pairs.filter(([, y]) => table.rows.some(({ values }) => !Number.isNaN(values[y] ?? Number.NaN)));
    if (filled.length > 0) return filled;
    throw new DomainError('unreadable', 'the table has no column of values', 'file', table.rows[0]!.line);
  }
  const bad = [columns.x, ...columns.y].find((c) => !Number.isInteger(c) || c < 0 || c >= table.columns);
  if (bad !== undefined) {
    throw new DomainError(
      'out-of-range',
      `column ${bad} was asked for; the table has ${table.columns}, counted from 0`,
      'columns',
    );
  }
  return columns.y.map((y) => [columns.x, y]);
}

function column(rows: readonly DataLine[], xColumn: number, yColumn: number) {
  const kept = rows.filter(({ values }) => Number.isFinite(values[xColumn] ?? Number.NaN));
  return {
    rows: kept,
    x: kept.map(({ values }) => values[xColumn]!),
    y: kept.map(({ values }) => values[yColumn] ?? Number.NaN),
  };
}

/** Label of a column with the name above it where that holds the unit. */
function label({ names, upper }: Header, column: number): string {
  const own = names[column] ?? '';
  return own === '' ? (upper[column] ?? '') : own;
}

function titleOf({ names, upper, title }: Header, column: number, count: number): string {
  const above = upper[column] || upper[column - 1] || '';
  if (above !== '' && yUnitFromText(above) === null) return above;
  const own = names[column] ?? '';
  const isName = own !== '' && (yUnitFromText(own) === null || count > 1);
  return isName ? own : title;
}

/**
 * Quantities of the ordinate columns. A letter alone (A, T, R) is one only when every column's label can be read;
 * among A, B and C it is the name of a sample.
 */
function ordinateUnits(pairs: readonly [number, number][], header: Header): (YUnit | null)[] {
  const labels = pairs.map(([, y]) => label(header, y));
  const units = labels.map((text) => yUnitFromText(text));
  const isWhole = units.every((unit) => unit !== null);
  return labels.map((text, i) => (isWhole ? units[i]! : (yUnitFromText(text, false) ?? header.yUnit)));
}

function tableWarnings({ rows, columns }: FoundTable): SpectrumWarning[] {
  const warnings: SpectrumWarning[] = [];
  const trailing = rows.find((row) => row.trailing !== '');
  if (trailing) {
    const detail = `text behind the numbers was left out: "${trailing.trailing.slice(0, 60)}"`;
    warnings.push({ code: 'trailing-text', detail, line: trailing.line });
  }
  const short = rows.filter((row) => row.values.length < columns);
  if (short.length > 0) {
    const detail = `${short.length} lines have fewer values than the others; gaps were left`;
    warnings.push({ code: 'short-line', detail, line: short[0]!.line });
  }
  return warnings;
}

function orderWarnings(x: readonly number[], rows: readonly DataLine[]): SpectrumWarning[] {
  const warnings: SpectrumWarning[] = [];
  const seen = new Set<number>();
  const again = x.findIndex((value) => seen.has(value) || !seen.add(value));
  if (again >= 0) {
    warnings.push({ code: 'repeated-x', detail: `the abscissa ${x[again]} is met twice`, line: rows[again]!.line });
  }
  const direction = Math.sign(x.at(-1)! - x[0]!);
  const turn = x.findIndex((value, i) => i > 0 && Math.sign(value - x[i - 1]!) === -direction && direction !== 0);
  if (turn >= 0) {
    warnings.push({ code: 'unsorted', detail: `the abscissae turn round at ${x[turn]}`, line: rows[turn]!.line });
  }
  return warnings;
}

/**
 * Commas both between and inside numbers (`400,0,123`) cannot be told apart from a table of whole numbers, and every
 * spectrum read so would be wrong.
 */
function refuseAmbiguousComma(table: FoundTable, header: Header, notation: Notation, options: ReadOptions): void {
  if (notation.delimiter !== ',' || options.delimiter !== undefined || options.columns || table.columns < 3) return;
  const isWhole = table.rows.every(({ values }) =>
    values.every((value) => Number.isNaN(value) || Number.isInteger(value)),
  );
  if (!isWhole) return;
  const labels = header.names.filter((name) => name !== '').length;
  const looksLikeParts = table.rows.every(({ values }) => Math.abs(values[1]!) <= 3);
  if (!(labels > 0 && labels < table.columns) && !looksLikeParts) return;
  throw new DomainError(
    'ambiguous',
    'the commas may part numbers or be decimal signs; save with semicolon or tab between the columns',
    'file',
    table.rows[0]!.line,
  );
}
