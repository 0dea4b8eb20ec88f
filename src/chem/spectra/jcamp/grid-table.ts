import { DomainError } from '../../errors.ts';
import { limits, type SpectrumWarning } from '../types.ts';
import { halfUnit, type StatedNumber } from './fields.ts';
import { decodeOrdinates, type LineStart, type OrdinateTable } from './ordinates.ts';
import type { ValueLine } from './records.ts';

/** What the records round an `(X++(Y..Y))` table state; null where the file does not. */
export interface GridHead {
  firstX: StatedNumber | null;
  lastX: StatedNumber | null;
  deltaX: StatedNumber | null;
  firstY: StatedNumber | null;
  points: StatedNumber | null;
  xFactor: StatedNumber | null;
  yFactor: StatedNumber | null;
  /** Whether the block is closed by its END record; where it is not, a short count means a truncated file. */
  closed: boolean;
  line: number;
}

export interface Points {
  x: number[];
  y: number[];
  /** Half a step of the stored ordinates, in real units: what a writer could not resolve. */
  resolution: number;
}

/**
 * Points of an `(X++(Y..Y))` table: ordinates times YFACTOR on the grid of FIRSTX, LASTX and NPOINTS, with every check
 * that the table allows.
 *
 * @throws {DomainError} `unreadable` when a count, an abscissa or a Y-check does not agree
 */
export function readGridTable(lines: readonly ValueLine[], head: GridHead, warnings: SpectrumWarning[]): Points {
  refuseDeclared(head);
  const table = decodeWithDecimalComma(lines, head, warnings);
  const count = agreedCount(table, head, warnings);
  const xFactor = factorOf('XFACTOR', head.xFactor, warnings);
  const yFactor = factorOf('YFACTOR', head.yFactor, warnings);
  const [first, last] = ends(table, count, head, xFactor, warnings);
  const step = count > 1 ? (last - first) / (count - 1) : 0;
  if (count > 1 && step === 0) {
    throw unreadable(`FIRSTX and LASTX are both ${first}, yet there are ${count} points`, head.line);
  }
  checkStarts(table.starts, first, step, xFactor, warnings);
  checkDelta(step, count, head, warnings);
  return {
    // Twelve digits are more than any file states, and take away the noise of the last bits (400.3, not 400.30000000000001).
    x: Array.from({ length: count }, (_, i) => (i === count - 1 && i > 0 ? last : tidy(first + i * step))),
    y: table.ordinates.map((ordinate) => ordinate * yFactor),
    resolution: table.ordinates.every((y) => Number.isNaN(y) || Number.isInteger(y)) ? Math.abs(yFactor) / 2 : 0,
  };
}

function tidy(value: number): number {
  return Number(value.toPrecision(12));
}

function refuseDeclared({ points }: GridHead): void {
  if (points === null) return;
  if (points.value > limits.pointsPerBlock) {
    throw new DomainError(
      'too-large',
      `NPOINTS is ${points.value}; up to ${limits.pointsPerBlock} points are read`,
      'file',
      points.line,
    );
  }
  if (!Number.isInteger(points.value) || points.value < 1) {
    throw unreadable(`NPOINTS must be a whole number above zero; ${points.value} is not`, points.line);
  }
}

/**
 * Commas are separators by the standard. Where that reading fails and no number of the table has a full stop, they
 * may be decimal signs; then NPOINTS and FIRSTY must both confirm it.
 */
function decodeWithDecimalComma(
  lines: readonly ValueLine[],
  head: GridHead,
  warnings: SpectrumWarning[],
): OrdinateTable {
  const hasComma = lines.some(({ text }) => /\d,\d/.test(text));
  if (!hasComma) return decodeOrdinates(lines);
  const plain = attempt(() => decodeOrdinates(lines));
  if (plain && head.points !== null && plain.ordinates.length === head.points.value) return plain;
  const stated = [head.firstX, head.lastX, head.deltaX, head.firstY, head.xFactor, head.yFactor];
  const hasStop =
    lines.some(({ text }) => text.includes('.')) ||
    stated.some((number) => number !== null && !number.decimalComma && !Number.isInteger(number.value));
  const comma = hasStop ? null : attempt(() => decodeOrdinates(lines.map(withStop)));
  if (comma && isConfirmed(comma, head)) {
    warnings.push({ code: 'decimal-comma', detail: 'numbers were read with a decimal comma' });
    return comma;
  }
  if (plain && head.points === null) return plain;
  throw unreadable(
    'the table has commas that are neither separators nor, by NPOINTS and FIRSTY, decimal signs; write numbers with a full stop',
    lines[0]?.line ?? head.line,
  );
}

function withStop({ text, line }: ValueLine): ValueLine {
  return { text: text.replace(/(\d),(?=\d)/g, '$1.'), line };
}

function attempt<T>(read: () => T): T | null {
  try {
    return read();
  } catch (error) {
    if (error instanceof DomainError) return null;
    throw error;
  }
}

function isConfirmed(table: OrdinateTable, { points, firstY, yFactor }: GridHead): boolean {
  if (points === null || firstY === null || table.ordinates.length !== points.value) return false;
  const found = table.ordinates[0]! * (yFactor?.value ?? 1);
  return Math.abs(found - firstY.value) <= firstY.rounding * 1.000001;
}

