import { DomainError } from '../../errors.ts';
import { limits } from '../types.ts';
import { type DataLine, isPassedOver, isStrong, type Notation, readDataLine } from './cells.ts';

/** A table of numbers within a text, and the lines above it. */
export interface FoundTable {
  rows: DataLine[];
  /** Lines above the table, from the end of the one before; index of each in the file. */
  header: { text: string; line: number }[];
  /** Columns, the abscissa counted. */
  columns: number;
}

/**
 * Tables of two data lines or more, in order. Blank and comment lines do not end a table.
 *
 * @throws {DomainError} `unreadable` with the line where text stands in the middle of a table, `too-large` above a
 *   million lines of data
 */
export function findTables(lines: readonly string[], notation: Notation): { tables: FoundTable[]; footer: string[] } {
  const tables: FoundTable[] = [];
  let header: FoundTable['header'] = [];
  let rows: DataLine[] = [];
  const finish = (): void => {
    const isTable = rows.filter(isStrong).length >= 2;
    if (isTable) {
      tables.push({ rows, header, columns: columnsOf(rows) });
      header = [];
    } else for (const { line } of rows) header.push({ text: lines[line - 1]!, line });
    rows = [];
  };
  lines.forEach((text, index) => {
    if (isPassedOver(text, notation.delimiter)) {
      if (rows.length === 0 && text.trim() !== '') header.push({ text, line: index + 1 });
      return;
    }
    const data = readDataLine(text, index + 1, notation);
    if (data && isRow(data)) {
      rows.push(data);
      if (rows.length > limits.pointsPerBlock) {
        throw new DomainError('too-large', `more than ${limits.pointsPerBlock} lines of data`, 'file', index + 1);
      }
      return;
    }
    if (rows.length > 0) finish();
    header.push({ text, line: index + 1 });
  });
  if (rows.length > 0) finish();
  refuseBroken(tables);
  return { tables, footer: header.map(({ text }) => text) };
}

/** An abscissa and a number or gap beside it; text right after the abscissa is a title or a sentence. */
function isRow({ values, trailing }: DataLine): boolean {
  return values.length > 1 || trailing === '';
}

/** The number of columns that most lines have. */
function columnsOf(rows: readonly DataLine[]): number {
  const counts = new Map<number, number>();
  for (const { values } of rows) counts.set(values.length, (counts.get(values.length) ?? 0) + 1);
  return [...counts].sort((a, b) => b[1] - a[1] || b[0] - a[0])[0]?.[0] ?? 0;
}

/** Text of one or two lines inside a table that goes on as before is damage, not the head of another table. */
function refuseBroken(tables: readonly FoundTable[]): void {
  for (const [i, table] of tables.entries()) {
    const before = tables[i - 1];
    if (!before || before.columns !== table.columns || table.header.length > 2) continue;
    const [a, b] = [before.rows.at(-2)!.values[0]!, before.rows.at(-1)!.values[0]!];
    const next = table.rows[0]!.values[0]!;
    const steps = (next - b) / (b - a);
    if (!(steps > 0 && steps < 4)) continue;
    const { text, line } = table.header[0] ?? { text: '', line: table.rows[0]!.line };
    const met = text.trim().slice(0, 40);
    throw new DomainError(
      'unreadable',
      `"${met}" is no data, yet the table goes on behind it; take the line out, or mark it with #`,
      'file',
      line,
    );
  }
}
