import { DomainError } from '../errors.ts';
import { decodeText, splitLines } from './decode-text.ts';
import { readDelimited } from './delimited/read.ts';
import { readJcamp } from './jcamp/read.ts';
import type { ReadOptions, SpectrumBlock } from './types.ts';

/**
 * Spectra of a file in JCAMP-DX (4.24 to 5.01: every ordinate form, linked blocks, NTUPLES pages, peaks) or delimited
 * text of any dialect. Which of the two it is, the content tells, not the name.
 *
 * Points stay in the file's own units and order. What was odd but harmless is a warning; what could make wrong numbers
 * is refused, with the line.
 *
 * @param bytes - the file as it is, up to 50 MB
 * @param options - a person's answers: units, columns, one block of several
 * @returns one block per spectrum, at least one; just the one asked for when `options.block` is given
 * @throws {DomainError} `empty`, `too-large`, `unreadable`, `ambiguous`, `unsupported` or `out-of-range`; `field` is
 *   `file` (with the 1-based line, where there is one) or the option that does not fit
 */
export function readSpectrumFile(bytes: Uint8Array, options: ReadOptions = {}): SpectrumBlock[] {
  const lines = splitLines(decodeText(bytes));
  const blocks = isJcamp(lines) ? readJcamp(lines, options) : readDelimited(lines, options);
  if (options.block === undefined) return blocks;
  const block = blocks[options.block];
  if (block === undefined) {
    throw new DomainError(
      'out-of-range',
      `block ${options.block} was asked for; the file has ${blocks.length}`,
      'block',
    );
  }
  return [block];
}

/** A labelled data record of JCAMP-DX before anything but comments. */
function isJcamp(lines: readonly string[]): boolean {
  const first = lines.find((line) => line.trim() !== '' && !line.trimStart().startsWith('$$'));
  if (first !== undefined && /^\s*##[^=]*=/.test(first)) return true;
  return lines.slice(0, 200).some((line) => /^\s*##\s*(TITLE|JCAMP[-_ ]?DX|XYDATA)\s*=/i.test(line));
}
