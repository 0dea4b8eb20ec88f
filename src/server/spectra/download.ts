import { Readable } from 'node:stream';
import type { ReadableStream as WebStream } from 'node:stream/web';
import { eq } from 'drizzle-orm';
import { type SpectrumToWrite, writeJcamp, type XUnit, type YUnit } from '#src/chem/spectra/index.ts';
import { instruments, labs, spectrumSolvents } from '#src/db/schema/index.ts';
import type { SpectrumTake } from '#src/server/access/records.ts';
import { database } from '#src/server/database.ts';
import { cautionsOf } from './cautions.ts';
import { openOriginal } from './original.ts';
import { loadFilePoints } from './stored-points.ts';

/** `Content-Disposition` of a file to keep: an ASCII name for old programs, the real one by RFC 8187. */
export function attachment(fileName: string): string {
  const ascii = fileName.replace(/[^\x20-\x7e]|["\\%]/g, '_');
  const encoded = encodeURIComponent(fileName).replace(
    /['()*]/g,
    (c) => `%${c.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return `attachment; filename="${ascii}"; filename*=UTF-8''${encoded}`;
}

/** The original, byte for byte. Never as a kind that a browser would show. */
export async function originalFile({ spectrum }: SpectrumTake): Promise<Response> {
  const { body, size } = await openOriginal(spectrum.fileSha256);
  return new Response(Readable.toWeb(body) as WebStream<Uint8Array> as ReadableStream<Uint8Array>, {
    headers: {
      'content-type': 'application/octet-stream',
      'content-length': String(size),
      'content-disposition': attachment(spectrum.fileName),
      'x-content-type-options': 'nosniff',
      'repr-digest': `sha-256=:${Buffer.from(spectrum.fileSha256, 'hex').toString('base64')}:`,
      'cache-control': 'private, no-store',
    },
  });
}

/** The spectrum as JCAMP-DX 5.01, written from the decoded points. */
export async function jcampFile(access: SpectrumTake): Promise<Response> {
  const { spectrum } = access;
  const { db } = await database();
  const [points, solvents, [lab], [instrument]] = await Promise.all([
    loadFilePoints(db, spectrum.id),
    db.select().from(spectrumSolvents).where(eq(spectrumSolvents.spectrumId, spectrum.id)),
    db.select({ name: labs.name }).from(labs).where(eq(labs.id, spectrum.labId)),
    db
      .select({ name: instruments.name })
      .from(instruments)
      .where(eq(instruments.id, spectrum.instrumentId ?? '')),
  ]);
  const written = writeJcamp({
    ...described(access),
    x: points.x,
    y: points.y,
    ...(lab ? { origin: lab.name, owner: lab.name } : {}),
    ...(instrument ? { instrument: instrument.name } : {}),
    ...(solvents.length > 0 ? { solvent: solventText(solvents) } : {}),
  });
  const text = withComments(written, cautionLines(await cautionsOf(access, solvents)));
  return new Response(text, {
    headers: {
      'content-type': 'chemical/x-jcamp-dx',
      'content-disposition': attachment(`${spectrum.fileName.replace(/\.[^.]*$/, '')}.jdx`),
      'x-content-type-options': 'nosniff',
      'cache-control': 'private, no-store',
    },
  });
}

function described({ complex, spectrum }: SpectrumTake): Omit<SpectrumToWrite, 'x' | 'y'> {
  const known = <K extends string, V>(name: K, value: V | null) => (value === null ? {} : { [name]: value });
  return {
    title: spectrum.synthetic ? `SYNTHETIC (computed, not measured): ${spectrum.title}` : spectrum.title,
    xUnit: spectrum.xUnit as XUnit,
    yUnit: spectrum.yUnit as YUnit,
    solute: complex.formula,
    sample: `${complex.accession} ${complex.formula}`,
    ...known('measuredAt', spectrum.measuredAt),
    ...known('concentration', spectrum.concentration),
    ...known('pathLength', spectrum.pathLength),
    ...known('temperature', spectrum.temperature),
    ...known('bandwidth', spectrum.bandwidth),
    ...(spectrum.synthetic ? { processing: 'SYNTHETIC: computed from band parameters, not measured' } : {}),
  };
}

const solventText = (solvents: { name: string; volumeFraction: number }[]): string =>
  solvents.length === 1
    ? solvents[0]!.name
    : solvents.map(({ name, volumeFraction }) => `${name} (volume fraction ${volumeFraction})`).join(', ');

function cautionLines(cautions: { detail: string }[]): string[] {
  if (cautions.length === 0) return [];
  return [
    ...cautions.map(({ detail }) => `Caution: ${detail}`),
    'The safety data sheet, local rules and licensed practice decide.',
  ];
}

/** Comments go behind the first two records, which the standard wants at the top. */
function withComments(jcamp: string, comments: string[]): string {
  if (comments.length === 0) return jcamp;
  const at = jcamp.indexOf('##DATA TYPE=');
  const lines = comments.flatMap((comment) => asciiLines(comment)).map((line) => `$$ ${line}\r\n`);
  return `${jcamp.slice(0, at)}${lines.join('')}${jcamp.slice(at)}`;
}

/** Plain ASCII in lines that fit into 80 columns behind the comment sign. */
function asciiLines(text: string): string[] {
  const plain = text
    .normalize('NFKD')
    .replace(/[–—]/g, '-')
    .replace(/[^\x20-\x7e]/g, '');
  return plain.match(/.{1,77}(?:\s|$)|.{77}/g)?.map((line) => line.trim()) ?? [];
}