function agreedCount(table: OrdinateTable, head: GridHead, warnings: SpectrumWarning[]): number {
  const found = table.ordinates.length;
  if (found === 0) throw unreadable('the table holds no ordinates', head.line);
  if (head.points === null) {
    if (!head.closed) throw unreadable('neither NPOINTS nor END is there, so the table may be cut off', head.line);
    warnings.push({ code: 'npoints-missing', detail: `NPOINTS is missing; ${found} points were found` });
    return found;
  }
  const declared = head.points.value;
  if (declared === found) return found;
  if (table.checks > 0 && declared === found + table.checks) {
    const detail = `NPOINTS is ${declared} and counts the ${table.checks} Y-checks; there are ${found} points`;
    warnings.push({ code: 'npoints-counts-checks', detail, line: head.points.line });
    return found;
  }
  const cut = !head.closed && found < declared ? '; the file is cut off, for its END is missing too' : '';
  throw unreadable(`NPOINTS is ${declared}, but the table has ${found} ordinates${cut}`, head.points.line);
}

function factorOf(name: string, stated: StatedNumber | null, warnings: SpectrumWarning[]): number {
  if (stated === null) {
    warnings.push({ code: `${name.toLowerCase()}-missing`, detail: `${name} is missing; 1 was taken` });
    return 1;
  }
  if (stated.value === 0) throw unreadable(`${name} must not be zero`, stated.line);
  return stated.value;
}

/** First and last abscissa; from the table where the records are missing, turned round where they are swapped. */
function ends(
  table: OrdinateTable,
  count: number,
  head: GridHead,
  xFactor: number,
  warnings: SpectrumWarning[],
): [number, number] {
  const opening = table.starts[0]!.x * xFactor;
  let first = head.firstX?.value;
  if (first === undefined) {
    warnings.push({ code: 'firstx-missing', detail: `FIRSTX is missing; ${opening} was taken from the table` });
    first = opening;
  }
  if (count === 1) return [first, first];
  let last = head.lastX?.value;
  if (last === undefined) {
    if (head.deltaX === null) throw unreadable('LASTX and DELTAX are both missing, so there is no grid', head.line);
    last = tidy(first + head.deltaX.value * (count - 1));
    warnings.push({ code: 'lastx-missing', detail: `LASTX is missing; ${last} was reckoned from DELTAX` });
  }
  const half = Math.max(Math.abs(last - first) / (count - 1) / 2, table.starts[0]!.rounding * Math.abs(xFactor));
  if (Math.abs(opening - first) > half && Math.abs(opening - last) <= half) {
    const detail = `the table opens at ${opening}, which is LASTX: FIRSTX and LASTX were exchanged`;
    warnings.push({ code: 'first-last-swapped', detail, line: table.starts[0]!.line });
    return [last, first];
  }
  return [first, last];
}

/** Each line's abscissa against the grid; one met twice, or off by a step, means lines lost or doubled. */
function checkStarts(
  starts: readonly LineStart[],
  first: number,
  step: number,
  xFactor: number,
  warnings: SpectrumWarning[],
): void {
  const size = Math.abs(step);
  const seen = new Map<number, number>();
  let rough: { line: number; x: number; expected: number } | null = null;
  for (const { x: written, rounding, index, line } of starts) {
    const x = written * xFactor;
    const expected = first + index * step;
    const slack = rounding * Math.abs(xFactor) * 1.000001; // half a unit of the last digit that the line states
    const before = seen.get(written);
    if (before !== undefined && slack < size / 2) {
      throw unreadable(`the line at ${written} was met before, in line ${before}: a doubled line`, line);
    }
    seen.set(written, line);
    const off = Math.abs(x - expected);
    if (off <= Math.max(size / 2, slack)) continue;
    if (off >= size * 0.999999) {
      throw unreadable(`the line opens at ${x}, where FIRSTX, LASTX and NPOINTS give ${tidy(expected)}`, line);
    }
    rough ??= { line, x, expected };
  }
  if (rough) {
    const detail = `a line opens at ${rough.x}, where the grid has ${tidy(rough.expected)}; the grid was taken`;
    warnings.push({ code: 'x-check', detail, line: rough.line });
  }
}

function checkDelta(step: number, count: number, { deltaX }: GridHead, warnings: SpectrumWarning[]): void {
  if (deltaX === null || count < 2) return;
  const slack = Math.max(Math.abs(step) / 100, deltaX.rounding < Math.abs(step) / 2 ? deltaX.rounding : 0);
  if (Math.abs(deltaX.value - step) <= slack) return;
  const detail = `DELTAX is ${deltaX.value}; FIRSTX, LASTX and NPOINTS give ${tidy(step)}, which was taken`;
  warnings.push({ code: 'deltax', detail, line: deltaX.line });
}

/** FIRSTY, MAXY or MINY against the points, as near as the stated digits and the stored resolution allow. */
export function checkStated(
  name: string,
  stated: StatedNumber | null,
  found: number,
  resolution: number,
  warnings: SpectrumWarning[],
): void {
  if (stated === null || !Number.isFinite(found)) return;
  const slack = Math.max(stated.rounding, resolution) * 1.000001 + 1e-9 * Math.abs(found);
  if (Math.abs(stated.value - found) <= slack) return;
  const detail = `${name} is ${stated.value}; the points give ${found}`;
  warnings.push({ code: name.toLowerCase(), detail, line: stated.line });
}

/** A number that the caller worked out, in the form of a stated one. */
export function statedNumber(value: number, line: number): StatedNumber {
  return { value, rounding: halfUnit(String(value)), decimalComma: false, line };
}

function unreadable(message: string, line: number): DomainError {
  return new DomainError('unreadable', message, 'file', line);
}
