import { DomainError } from '../../../../src/chem/errors.ts';
import { type ReadOptions, readSpectrumFile, type SpectrumBlock } from '../../../../src/chem/spectra/index.ts';

/** Spectra of a text, as a UTF-8 file. */
export function readText(text: string, options?: ReadOptions): SpectrumBlock[] {
  return readSpectrumFile(new TextEncoder().encode(text), options);
}

/** The refusal of a text; fails where it is read. */
export function refusal(text: string, options?: ReadOptions): DomainError {
  try {
    readText(text, options);
  } catch (error) {
    if (error instanceof DomainError) return error;
    throw error;
  }
  throw new Error('the file was read');
}

/** Codes of a block's warnings. */
export function codes(block: SpectrumBlock | undefined): string[] {
  return (block?.warnings ?? []).map(({ code }) => code);
}

/** A JCAMP-DX block round a table; records may be replaced, or left out with null. */
export function jcamp(
  table: string,
  changes: Record<string, string | null> = {},
  form = 'XYDATA= (X++(Y..Y))',
): string {
  const records: Record<string, string | null> = {
    TITLE: 'worked example',
    'JCAMP-DX': '5.01',
    'DATA TYPE': 'UV/VIS SPECTRUM',
    ORIGIN: 'invented',
    OWNER: 'public domain',
    XUNITS: 'NANOMETERS',
    YUNITS: 'ABSORBANCE',
    XFACTOR: '1',
    YFACTOR: '1',
    FIRSTX: '400',
    LASTX: '435',
    NPOINTS: '8',
    FIRSTY: '50',
    ...changes,
  };
  const head = Object.entries(records).flatMap(([label, value]) => (value === null ? [] : [`##${label}= ${value}`]));
  const end = changes.END === null ? [] : ['##END='];
  return `${[...head.filter((line) => !line.startsWith('##END=')), `##${form}`, table, ...end].join('\n')}\n`;
}
