import { DomainError } from '../../errors.ts';
import { limits, type SpectrumWarning } from '../types.ts';
import { type JcampRecord, textOf } from './records.ts';

/** Records of one block between TITLE and END. */
export interface RecordBlock {
  records: JcampRecord[];
  /** Records of the linked block round it, which hold for it too. */
  outer: JcampRecord[];
  closed: boolean;
  line: number;
}

const DATA_LABELS = new Set(['XYDATA', 'XYPOINTS', 'PEAKTABLE', 'PEAKASSIGNMENTS', 'NTUPLES', 'DATATABLE', 'XYZDATA']);

/** Whether a record opens a table of data. */
export function isDataRecord({ label }: JcampRecord): boolean {
  return DATA_LABELS.has(label);
}

/** Blocks that hold nothing, and blocks that link others, are borne to this number. */
const MOST_TITLES = 4 * limits.blocks;

interface OpenBlock extends RecordBlock {
  isLink: boolean;
  inner: number;
}

/**
 * Blocks that hold data, in the order of the file: single, linked (one level inside another or more), or one after
 * the other without any link.
 *
 * @throws {DomainError} `unreadable` when there are none, or when a linked file ends before all its blocks came;
 *   `too-large` above 64
 */
export function gatherBlocks(records: readonly JcampRecord[], warnings: SpectrumWarning[]): RecordBlock[] {
  const found: RecordBlock[] = [];
  const open: OpenBlock[] = [];

  const close = (closed: boolean): void => {
    const block = open.pop();
    if (block === undefined) return;
    block.closed = closed;
    if (block.isLink) checkLink(block, warnings);
    const hasData = block.records.some(isDataRecord);
    const outer = open.at(-1);
    if (outer && (hasData || block.isLink)) outer.inner++;
    if (!hasData) return;
    found.push(block);
    if (found.length > limits.blocks) {
      throw new DomainError('too-large', `more than ${limits.blocks} blocks in one file`, 'file', block.line);
    }
  };

  let titles = 0;
  for (const record of records) {
    const top = open.at(-1);
    if (record.label === 'TITLE' && ++titles > MOST_TITLES) {
      throw new DomainError('too-large', `more than ${MOST_TITLES} blocks, with or without data`, 'file', record.line);
    }
    if (record.label === 'TITLE') {
      if (top && !top.isLink) close(false);
      open.push(emptyBlock(record, open));
      open.at(-1)!.records.push(record);
    } else if (record.label === 'END') {
      close(true);
    } else if (top === undefined) {
      warnings.push({ code: 'title-not-first', detail: 'a block opens without its TITLE', line: record.line });
      open.push(emptyBlock(record, open));
      open.at(-1)!.records.push(record);
    } else {
      top.records.push(record);
      if (record.label === 'BLOCKS' || (record.label === 'DATATYPE' && /^link/i.test(textOf(record))))
        top.isLink = true;
    }
  }
  while (open.length > 0) close(false);
  if (found.length === 0) {
    throw new DomainError('unreadable', 'the file has JCAMP-DX records, but no table of data', 'file', 1);
  }
  return found.sort((a, b) => a.line - b.line);
}

function emptyBlock(record: JcampRecord, open: readonly OpenBlock[]): OpenBlock {
  const outer = open.filter((block) => block.isLink).flatMap((block) => block.records);
  return { records: [], outer, closed: false, line: record.line, isLink: false, inner: 0 };
}

function checkLink(block: OpenBlock, warnings: SpectrumWarning[]): void {
  const record = block.records.find(({ label }) => label === 'BLOCKS');
  const declared = Number.parseInt(textOf(record), 10);
  if (record === undefined || Number.isNaN(declared)) return;
  // Some writers count the linking block itself.
  if (declared === block.inner || declared === block.inner + 1) return;
  const detail = `BLOCKS is ${declared}, but ${block.inner} blocks were found`;
  if (!block.closed && block.inner < declared) {
    throw new DomainError('unreadable', `${detail}; the file is cut off`, 'file', record.line);
  }
  warnings.push({ code: 'block-count', detail, line: record.line });
}
