import { cautionsFor, NO_RULE_MATCHED, STANDING_SENTENCE } from '#src/chem/cautions/index.ts';
import type { Content } from './content.ts';

export interface Facts {
  title: string;
  description: string;
  /** `urn:uuid:…` */
  identifier: string;
  /** Latest change of what is inside, ISO 8601. */
  date: string;
  /** Whose folio it is, or the labs that measured. */
  creators: string[];
  /** Release of the program that wrote it. */
  software: string;
}

const LICENCES: Record<string, string> = {
  'CC0-1.0': 'The contents are dedicated to the public domain under CC0 1.0 Universal.',
  'CC-BY-4.0':
    'The contents may be used, changed and passed on by anyone who names the source (Creative Commons Attribution 4.0 International).',
  'CC-BY-SA-4.0':
    'The contents may be used, changed and passed on under the same licence by anyone who names the source (Creative Commons Attribution-ShareAlike 4.0 International).',
  'CC-BY-NC-4.0':
    'The contents may be used, changed and passed on for purposes that are not commercial by anyone who names the source (Creative Commons Attribution-NonCommercial 4.0 International).',
  'ODbL-1.0': 'The contents come under the Open Data Commons Open Database License 1.0.',
  'PDDL-1.0':
    'The contents are dedicated to the public domain under the Open Data Commons Public Domain Dedication and License 1.0.',
};

const NO_LICENCE =
  'No licence was chosen for this selection. It is for work within the programme: ask the laboratories named in the tables before passing it on.';

export const licenceSentence = (id: string) => LICENCES[id] ?? `The contents come under ${id}.`;
export const licenceUrl = (id: string) => `https://spdx.org/licenses/${id}`;

/** The licence file: SPDX identifier, what it says in a sentence, where its text stands. */
export function licenceText(licences: readonly string[]): string {
  if (licences.length === 0) return `${NO_LICENCE}\n`;
  const several =
    licences.length > 1 ? 'Each item comes under the licence of the folio that it was shared in:\n\n' : '';
  const parts = licences.map(
    (id) => `SPDX-License-Identifier: ${id}\n${licenceSentence(id)}\nFull text: ${licenceUrl(id)}\n`,
  );
  return several + parts.join('\n');
}

/** How to name the source; after the DataCite form: creator (year): title. publisher. type. identifier. */
export const citation = ({ creators, date, title, identifier }: Facts) =>
  `${creators.join('; ')} (${date.slice(0, 4)}): ${title}. Zaffre registry. Dataset. ${identifier}`;

/** "1 spectrum", "2 spectra". */
export const counted = (n: number, one: string, more: string) => `${n} ${n === 1 ? one : more}`;

/** Text of people in a Markdown line: nothing in it becomes a link, a picture or markup. */
const plain = (text: string) => text.replace(/\s+/g, ' ').replace(/[\\`*_{}[\]<>#|!]/g, '\\$&');

/** The page for a human. */
export function readmeText(content: Content, facts: Facts): string {
  const { complexes, spectra, bands, licences } = content;
  const synthetic = spectra.filter((spectrum) => spectrum.synthetic);
  const lines = [
    `# ${plain(facts.title)}`,
    '',
    plain(facts.description),
    '',
    `${counted(complexes.length, 'complex', 'complexes')}, ${counted(spectra.length, 'spectrum', 'spectra')}, ${counted(bands.length, 'band', 'bands')}. State of ${facts.date.slice(0, 10)}, written by ${facts.software}.`,
    '',
    ...(synthetic.length > 0
      ? [
          `**SYNTHETIC: ${synthetic.length} of the ${spectra.length} spectra were computed from band parameters and not measured.** They have \`true\` in the column \`synthetic\` of \`spectra.csv\`, and their JCAMP-DX files say so in the title.`,
          '',
        ]
      : []),
    '## What is inside',
    '',
    '- `complexes.csv`, `spectra.csv`, `bands.csv`: the tables. Units stand in the names of the columns; `datapackage.json` describes each.',
    '- `spectra/<accession>/<id>.jdx` and `.csv`: each spectrum as JCAMP-DX 5.01 and as CSV, in the units of its original.',
    '- `originals/`: the files as they came from the instrument, byte for byte.',
    '- `ro-crate-metadata.json`: the same for machines (RO-Crate 1.2).',
    '- `LICENSE.txt`: what may be done with it.',
    '',
    'Molar absorption coefficients are decadic and per mole of the coordination entity. Uncertainties are standard uncertainties (k = 1). An empty cell is a value that is not known or a gap in the curve.',
    '',
    'In CSV files, a text that begins with `=`, `+`, `-`, `@` or a tab has an apostrophe before it, so that no spreadsheet runs it as a formula. Take it off when you read the files by program. Numbers are as they are, and the originals are untouched.',
    '',
    '## How to check it',
    '',
    'This is a BagIt bag (RFC 8493). In the folder that holds `bagit.txt`:',
    '',
    '    sha256sum -c manifest-sha256.txt',
    '    sha512sum -c manifest-sha512.txt',
    '    sha256sum -c tagmanifest-sha256.txt',
    '',
    'The sums tell damage in transport, not a change made on purpose.',
    '',
    '## How to cite it',
    '',
    plain(citation(facts)),
    '',
    '## Licence',
    '',
    ...(licences.length === 0 ? [NO_LICENCE] : licences.map((id) => `${id}: ${licenceSentence(id)}`)),
    '',
    '## Cautions',
    '',
    `${STANDING_SENTENCE} The safety data sheet, local rules and licensed practice decide.`,
    '',
    ...cautionLines(content),
  ];
  return `${lines.join('\n')}\n`;
}

/** The usual cautions, each with the complexes it is for. */
function cautionLines(content: Content): string[] {
  const found = new Map<string, { detail: string; accessions: Set<string> }>();
  for (const complex of content.complexes) {
    for (const caution of cautionsOfComplex(content, complex)) {
      const entry = found.get(caution.id) ?? { detail: caution.detail, accessions: new Set<string>() };
      entry.accessions.add(complex.accession);
      found.set(caution.id, entry);
    }
  }
  if (found.size === 0) return [NO_RULE_MATCHED];
  return [...found.values()].map(({ detail, accessions }) => `- ${plain(detail)} (${[...accessions].join(', ')})`);
}

function cautionsOfComplex(content: Content, complex: Content['complexes'][number]) {
  const mine = <T extends { complexId: string }>(rows: T[]) => rows.filter((row) => row.complexId === complex.id);
  const base = {
    composition: complex.composition,
    ligands: mine(content.ligands),
    metals: mine(content.centres),
    counterIons: mine(content.preparations).flatMap(({ counterIons }) => counterIons.map((ion) => ion.formula)),
  };
  const known = <K extends string, V>(name: K, value: V | null) => (value === null ? {} : { [name]: value });
  const measured = mine(content.spectra).flatMap((spectrum) =>
    cautionsFor({
      ...base,
      solvent: content.solvents.filter((s) => s.spectrumId === spectrum.id).map((s) => s.name),
      technique: spectrum.technique,
      ...known('temperature', spectrum.temperature),
      ...known('electrolyte', spectrum.electrolyte),
    }),
  );
  return [...cautionsFor(base), ...measured];
}
