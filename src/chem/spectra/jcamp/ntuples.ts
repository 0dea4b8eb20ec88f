import { DomainError } from '../../errors.ts';
import type { SpectrumWarning } from '../types.ts';
import { numberOf, type StatedNumber } from './fields.ts';
import { type Points, readGridTable, statedNumber } from './grid-table.ts';
import { readPairTable } from './pair-table.ts';
import { type JcampRecord, textOf } from './records.ts';

/** One page of an NTUPLES block. */
export interface Page {
  title: string;
  kind: 'curve' | 'peaks';
  points: Points;
  xUnitText: string;
  yUnitText: string;
  warnings: SpectrumWarning[];
}

interface Variable {
  symbol: string;
  unit: string;
  first: number | null;
  last: number | null;
  factor: number | null;
  dimension: number | null;
}

/**
 * Pages of an NTUPLES block (JCAMP-DX 5.00, Davies & Lampen 1993).
 *
 * @param records - all records of the block
 * @throws {DomainError} `unreadable` when a table's variables are not declared, `unsupported` for contours
 */
export function readNtuples(records: readonly JcampRecord[], closed: boolean): Page[] {
  const start = records.findIndex(({ label }) => label === 'NTUPLES');
  const inside = records.slice(start + 1);
  const firstPage = inside.findIndex(({ label }) => label === 'PAGE' || label === 'DATATABLE');
  const head = inside.slice(0, firstPage < 0 ? inside.length : firstPage);
  const pages: Page[] = [];
  let page: JcampRecord[] = [];
  for (const record of inside.slice(head.length)) {
    if (record.label === 'PAGE') page = [];
    page.push(record);
    if (record.label !== 'DATATABLE') continue;
    pages.push(readPage(record, page, head, closed));
    page = page.filter(({ label }) => label === 'PAGE');
  }
  if (pages.length === 0) throw unreadable('NTUPLES without a DATA TABLE', records[start]!.line);
  return pages;
}

function readPage(
  table: JcampRecord,
  page: readonly JcampRecord[],
  head: readonly JcampRecord[],
  closed: boolean,
): Page {
  const warnings: SpectrumWarning[] = [];
  const opening = table.value[0]?.text ?? '';
  const form = opening.match(/^\s*\(([^()]*(?:\([^()]*\))?[^()]*)\)\s*(?:,\s*([A-Z ]+))?/i);
  if (!form) throw unreadable(`DATA TABLE must state its form; "${opening.slice(0, 30)}" is none`, table.line);
  if (/contour/i.test(form[2] ?? '')) {
    throw new DomainError('unsupported', 'contours are no spectrum', 'file', table.line);
  }
  const variables = variablesOf(head, page);
  const isGrid = (form[1] ?? '').includes('++');
  const symbols = symbolsOf(form[1] ?? '', variables);
  const x = symbols[0];
  const y = symbols[1];
  if (x === undefined || y === undefined) {
    throw unreadable(`the form (${form[1]}) names variables that SYMBOL does not declare`, table.line);
  }
  const title = textOf(page.find(({ label }) => label === 'PAGE'));
  const kind = /peak/i.test(form[2] ?? '') ? 'peaks' : 'curve';
  const lines = table.value.slice(1);
  const stated = (value: number | null): StatedNumber | null =>
    value === null ? null : statedNumber(value, table.line);
  const count = numberOf(page.find(({ label }) => label === 'NPOINTS')) ?? stated(y.dimension ?? x.dimension);
  const units = { xUnitText: x.unit, yUnitText: y.unit };
  if (isGrid) {
    const points = readGridTable(
      lines,
      {
        firstX: stated(x.first),
        lastX: stated(x.last),
        deltaX: null,
        firstY: null,
        points: count,
        xFactor: stated(x.factor ?? 1),
        yFactor: stated(y.factor ?? 1),
        closed,
        line: table.line,
      },
      warnings,
    );
    return { title, kind, points, ...units, warnings };
  }
  const pairs = readPairTable(lines, { width: symbols.length, points: count, firstY: null, yFactor: null }, warnings);
  if (count !== null && count.value !== pairs.x.length) {
    throw unreadable(`NPOINTS is ${count.value}, but the table has ${pairs.x.length} points`, count.line);
  }
  const points = {
    x: pairs.x.map((value) => value * (x.factor ?? 1)),
    y: pairs.y.map((value) => value * (y.factor ?? 1)),
    resolution: 0,
  };
  return { title, kind, points, ...units, warnings };
}

/** Variables by the parallel lists of the head; a list given again inside a page goes before. */
function variablesOf(head: readonly JcampRecord[], page: readonly JcampRecord[]): Variable[] {
  const list = (label: string): string[] => {
    const records = [...page, ...head].filter((record) => record.label === label);
    const [inPage, inHead] = records.map((record) =>
      textOf(record)
        .split(',')
        .map((item) => item.trim()),
    );
    const result = inHead ?? inPage ?? [];
    return inHead && inPage ? result.map((item, i) => inPage[i] || item) : result;
  };
  const number = (text: string | undefined): number | null => {
    const value = text === undefined || text === '' ? Number.NaN : Number(text);
    return Number.isFinite(value) ? value : null;
  };
  const [units, first, last, factor, dimension] = ['UNITS', 'FIRST', 'LAST', 'FACTOR', 'VARDIM'].map(list);
  return list('SYMBOL').map((symbol, i) => ({
    symbol,
    unit: units?.[i] ?? '',
    first: number(first?.[i]),
    last: number(last?.[i]),
    factor: number(factor?.[i]),
    dimension: number(dimension?.[i]),
  }));
}

/** Variables in the order of a form such as `X++(R..R)` or `XR..XR`. */
function symbolsOf(form: string, variables: readonly Variable[]): Variable[] {
  const opening = (form.split('..')[0] ?? '').replace(/[\s+(]/g, '');
  const found: Variable[] = [];
  let rest = opening;
  while (rest !== '') {
    const variable = variables
      .filter(({ symbol }) => symbol !== '' && rest.toUpperCase().startsWith(symbol.toUpperCase()))
      .sort((a, b) => b.symbol.length - a.symbol.length)[0];
    if (variable === undefined) return [];
    found.push(variable);
    rest = rest.slice(variable.symbol.length);
  }
  return found;
}

function unreadable(message: string, line: number): DomainError {
  return new DomainError('unreadable', message, 'file', line);
}
