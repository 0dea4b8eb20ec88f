import { createHash } from 'node:crypto';
import { writeCsv, type XUnit, type YUnit } from '#src/chem/spectra/index.ts';
import type { Asker } from '../access/asker.ts';
import { mayTakeSpectrum } from '../access/records.ts';
import { database } from '../database.ts';
import { jcampFile } from '../spectra/download.ts';
import { openOriginal } from '../spectra/original.ts';
import { loadFilePoints } from '../spectra/stored-points.ts';
import { VERSION } from '../version.ts';
import { BagStream } from './bag.ts';
import type { Content } from './content.ts';
import { dataPackage, roCrate } from './metadata.ts';
import { csvPath, jcampPath, originalPath } from './paths.ts';
import { counted, type Facts, licenceText, readmeText } from './readme.ts';
import { csvOf, tablesOf } from './tables.ts';

/** The same content by another release may be laid out otherwise, and is another bundle. */
const SOFTWARE = `Zaffre ${VERSION}`;
/** UUIDv5 namespace of our bundles, drawn once. */
const NAMESPACE = '3f0c7c1e-5f0a-4f0e-9d53-6a1f7d2b8c41';

/** A name-based UUID (RFC 9562 §5.5). */
export function uuidV5(name: string, namespace = NAMESPACE): string {
  const hash = createHash('sha1')
    .update(Buffer.from(namespace.replaceAll('-', ''), 'hex'))
    .update(name)
    .digest();
  hash[6] = (hash[6]! & 0x0f) | 0x50;
  hash[8] = (hash[8]! & 0x3f) | 0x80;
  const hex = hash.toString('hex');
  return `${hex.slice(0, 8)}-${hex.slice(8, 12)}-${hex.slice(12, 16)}-${hex.slice(16, 20)}-${hex.slice(20, 32)}`;
}

/**
 * The bundle of this content, as a stream, and the name it goes by. Name, identifier and dates follow from the content
 * alone, so that the same content gives the same bytes whoever asks and whenever.
 *
 * @param asker - for whom; each spectrum is judged once more when its turn comes
 * @param progress - told 0 … 1 as spectra are written
 */
export function writeBundle(
  asker: Asker,
  content: Content,
  progress: (fraction: number) => void,
): { name: string; bag: BagStream } {
  const tables = tablesOf(content);
  const csv = {
    complexes: csvOf(tables.complexes.columns, tables.complexes.rows),
    spectra: csvOf(tables.spectra.columns, tables.spectra.rows),
    bands: csvOf(tables.bands.columns, tables.bands.rows),
  };
  const facts = factsOf(content, Object.values(csv));
  const name = `zaffre-${facts.identifier.slice(9, 22)}`;
  const bag = new BagStream(name, facts.date);
  bag.add('README.md', readmeText(content, facts));
  bag.add('LICENSE.txt', licenceText(content.licences));
  for (const [table, text] of Object.entries(csv)) bag.add(`${table}.csv`, text);
  bag.add('datapackage.json', dataPackage(tables, content.licences, facts));
  addSpectra(bag, asker, content, progress);
  bag.add('ro-crate-metadata.json', async () => roCrate(content, bag.written, facts));
  bag.finish([
    ['Source-Organization', facts.creators.join('; ')],
    ['External-Description', facts.description],
    ['External-Identifier', facts.identifier],
    ['Bagging-Date', facts.date.slice(0, 10)],
    ['Bag-Software-Agent', SOFTWARE],
  ]);
  return { name, bag };
}

function factsOf(content: Content, tables: string[]): Facts {
  const { folio, complexes, spectra, labs, licences } = content;
  const title = folio?.name ?? `Selection of ${counted(complexes.length, 'complex', 'complexes')}`;
  const description =
    folio?.description ?? 'Transition-metal complexes and their electronic spectra from a Zaffre registry.';
  const dates = [...complexes, ...spectra].map((row) => row.updatedAt);
  const owners = folio ? [folio.labId] : [...new Set([...complexes, ...spectra].map((row) => row.labId))];
  const creators = owners.map((id) => labs.get(id) ?? '').sort();
  const identity = JSON.stringify([SOFTWARE, title, description, creators, licences, ...tables]);
  return {
    title,
    description,
    creators,
    identifier: `urn:uuid:${uuidV5(createHash('sha256').update(identity).digest('hex'))}`,
    date: dates.sort().at(-1) ?? folio?.createdAt ?? '1980-01-01T00:00:00.000Z',
    software: SOFTWARE,
  };
}

function addSpectra(bag: BagStream, asker: Asker, content: Content, progress: (fraction: number) => void): void {
  const accessionOf = new Map(content.complexes.map((complex) => [complex.id, complex.accession]));
  const originals = new Set<string>();
  content.spectra.forEach((spectrum, i) => {
    const accession = accessionOf.get(spectrum.complexId)!;
    const original = originalPath(spectrum);
    if (!originals.has(original)) bag.add(original, async () => (await openOriginal(spectrum.fileSha256)).body);
    originals.add(original);
    bag.add(jcampPath(accession, spectrum), async () =>
      (await jcampFile(await mayTakeSpectrum(asker, spectrum.id))).text(),
    );
    bag.add(csvPath(accession, spectrum), async () => {
      progress((i + 1) / content.spectra.length);
      const { x, y } = await loadFilePoints((await database()).db, spectrum.id);
      return writeCsv({ x, y, xUnit: spectrum.xUnit as XUnit, yUnit: spectrum.yUnit as YUnit });
    });
  });
}
