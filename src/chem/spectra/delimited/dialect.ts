import { DomainError } from '../../errors.ts';
import type { ReadOptions } from '../types.ts';
import { isStrong, type Notation, readDataLine } from './cells.ts';

/** In the order in which one goes before another that reads as many lines. */
const DELIMITERS = ['\t', ';', ',', '|', ' '] as const;
/** Lines that are tried; headers of instruments stay well below. */
const SAMPLE = 2000;

/**
 * How the numbers of a text are parted and written: the notation under which most lines are data. A comma is a decimal
 * sign only where the numbers make sense in no other way.
 *
 * @throws {DomainError} `unreadable` when no notation finds two lines of two numbers
 */
export function findNotation(lines: readonly string[], options: ReadOptions): Notation {
  const sample = lines.slice(0, SAMPLE);
  let best: Notation | null = null;
  let most = 0;
  for (const notation of candidates(options)) {
    const lines = sample.filter((text, i) => {
      const data = text.trim() === '' ? null : readDataLine(text, i + 1, notation);
      return data !== null && isStrong(data);
    }).length;
    if (lines > most) {
      best = notation;
      most = lines;
    }
  }
  if (best === null || most < 2) {
    const line = lines.findIndex((text) => text.trim() !== '') + 1;
    throw new DomainError(
      'unreadable',
      'no table was found: a spectrum needs two lines or more, each with a wavelength or wavenumber and a value, parted by tab, semicolon, comma, bar or blanks',
      'file',
      Math.max(1, line),
    );
  }
  return best;
}

function candidates({ delimiter, decimalComma }: ReadOptions): Notation[] {
  const delimiters = delimiter === undefined ? DELIMITERS : [delimiter === '\\t' ? '\t' : delimiter || ' '];
  const commas = decimalComma === undefined ? [false, true] : [decimalComma];
  return commas.flatMap((comma) =>
    delimiters.filter((sign) => !(comma && sign === ',')).map((sign) => ({ delimiter: sign, decimalComma: comma })),
  );
}
