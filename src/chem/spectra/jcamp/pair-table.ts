import { DomainError } from '../../errors.ts';
import { limits, type SpectrumWarning } from '../types.ts';
import type { StatedNumber } from './fields.ts';
import type { ValueLine } from './records.ts';

/** Members of a table of groups, before factors: as many numbers a group as the form has letters. */
export interface PairTable {
  x: number[];
  y: number[];
  /** Line of each group. */
  lines: number[];
  labels?: string[];
}

export interface PairHead {
  /** Numbers a group: 2 for (XY..XY), 3 for (XYW..XYW). */
  width: number;
  points: StatedNumber | null;
  firstY: StatedNumber | null;
  yFactor: StatedNumber | null;
}

const FIELD = /\s*(?:([+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]\d{1,3}(?!\d))?)(?![\w.])|(\?))/y;
const SEPARATOR = /\s*[,;]?/y;

/**
 * Groups of a table such as `(XY..XY)`: members parted by comma or blank, groups by semicolon or blank, AFFN only.
 *
 * @throws {DomainError} `unreadable` with the line for what is no number and for a group cut short
 */
export function readPairTable(lines: readonly ValueLine[], head: PairHead, warnings: SpectrumWarning[]): PairTable {
  const hasComma = lines.some(({ text }) => /\d,\d/.test(text));
  const declared = head.points?.value ?? null;
  if (!hasComma || declared === null) return decode(lines, head.width);
  let failure: DomainError | null = null;
  try {
    const table = decode(lines, head.width);
    if (table.x.length === declared || lines.some(({ text }) => text.includes('.'))) return table;
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    failure = error;
  }
  const hasStop = lines.some(({ text }) => text.includes('.'));
  const comma = hasStop ? null : decodeComma(lines, head.width);
  const firstY = head.firstY;
  const opening = (comma?.y[0] ?? Number.NaN) * (head.yFactor?.value ?? 1);
  // Without FIRSTY, which tables of pairs may leave out, the count alone must do.
  const agrees = firstY === null || Math.abs(opening - firstY.value) <= firstY.rounding * 1.000001;
  if (comma && comma.x.length === declared && agrees) {
    warnings.push({ code: 'decimal-comma', detail: 'numbers were read with a decimal comma' });
    return comma;
  }
  if (failure) throw failure;
  return decode(lines, head.width);
}

function decodeComma(lines: readonly ValueLine[], width: number): PairTable | null {
  try {
    return decode(
      lines.map(({ text, line }) => ({ text: text.replace(/(\d),(?=\d)/g, '$1.'), line })),
      width,
    );
  } catch (error) {
    if (error instanceof DomainError) return null;
    throw error;
  }
}

function decode(lines: readonly ValueLine[], width: number): PairTable {
  const table: PairTable = { x: [], y: [], lines: [] };
  let group: number[] = [];
  for (const { text, line } of lines) {
    for (const value of fields(text, line)) {
      group.push(value);
      if (group.length < width) continue;
      push(table, group, line);
      group = [];
    }
  }
  if (group.length > 0) {
    throw unreadable(
      `the last group has ${group.length} of ${width} numbers; the table is cut off`,
      lines.at(-1)!.line,
    );
  }
  return table;
}

function push(table: PairTable, group: readonly number[], line: number): void {
  if (Number.isNaN(group[0]!)) throw unreadable('a point without an abscissa', line);
  if (table.x.length >= limits.pointsPerBlock) {
    throw new DomainError('too-large', `more than ${limits.pointsPerBlock} points in one block`, 'file', line);
  }
  table.x.push(group[0]!);
  table.y.push(group[1] ?? Number.NaN);
  table.lines.push(line);
}

function* fields(text: string, line: number): Generator<number> {
  const end = text.trimEnd().length;
  let at = 0;
  while (at < end) {
    FIELD.lastIndex = at;
    const match = FIELD.exec(text);
    if (!match) throw unreadable(`"${text.slice(at).trim().slice(0, 24)}" is no number of a table of pairs`, line);
    yield match[1] === undefined ? Number.NaN : Number(match[1]);
    SEPARATOR.lastIndex = FIELD.lastIndex;
    SEPARATOR.exec(text);
    at = SEPARATOR.lastIndex;
  }
}

/**
 * Peak assignments: groups in round brackets, numbers first and the assignment in angle brackets, as
 * `(17400, 75, <4T2g>)`. A group may run over lines. Positions, heights (NaN where the form has none) and texts.
 *
 * @param hasHeight - whether the form has Y after X
 */
export function readAssignments(lines: readonly ValueLine[], hasHeight: boolean): PairTable & { labels: string[] } {
  const table = { x: [], y: [], lines: [], labels: [] } as PairTable & { labels: string[] };
  const text = lines.map((value) => value.text).join('\n');
  let row = 0;
  let rowEnd = lines[0]?.text.length ?? 0;
  const lineAt = (offset: number): number => {
    while (offset > rowEnd && row + 1 < lines.length) rowEnd += 1 + lines[++row]!.text.length;
    return lines[row]?.line ?? 0;
  };
  let at = afterSeparators(text, 0);
  while (at < text.length) {
    const group = groupAt(text, at);
    if (group === null) throw unreadable(`"${text.slice(at, at + 24).trim()}" is no peak assignment`, lineAt(at));
    const line = lineAt(group.end - 1);
    const numbers = [...fields(group.numbers.replace(/\n/g, ' ').replace(/,\s*$/, ''), line)];
    if (numbers.length === 0) throw unreadable('a peak assignment without a position', line);
    push(table, [numbers[0]!, hasHeight ? (numbers[1] ?? Number.NaN) : Number.NaN], line);
    table.labels.push(group.label.replace(/\s+/g, ' ').trim());
    at = afterSeparators(text, group.end);
  }
  return table;
}

/** Longest group read, in characters. */
const LONGEST_GROUP = 1000;

/** The group in round brackets that opens at a place; its label ends at the `>` before the closing bracket. */
function groupAt(text: string, at: number): { numbers: string; label: string; end: number } | null {
  const near = text.slice(at, at + LONGEST_GROUP);
  const inside = near.match(/^\(([^<()]*)([<)])/);
  if (!inside) return null;
  const numbers = inside[1] ?? '';
  if (inside[2] === ')') return { numbers, label: '', end: at + inside[0].length };
  for (let close = near.indexOf('>'); close >= 0; close = near.indexOf('>', close + 1)) {
    let end = close + 1;
    while (/\s/.test(near.charAt(end))) end++;
    if (near.charAt(end) === ')') return { numbers, label: near.slice(inside[0].length, close), end: at + end + 1 };
  }
  return null;
}

function afterSeparators(text: string, from: number): number {
  let at = from;
  while (at < text.length && /[\s,;]/.test(text.charAt(at))) at++;
  return at;
}

function unreadable(message: string, line: number): DomainError {
  return new DomainError('unreadable', message, 'file', line);
}
