import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import Papa from 'papaparse';
import { renderToStaticMarkup } from 'react-dom/server';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { readSpectrumFile } from '#src/chem/spectra/index.ts';
import { writeCsv } from '#src/chem/spectra/write-csv.ts';
import { Banners } from '#src/components/complexes/page/Banners.tsx';
import { HistoryPanel } from '#src/components/complexes/page/HistoryPanel.tsx';
import { MergeSpecimen } from '#src/components/merges/MergeSpecimen.tsx';
import { Formula, Term } from '#src/components/notation/index.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { ProblemError } from '#src/components/ui/problem-error.ts';
import { tableCsv } from '#src/components/ui/table-csv.ts';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import type { MergeTask } from '#src/contracts/merges.ts';
import { call, json, openRegistry } from '../harness.ts';
import { lab, person } from '../people.ts';

// Texts that people type are shown, mailed and written into files, and stay texts there.

const MARKUP = `<img src=x onerror=alert(1)><script>alert(2)</script>"'&`;
const HEADERS = 'A folio\r\nBcc: everybody@evil.example\r\n\r\nbody';

type Person = Awaited<ReturnType<typeof person>>;
let registry: Awaited<ReturnType<typeof openRegistry>>;
let north: string;
let lead: Person;
let steward: Person;
beforeAll(async () => {
  registry = await openRegistry();
  north = await lab(`North ${MARKUP}`);
  lead = await person(`=HYPERLINK("http://evil.example") ${MARKUP}`, { labs: { [north]: 'lead' } });
  steward = await person('Steward', { steward: true });
  await call('GET', '/api/folios', { as: lead.token });
}, 60_000);
afterAll(() => registry.close());

async function mailTo(address: string) {
  const { database } = await import('#src/server/database.ts');
  const { mails } = await import('#src/db/schema/index.ts');
  const { eq } = await import('drizzle-orm');
  const { db } = await database();
  return (await db.select().from(mails).where(eq(mails.to, address)))[0]!;
}

describe('a mail', () => {
  test.each([
    ['markup', MARKUP],
    ['lines of a header', HEADERS],
  ])('holds a name with %s as a text, in one line of its subject', async (_, name) => {
    const body = { name, lab: north, licence: 'CC-BY-4.0', description: MARKUP };
    const { id } = await json<{ id: string }>(call('POST', '/api/folios', { as: lead.token, json: body }), 201);
    const email = `partner-${name.length}@test.example`;
    const invited = { session: lead.id, json: { email, level: 'view' } };
    await json(call('POST', `/api/folios/${id}/invitations`, invited), 201);
    const mail = await mailTo(email);
    // biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what must not be there
    expect(mail.subject).not.toMatch(/[\u0000-\u001f\u007f\u0085\u2028\u2029]/);
    expect(mail.html).not.toMatch(/<(?:img|script)/);
    expect(mail.html.match(/href="[^"]*"/g)!.every((link) => link.startsWith('href="http://localhost:4321/'))).toBe(
      true,
    );
  });
});

