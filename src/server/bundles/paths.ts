import { toAscii } from '#src/chem/spectra/ascii.ts';
import type { spectra } from '#src/db/schema/index.ts';

type Spectrum = Pick<typeof spectra.$inferSelect, 'id' | 'fileSha256' | 'fileName'>;

/** Names that some systems keep for devices, with any ending. */
const RESERVED = /^(con|prn|aux|nul|com\d|lpt\d)(\.|$)/i;

/**
 * A file name that every system takes and none takes for a path or an option: ASCII letters, digits, full stop, hyphen
 * and underscore, at most 80 characters, the ending kept.
 */
export function safeName(name: string): string {
  const plain = toAscii(name)
    .replace(/[^A-Za-z0-9._-]+/g, '_')
    .replace(/^[._-]+|[._-]+$/g, '');
  const ending = /\.[A-Za-z0-9]{1,8}$/.exec(plain)?.[0] ?? '';
  const stem = plain.slice(0, plain.length - ending.length).slice(0, 80 - ending.length) || 'file';
  return RESERVED.test(stem) ? `_${stem}${ending}` : stem + ending;
}

/** Paths below `data/`. One original may hold several spectra, so that it has a place of its own. */
export const originalPath = ({ fileSha256, fileName }: Spectrum) =>
  `originals/${fileSha256.slice(0, 16)}/${safeName(fileName)}`;
export const jcampPath = (accession: string, { id }: Spectrum) => `spectra/${accession}/${id}.jdx`;
export const csvPath = (accession: string, { id }: Spectrum) => `spectra/${accession}/${id}.csv`;

/** Where the tries at a bundle lie in the store; each try has a place of its own, so that none can spoil another. */
export const bundleFolder = (id: string) => `bundles/${id}/`;
export const archiveKey = (storeKey: string) => `${storeKey}.zip`;
/** The list of what is in it. */
export const heldKey = (storeKey: string) => `${storeKey}.json`;
