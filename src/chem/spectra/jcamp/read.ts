import { DomainError } from '../../errors.ts';
import { settleUnits } from '../settle-units.ts';
import { limits, type ReadOptions, type SpectrumBlock, type SpectrumWarning } from '../types.ts';
import { rangeOf, xUnitFromText, yUnitFromText } from '../unit-names.ts';
import { gatherBlocks, isDataRecord, type RecordBlock } from './blocks.ts';
import { numberOf } from './fields.ts';
import { checkStated, type Points, readGridTable } from './grid-table.ts';
import { metadataName } from './labels.ts';
import { readNtuples } from './ntuples.ts';
import { readAssignments, readPairTable } from './pair-table.ts';
import { type JcampRecord, splitRecords, textOf } from './records.ts';

/**
 * Spectra of a JCAMP-DX file, 4.24 to 5.01.
 *
 * @param lines - lines of the file, without their ends
 * @throws {DomainError} see `readSpectrumFile`
 * @see R. S. McDonald, P. A. Wilks, Appl. Spectrosc. 42 (1988) 151; P. Lampen et al., Pure Appl. Chem. 71 (1999) 1549
 */
export function readJcamp(lines: readonly string[], options: ReadOptions): SpectrumBlock[] {
  const warnings: SpectrumWarning[] = [];
  const blocks = gatherBlocks(splitRecords(lines, warnings), warnings).flatMap(readBlock);
  if (blocks.length > limits.blocks) {
    throw new DomainError('too-large', `${blocks.length} spectra in one file; up to ${limits.blocks} are read`, 'file');
  }
  if (blocks.reduce((sum, { points }) => sum + points, 0) > limits.pointsPerFile) {
    throw new DomainError('too-large', `more than ${limits.pointsPerFile} points in one file`, 'file');
  }
  return blocks.map((block, i) =>
    settleUnits(i === 0 ? { ...block, warnings: [...warnings, ...block.warnings] } : block, options),
  );
}

type Body = Pick<SpectrumBlock, 'title' | 'kind' | 'xUnitText' | 'yUnitText' | 'x' | 'y' | 'warnings'> & {
  labels?: string[];
};

function readBlock(block: RecordBlock): SpectrumBlock[] {
  const metadata = metadataOf(block);
  const warnings = block.closed ? [] : [{ code: 'missing-end', detail: 'END is missing; all counts agree' }];
  const tables = block.records.filter(isDataRecord);
  const bodies = tables.some(({ label }) => label === 'NTUPLES')
    ? ntuplesBodies(block)
    : tables.map((table) => tableBody(table, block));
  return bodies.map((body) => ({
    ...body,
    xUnit: xUnitFromText(body.xUnitText),
    yUnit: yUnitFromText(body.yUnitText),
    points: body.x.length,
    metadata,
    warnings: [...warnings, ...body.warnings],
    format: 'jcamp-dx',
  }));
}

function metadataOf(block: RecordBlock): Record<string, string> {
  const entries = [...block.outer, ...block.records]
    .filter((record) => !isDataRecord(record) && record.value.length > 0)
    .map((record) => [metadataName(record), record.value.map(({ text }) => text.trim()).join('\n')] as const);
  return Object.fromEntries(entries);
}

function ntuplesBodies(block: RecordBlock): Body[] {
  const title = textOf(find(block, 'TITLE'));
  return readNtuples(block.records, block.closed).map(({ points, title: page, ...rest }) => ({
    ...rest,
    title: page === '' ? title : `${title}, ${page}`,
    x: points.x,
    y: points.y,
  }));
}

function find(block: RecordBlock, label: string): JcampRecord | undefined {
  return block.records.find((record) => record.label === label);
}