describe('a file', () => {
  const upload = async (fileName: string, title: string) => {
    const formula = '[Co(NH3)6]3+';
    const found = await json<{ items: { accession: string }[] }>(
      call('GET', '/api/complexes?metal=Co', { as: lead.token }),
    );
    const complex =
      found.items[0]?.accession ??
      (
        await json<ComplexRecord>(
          call('POST', '/api/complexes', { as: lead.token, json: { formula, geometry: 'OC-6', lab: north } }),
          201,
        )
      ).accession;
    const form = new FormData();
    form.set('file', new File([`nm,absorbance\n400,0.1\n410,0.2\n420,0.1\n# ${fileName}`], fileName));
    form.set('metadata', JSON.stringify({ complex, lab: north, technique: 'solution', title }));
    return json<{ id: string; fileName: string }>(call('POST', '/api/spectra', { as: lead.token, form }), 201);
  };

  test.each([
    'plain.csv',
    'x".csv',
    '"><script>alert(1)</script>.html',
    'page.svg',
    'javascript:alert(1).csv',
    '../../etc/passwd',
    '..\\..\\boot.ini',
    'a;b=c.csv',
    'naïve Ω.csv',
    'turned \u202egpj.csv',
  ])('named %s goes out under a harmless name, as a file to keep', async (fileName) => {
    const { id, fileName: kept } = await upload(fileName, 'a run');
    expect(kept).not.toMatch(/[/\\\u202a-\u202e]/);
    const response = await call('GET', `/api/spectra/${id}/file`, { as: lead.token });
    const { headers } = response;
    expect(headers.get('content-type')).toBe('application/octet-stream');
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(headers.get('content-security-policy')).toMatch(/default-src 'none'.*sandbox/);
    expect(headers.get('content-disposition')).toMatch(
      /^attachment; filename="[^"\\%\r\n]*"; filename\*=UTF-8''[\w.!#$&+^`|~%-]*$/,
    );
    await response.body?.cancel();
  });

  test('of JCAMP-DX holds a title with labels of the format as one title', async () => {
    const title = 'run ##END= ##NPOINTS=0 $$ =1+1';
    const { id } = await upload('labels.csv', title);
    const text = await (await call('GET', `/api/spectra/${id}/jcamp`, { as: lead.token })).text();
    expect(text.match(/^##TITLE=/gm)).toHaveLength(1);
    expect(text.match(/^##END=/gm)).toHaveLength(1);
    const read = readSpectrumFile(new TextEncoder().encode(text));
    expect(read).toHaveLength(1);
    expect(read[0]!.x).toHaveLength(3);
    const lines = { complex: 'unused', title: 'one\r\n##NPOINTS=0\r\n##END=' };
    const two = await upload('lines.csv', lines.title);
    const other = await (await call('GET', `/api/spectra/${two.id}/jcamp`, { as: lead.token })).text();
    expect(other.match(/^##END=/gm)).toHaveLength(1);
    expect(other.match(/^##NPOINTS=/gm)).toHaveLength(1);
  });
});

const FORMULAE = [
  '=1+1',
  '+1+1',
  '-1+cmd|x',
  '@SUM(A1)',
  '\t=1',
  '\r=1',
  '\n=1',
  ' =1',
  '=HYPERLINK("http://evil.example")',
];

describe('a table as CSV', () => {
  /** Cells that a spreadsheet would run. */
  const live = (csv: string): string[] =>
    (Papa.parse<string[]>(csv.trimEnd(), { delimiter: ',' }).data.flat() as string[]).filter(
      (cell) => /^\s*[=+\-@]|^[\t\r\n]/.test(cell) && !/^-?\d+(?:\.\d+)?(?:e[+-]?\d+)?$/.test(cell),
    );

  test.each(FORMULAE)('of the browser holds %j as a text, in heads and cells', (text) => {
    const csv = tableCsv([{ id: 'a', header: text, value: (row: string) => row }], [text]);
    expect(live(csv)).toEqual([]);
    expect(csv).toContain("'");
    expect(live(`${text},x`).length + live(`"${text.replaceAll('"', '""')}",x`).length).toBeGreaterThan(0);
  });

  test.each(FORMULAE)('of a bundle holds %j as a text', async (text) => {
    const { csvOf } = await import('#src/server/bundles/tables.ts');
    const columns = [{ name: 'a', type: 'string' as const, description: '', of: (row: string) => row }];
    expect(live(csvOf(columns, [text]))).toEqual([]);
  });

  test.each(FORMULAE)('of points holds the head %j as a text, and negative numbers as numbers', (text) => {
    const csv = writeCsv({ x: [400, 500], y: [-0.1, 0.2], xUnit: 'nm', yUnit: 'absorbance', yName: text });
    expect(live(csv)).toEqual([]);
    expect(csv).toContain('400,-0.1');
  });

  test('of the trail holds names as texts', async () => {
    const response = await call('GET', '/api/trail/export.csv', { session: steward.id });
    const csv = await response.text();
    expect(response.status).toBe(200);
    expect(csv).toContain('HYPERLINK');
    expect(live(csv)).toEqual([]);
  });
});

describe('a screen', () => {
  const inert = (html: string) => {
    expect(html).toContain('&lt;');
    expect(html).not.toMatch(/<(?:img|script)/);
  };

  test('shows names, notes, reasons and refusals as texts', async () => {
    const formula = '[Cr(NH3)6]3+';
    const register = (as: Person, labId: string, more: object) =>
      call('POST', '/api/complexes', { as: as.token, json: { formula, geometry: 'OC-6', lab: labId, ...more } });
    const south = await lab(`South ${MARKUP}`);
    const other = await person(`Other ${MARKUP}`, { labs: { [south]: 'lead' } });
    await json(register(lead, north, { visibility: 'lab', notes: MARKUP }), 201);
    const twin = await json<ComplexRecord>(register(other, south, { notes: MARKUP }), 201);
    const { items } = await json<{ items: MergeTask[] }>(call('GET', '/api/merge-tasks', { as: steward.token }));
    inert(renderToStaticMarkup(<MergeSpecimen side={items[0]!.first} differs={['lab']} children={null} />));
    const change = {
      as: other.token,
      headers: { 'if-match': '*' },
      json: { state: 'withdrawn', withdrawnReason: MARKUP },
    };
    const withdrawn = await json<ComplexRecord>(call('PATCH', `/api/complexes/${twin.accession}`, change));
    inert(renderToStaticMarkup(<Banners complex={withdrawn} alias={null} />));
    inert(renderToStaticMarkup(<HistoryPanel history={withdrawn.history} />));
    const refusal = new ProblemError(422, MARKUP, `${MARKUP} again`);
    inert(renderToStaticMarkup(<Problem problem={refusal} />));
    inert(renderToStaticMarkup(<Formula formula={MARKUP} />));
    inert(renderToStaticMarkup(<Term term={MARKUP} />));
  });

  test('is made nowhere from a text as markup', () => {
    const folder = join(import.meta.dirname, '../../../src');
    const files = readdirSync(folder, { recursive: true, encoding: 'utf8' }).filter((name) =>
      /\.(?:tsx?|astro)$/.test(name),
    );
    const fromMarkup = /dangerouslySetInnerHTML|set:html|\.(?:inner|outer)HTML\s*=|insertAdjacentHTML|document\.write/;
    expect(files.length).toBeGreaterThan(200);
    expect(files.filter((name) => fromMarkup.test(readFileSync(join(folder, name), 'utf8')))).toEqual([]);
  });
});
