import Papa from 'papaparse';

/** How a line is cut and its numbers are written. A blank stands for any run of blanks. */
export interface Notation {
  delimiter: string;
  decimalComma: boolean;
}

const NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eEdD][+-]?\d{1,3})?$/;
const NUMBER_WITH_COMMA = /^[+-]?(?:\d+,?\d*|,\d+)(?:[eEdD][+-]?\d{1,3})?$/;
/** What instruments and spreadsheets put where there is no number. */
const GAP = /^(?:|nan|n\.?\/?a\.?|null|none|-+|\?+|#+|\*+|#n\/a|#value!|[+-]?inf(?:inity)?|over|overflow|ovr|sat)$/i;

/** A number; NaN for a gap; null for text. */
export function readCell(cell: string, decimalComma: boolean): number | null {
  const text = /^[−–]/.test(cell) ? `-${cell.slice(1)}` : cell;
  if ((decimalComma ? NUMBER_WITH_COMMA : NUMBER).test(text)) {
    const value = Number(decimalComma || /d/i.test(text) ? text.replace(',', '.').replace(/d/i, 'e') : text);
    return Number.isFinite(value) ? value : Number.NaN;
  }
  return GAP.test(text) ? Number.NaN : null;
}

/** Cells of a line, trimmed; quotes as in RFC 4180. */
export function cutLine(line: string, delimiter: string): string[] {
  if (delimiter === ' ') return line.trim().split(/\s+/);
  if (!line.includes('"')) return line.split(delimiter).map((cell) => cell.trim());
  const row = Papa.parse<string[]>(line, { delimiter }).data[0] ?? [];
  return row.map((cell) => cell.trim());
}

/** A line of numbers: an abscissa, then as many numbers and gaps as follow, then perhaps text. */
export interface DataLine {
  line: number;
  values: number[];
  /** Text behind the numbers. */
  trailing: string;
}

/** The line as data, or null when it does not open with a number. */
export function readDataLine(text: string, line: number, { delimiter, decimalComma }: Notation): DataLine | null {
  const cells = cutLine(text, delimiter);
  const values: number[] = [];
  for (const cell of cells) {
    const value = readCell(cell, decimalComma);
    if (value === null) break;
    values.push(value);
  }
  if (values.length === 0 || Number.isNaN(values[0]!)) return null;
  return { line, values, trailing: cells.slice(values.length).join(' ').trim() };
}

/** Whether a line has a number beside its abscissa, so that it alone tells that this is a table. */
export function isStrong({ values }: DataLine): boolean {
  return values.length > 1 && values.slice(1).some((value) => !Number.isNaN(value));
}

/** Blank lines, and lines marked as comments. */
export function isPassedOver(text: string, delimiter: string): boolean {
  const first = text.charCodeAt(0);
  if (first >= 48 && first <= 57) return false; // a digit: most lines there are
  const trimmed = text.trim();
  if (trimmed === '') return true;
  return /^(?:#|%(?!\s*[TR]\b)|\/\/|!)/i.test(trimmed) || (delimiter !== ';' && trimmed.startsWith(';'));
}