function tableBody(table: JcampRecord, block: RecordBlock): Body {
  if (table.label === 'XYZDATA') {
    throw new DomainError('unsupported', 'XYZDATA is no spectrum of one ordinate', 'file', table.line);
  }
  const warnings: SpectrumWarning[] = [];
  const common = {
    title: textOf(find(block, 'TITLE')),
    xUnitText: textOf(find(block, 'XUNITS')),
    yUnitText: textOf(find(block, 'YUNITS')),
    warnings,
  };
  const { form, lines } = formOf(table);
  if (table.label === 'PEAKASSIGNMENTS') {
    const peaks = readAssignments(lines, form.toUpperCase().startsWith('XY'));
    checkCount(peaks.x.length, table, block);
    const { x, y } = scaled(peaks, block);
    return { ...common, kind: 'peaks', x, y, labels: peaks.labels };
  }
  if (form.includes('++') || (form === '' && table.label === 'XYDATA')) {
    const points = gridPoints(table, lines, block, warnings);
    checkOrdinates(points, block, warnings);
    return { ...common, kind: 'curve', x: points.x, y: points.y };
  }
  const width = form === '' ? 2 : (form.split('..')[0] ?? '').replace(/[^A-Za-z]/g, '').length;
  if (width < 2) throw new DomainError('unreadable', `(${form}) is no form of a table known here`, 'file', table.line);
  const pairs = readPairTable(
    lines,
    {
      width,
      points: numberOf(find(block, 'NPOINTS')),
      firstY: numberOf(find(block, 'FIRSTY')),
      yFactor: numberOf(find(block, 'YFACTOR')),
    },
    warnings,
  );
  checkCount(pairs.x.length, table, block);
  const points = scaled(pairs, block);
  if (table.label === 'PEAKTABLE') return { ...common, kind: 'peaks', ...points };
  checkOrdinates({ ...points, resolution: 0 }, block, warnings);
  warnRepeated(pairs, warnings);
  return { ...common, kind: 'curve', ...points };
}

/** The form of a table, `X++(Y..Y)` without its brackets, and the lines of data behind it. */
function formOf(table: JcampRecord): { form: string; lines: JcampRecord['value'] } {
  const opening = table.value[0];
  const match = opening?.line === table.line ? opening.text.match(/^\s*\(((?:[^()]|\([^()]*\))*)\)\s*(.*)$/) : null;
  if (!opening || !match) return { form: '', lines: table.value };
  const rest = match[2] ?? '';
  const inline = /^[+\-.\d(]/.test(rest) ? [{ text: rest, line: opening.line }] : [];
  return { form: (match[1] ?? '').replace(/\s/g, ''), lines: [...inline, ...table.value.slice(1)] };
}

function gridPoints(
  table: JcampRecord,
  lines: JcampRecord['value'],
  block: RecordBlock,
  warnings: SpectrumWarning[],
): Points {
  const number = (label: string) => numberOf(find(block, label));
  return readGridTable(
    lines,
    {
      firstX: number('FIRSTX'),
      lastX: number('LASTX'),
      deltaX: number('DELTAX'),
      firstY: number('FIRSTY'),
      points: number('NPOINTS'),
      xFactor: number('XFACTOR'),
      yFactor: number('YFACTOR'),
      closed: block.closed,
      line: table.line,
    },
    warnings,
  );
}

function checkOrdinates({ y, resolution }: Points, block: RecordBlock, warnings: SpectrumWarning[]): void {
  const [low, high] = rangeOf(y);
  checkStated('FIRSTY', numberOf(find(block, 'FIRSTY')), y[0] ?? Number.NaN, resolution, warnings);
  checkStated('MAXY', numberOf(find(block, 'MAXY')), high, resolution, warnings);
  checkStated('MINY', numberOf(find(block, 'MINY')), low, resolution, warnings);
}

function checkCount(found: number, table: JcampRecord, block: RecordBlock): void {
  if (found === 0) throw new DomainError('unreadable', 'the table holds no points', 'file', table.line);
  const declared = numberOf(find(block, 'NPOINTS'));
  if (declared === null) {
    if (block.closed) return;
    const message = 'neither NPOINTS nor END is there, so the table may be cut off';
    throw new DomainError('unreadable', message, 'file', table.line);
  }
  if (declared.value === found) return;
  const cut = !block.closed && found < declared.value ? '; the file is cut off, for its END is missing too' : '';
  const message = `NPOINTS is ${declared.value}, but the table has ${found} points${cut}`;
  throw new DomainError('unreadable', message, 'file', declared.line);
}

function scaled({ x, y }: { x: number[]; y: number[] }, block: RecordBlock): { x: number[]; y: number[] } {
  const xFactor = numberOf(find(block, 'XFACTOR'))?.value ?? 1;
  const yFactor = numberOf(find(block, 'YFACTOR'))?.value ?? 1;
  return { x: x.map((value) => value * xFactor), y: y.map((value) => value * yFactor) };
}

function warnRepeated({ x, lines }: { x: number[]; lines: number[] }, warnings: SpectrumWarning[]): void {
  const seen = new Set<number>();
  const again = x.findIndex((value) => seen.has(value) || !seen.add(value));
  if (again < 0) return;
  warnings.push({ code: 'repeated-x', detail: `the abscissa ${x[again]} is met twice`, line: lines[again]! });
}
