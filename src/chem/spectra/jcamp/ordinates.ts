import { DomainError } from '../../errors.ts';
import { limits } from '../types.ts';
import { halfUnit } from './fields.ts';
import type { ValueLine } from './records.ts';

/** A line's abscissa as written, and which ordinate (counted from 0) stands at it. */
export interface LineStart {
  x: number;
  rounding: number;
  index: number;
  line: number;
}

/** Ordinates of a table before its factor is applied; NaN is a gap. */
export interface OrdinateTable {
  ordinates: number[];
  starts: LineStart[];
  /** How many Y-checks were met and dropped. */
  checks: number;
}

type Mode = 'absolute' | 'difference';

const ABSCISSA = /^\s*([+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]\d{1,3}(?!\d))?)/;
/**
 * One ordinate. A letter E or e makes an exponent only with a sign behind it and a number of its own before it:
 * `600E5` is two fields. A PAC field is parted from the next by its sign.
 */
const ORDINATE =
  /[\s,;]*(?:(\?)|([+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]\d{1,3}(?!\d))?)|([@A-Ia-i%J-Rj-r])(\d*(?:\.\d+)?)|([S-Zs])(\d*))/y;

/** Value of the first digit that a letter stands for, with its sign, and what kind of item it opens. */
function leadingDigit(letter: string): { digit: number; negative: boolean; mode: Mode } {
  if (letter === '@') return { digit: 0, negative: false, mode: 'absolute' };
  if (letter === '%') return { digit: 0, negative: false, mode: 'difference' };
  const code = letter.charCodeAt(0);
  if (code <= 73) return { digit: code - 64, negative: false, mode: 'absolute' }; // A..I
  if (code <= 82) return { digit: code - 73, negative: false, mode: 'difference' }; // J..R
  if (code <= 105) return { digit: code - 96, negative: true, mode: 'absolute' }; // a..i
  return { digit: code - 105, negative: true, mode: 'difference' }; // j..r
}

/**
 * Decodes an `(X++(Y..Y))` table: AFFN, PAC, SQZ, DIF and DUP, mixed as they come.
 *
 * A line that follows one ended in difference form opens with that line's last ordinate again (the Y-check), which is
 * compared and dropped.
 *
 * @throws {DomainError} `unreadable` with the line for what is no ordinate and for a failed Y-check, `too-large` above
 *   a million ordinates
 * @see R. S. McDonald, P. A. Wilks, Appl. Spectrosc. 42 (1988) 151, sections 5.2–5.10
 */
export function decodeOrdinates(lines: readonly ValueLine[]): OrdinateTable {
  const table: OrdinateTable = { ordinates: [], starts: [], checks: 0 };
  let mode: Mode = 'absolute';
  for (const { text, line } of lines) mode = decodeLine(text, line, mode, table);
  return table;
}

function decodeLine(text: string, line: number, before: Mode, table: OrdinateTable): Mode {
  const opening = text.match(ABSCISSA);
  if (!opening) throw unreadable(`a line of the table must open with a number; "${excerpt(text)}" does not`, line);
  const written = opening[1]!;
  const start = { x: Number(written), rounding: halfUnit(written), index: table.ordinates.length, line };
  table.starts.push(start);
  const check = before === 'difference' ? table.ordinates.at(-1)! : null;
  if (check !== null) start.index--;

  const items = text.trimEnd();
  let mode: Mode = 'absolute';
  let last: number | null = null; // the ordinate before, of this line
  let step = 0; // the difference before, where mode is difference
  let isFirst = true;
  ORDINATE.lastIndex = opening[0].length;
  while (ORDINATE.lastIndex < items.length) {
    const at = ORDINATE.lastIndex;
    const match = ORDINATE.exec(items);
    if (!match) {
      if (/^[\s,;]*$/.test(items.slice(at))) break;
      throw unreadable(`"${excerpt(items.slice(at))}" is no ordinate`, line);
    }
    const [, missing, plain, letter, digits = '', repeat, more = ''] = match;
    if (repeat !== undefined) {
      if (last === null) throw unreadable('a repeat count stands before any ordinate of its line', line);
      const count = Number(`${repeat === 's' ? 9 : repeat.charCodeAt(0) - 82}${more}`);
      for (let i = 1; i < count; i++) {
        if (mode === 'difference') last += step;
        append(table, last, line);
      }
      isFirst = false;
      continue;
    }
    if (missing !== undefined) {
      mode = 'absolute';
      last = Number.NaN;
    } else if (plain !== undefined) {
      mode = 'absolute';
      last = Number(plain);
    } else {
      const lead = leadingDigit(letter!);
      const size = Number(`${lead.digit}${digits}`) * (lead.negative ? -1 : 1);
      mode = lead.mode;
      if (mode === 'absolute') last = size;
      else {
        if (last === null) throw unreadable('a difference stands before any ordinate of its line', line);
        if (Number.isNaN(last)) throw unreadable('a difference follows a missing ordinate', line);
        step = size;
        last += step;
      }
    }
    if (isFirst && check !== null) {
      compareCheck(check, last, line);
      table.checks++;
    } else append(table, last, line);
    isFirst = false;
  }
  return mode;
}

function compareCheck(expected: number, found: number, line: number): void {
  const scale = Math.max(1, Math.abs(expected));
  if (Math.abs(expected - found) <= 1e-9 * scale) return;
  throw unreadable(
    `Y-check failed: the line before ended at ${expected}, this one opens with ${found}; the file is damaged`,
    line,
  );
}

function append(table: OrdinateTable, ordinate: number, line: number): void {
  if (table.ordinates.length >= limits.pointsPerBlock) {
    throw new DomainError('too-large', `more than ${limits.pointsPerBlock} points in one block`, 'file', line);
  }
  table.ordinates.push(ordinate);
}

function unreadable(message: string, line: number): DomainError {
  return new DomainError('unreadable', message, 'file', line);
}

function excerpt(text: string): string {
  const trimmed = text.trim();
  return trimmed.length > 24 ? `${trimmed.slice(0, 24)}…` : trimmed;
}
