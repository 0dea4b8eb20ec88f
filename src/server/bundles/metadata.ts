import type { Content } from './content.ts';
import { type Facts, licenceSentence, licenceUrl } from './readme.ts';
import type { Column, tablesOf } from './tables.ts';

const json = (value: unknown) => `${JSON.stringify(value, null, 2)}\n`;

/** Frictionless data package, version 2: the three tables with the meaning of each column. */
export function dataPackage(tables: ReturnType<typeof tablesOf>, licences: readonly string[], facts: Facts): string {
  const resource = (name: string, columns: readonly Pick<Column<never>, 'name' | 'type' | 'description'>[]) => ({
    name,
    path: `${name}.csv`,
    type: 'table',
    format: 'csv',
    mediatype: 'text/csv',
    encoding: 'utf-8',
    schema: { fields: columns.map(({ name, type, description }) => ({ name, type, description })) },
  });
  return json({
    $schema: 'https://datapackage.org/profiles/2.0/datapackage.json',
    name: 'zaffre-bundle',
    id: facts.identifier,
    title: facts.title,
    description: facts.description,
    created: facts.date,
    ...(licences.length > 0 ? { licenses: licences.map((id) => ({ name: id, path: licenceUrl(id) })) } : {}),
    resources: [
      resource('complexes', tables.complexes.columns),
      resource('spectra', tables.spectra.columns),
      resource('bands', tables.bands.columns),
    ],
  });
}

const MEDIA: Record<string, string> = {
  csv: 'text/csv',
  jdx: 'chemical/x-jcamp-dx',
  json: 'application/json',
  md: 'text/markdown',
  txt: 'text/plain',
};

/** RO-Crate 1.2 over the payload files written so far. */
export function roCrate(
  content: Content,
  files: ReadonlyMap<string, { sha256: string; size: number }>,
  facts: Facts,
): string {
  const id = (path: string) => encodeURI(path);
  const licences = content.licences.map((name) => ({
    '@id': licenceUrl(name),
    '@type': 'CreativeWork',
    name,
    description: licenceSentence(name),
  }));
  const noLicence = { '@id': 'LICENSE.txt' };
  const creators = facts.creators.map((name, i) => ({ '@id': `#lab-${i + 1}`, '@type': 'Organization', name }));
  const entities = content.complexes.map((complex) => ({
    '@id': `#${complex.accession}`,
    '@type': 'MolecularEntity',
    identifier: complex.accession,
    name: complex.formula,
    molecularFormula: complex.hill,
    molecularWeight: `${complex.molarMass} g/mol`,
  }));
  const fileEntities = [...files].map(([path, { sha256, size }]) => ({
    '@id': id(path),
    '@type': 'File',
    name: path.split('/').at(-1),
    contentSize: String(size),
    sha256,
    encodingFormat: path.startsWith('originals/')
      ? 'application/octet-stream'
      : (MEDIA[path.split('.').at(-1)!] ?? 'application/octet-stream'),
  }));
  const root = {
    '@id': './',
    '@type': 'Dataset',
    name: facts.title,
    description: facts.description,
    identifier: facts.identifier,
    datePublished: facts.date.slice(0, 10),
    license: licences.length === 0 ? noLicence : licences.map((licence) => ({ '@id': licence['@id'] })),
    author: creators.map((creator) => ({ '@id': creator['@id'] })),
    publisher: creators[0] ? { '@id': creators[0]['@id'] } : undefined,
    about: entities.map((entity) => ({ '@id': entity['@id'] })),
    hasPart: fileEntities.map((file) => ({ '@id': file['@id'] })),
  };
  const descriptor = {
    '@id': 'ro-crate-metadata.json',
    '@type': 'CreativeWork',
    about: { '@id': './' },
    conformsTo: { '@id': 'https://w3id.org/ro/crate/1.2' },
  };
  return json({
    '@context': 'https://w3id.org/ro/crate/1.2/context',
    '@graph': [descriptor, root, ...licences, ...creators, ...entities, ...fileEntities],
  });
}
