import type { XUnit, YUnit } from '../types.ts';
import { isAbscissaLabel, xUnitFromText, yUnitFromText } from '../unit-names.ts';
import { cutLine, type Notation } from './cells.ts';
import type { FoundTable } from './table.ts';

/** Lines of a header that are kept, and characters of each. */
const MOST_FACTS = 1000;
const LONGEST_FACT = 1000;

/** What the lines above a table say. */
export interface Header {
  /** Label of each column; empty where there is none. */
  names: string[];
  /** Line of names above the labels (samples over units), as long as `names`, or empty. */
  upper: string[];
  metadata: Record<string, string>;
  title: string;
  /** Units stated in lines of the form "key: value". */
  xUnit: XUnit | null;
  yUnit: YUnit | null;
}

/** Reads the labels right above a table, and what stands above them as facts with a key, or as plain lines. */
export function readHeader({ header, columns }: FoundTable, notation: Notation): Header {
  const lines = header.map(({ text, line }) => ({
    text: text.replace(/^\s*(?:#|%(?!\s*[TR]\b)|\/\/|!)+\s*/i, ''),
    line,
  }));
  const below = lines.at(-1);
  const above = lines.at(-2);
  const names = below ? labelsOf(below.text, columns, notation) : null;
  const upper = names && above ? labelsOf(above.text, columns, notation) : null;
  const used = (names ? 1 : 0) + (upper ? 1 : 0);
  const facts = factsOf(lines.slice(0, lines.length - used), notation);
  return {
    names: names ?? Array.from({ length: columns }, () => ''),
    upper: upper ?? [],
    metadata: facts.metadata,
    title: facts.title,
    ...statedUnits(facts.metadata),
  };
}

/** The line as labels of the columns, cut as the data or as it must be to give their number; else null. */
function labelsOf(text: string, columns: number, { delimiter }: Notation): string[] | null {
  for (const sign of [delimiter, '\t', ';', ',', '|']) {
    const cells = cutLine(text, sign);
    while (cells.length > columns && cells.at(-1) === '') cells.pop();
    if (sign === ' ' && cells.length !== columns) {
      const joined = joinUnits(text);
      if (joined.length === columns) return joined;
      continue;
    }
    const isPlausible = cells.length === columns || (sign === delimiter && cells.length > 1 && cells.length <= columns);
    const isFact = cells.length === 2 && /[:=]$/.test(cells[0] ?? '');
    if (cells.length < 2 || !isPlausible || isFact || cells.every((cell) => cell === '')) continue;
    return Array.from({ length: columns }, (_, i) => cells[i] ?? '');
  }
  return null;
}

/** Labels parted by blanks: cut at two blanks, or at one where no unit follows. */
function joinUnits(text: string): string[] {
  const wide = text.trim().split(/\s{2,}/);
  if (wide.length > 1) return wide;
  return text.trim().split(/\s+(?![([/]|\S*[-^⁻]1\b|[)\]])/);
}

function factsOf(
  lines: readonly { text: string; line: number }[],
  { delimiter }: Notation,
): { metadata: Record<string, string>; title: string } {
  let title = '';
  const entries = lines.slice(0, MOST_FACTS).map(({ text: whole, line }): [string, string] => {
    const text = whole.trim().slice(0, LONGEST_FACT);
    const pair = text.match(/^\s*"?([^:=\t"]{1,60}?)"?\s*[:=\t]\s*(.+)$/);
    if (pair) return [pair[1]!.trim(), pair[2]!.trim().replace(/^"|"$/g, '')];
    const cells = cutLine(text, delimiter).filter((cell) => cell !== '');
    if (delimiter !== ' ' && cells.length > 1) return [cells[0]!, cells.slice(1).join(' ')];
    if (title === '') title = text.trim().replace(/^"|"$/g, '');
    return [`line ${line}`, text.trim()];
  });
  const metadata = Object.fromEntries(entries);
  const named = entries.find(([key]) => /^(title|sample|sample name|name|sample id)$/i.test(key));
  return { metadata, title: named?.[1] ?? title };
}

function statedUnits(metadata: Record<string, string>): { xUnit: XUnit | null; yUnit: YUnit | null } {
  let xUnit: XUnit | null = null;
  let yUnit: YUnit | null = null;
  for (const [key, value] of Object.entries(metadata)) {
    if (/^(x[ _-]?(units?|axis|label)|abscissa)\b/i.test(key)) xUnit ??= xUnitFromText(value);
    if (/^(y[ _-]?(units?|axis|label|mode)|ordinate|(data|photometric|measurement|measuring) mode|mode)\b/i.test(key)) {
      yUnit ??= yUnitFromText(value);
    }
  }
  return { xUnit, yUnit };
}

/** Which columns make the spectra: one abscissa for all, or an abscissa before each ordinate. */
export function pairColumns(
  rows: readonly { values: number[] }[],
  columns: number,
  names: readonly string[],
): [number, number][] {
  const ordinates = Array.from({ length: columns - 1 }, (_, i) => i + 1);
  if (columns >= 4 && columns % 2 === 0) {
    const even = ordinates.filter((column) => column % 2 === 0);
    const isLabelled = even.every((column) => isAbscissaLabel(names[column] ?? '')) && isAbscissaLabel(names[0] ?? '');
    const isSame = even.every((column) =>
      rows.every(
        ({ values }) => values[column] === undefined || Number.isNaN(values[column]) || values[column] === values[0],
      ),
    );
    if (isLabelled || isSame) return [0, ...even].map((column) => [column, column + 1]);
  }
  return ordinates.map((column) => [0, column]);
}
