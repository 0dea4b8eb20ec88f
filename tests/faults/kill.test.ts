import { createHash } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { openRegistry } from '../api/harness.ts';
import { lab, person } from '../api/people.ts';
import { type RunningServer, startServer } from './server.ts';

// The program is killed (SIGKILL) while uploads and registrations run, and started again on the same folder. What was
// acknowledged must be there whole; of what was not, nothing or all.

const ROUNDS = process.env.ZAFFRE_LONG === '1' ? 12 : 3;

let folder: string;
let labId: string;
let token: string;
let server: RunningServer;

beforeAll(async () => {
  const registry = await openRegistry(mkdtempSync(join(tmpdir(), 'zaffre-kill-')));
  folder = registry.folder;
  labId = await lab('North Quay');
  token = (await person('contributor', { labs: { [labId]: 'lead' } })).token;
  await registry.close({ keep: true });
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

interface Acknowledged {
  complexes: string[];
  spectra: { id: string; sha256: string }[];
}

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');
const headers = () => ({ authorization: `Bearer ${token}` });

function* formulas(): Generator<string> {
  for (const metal of ['Co', 'Cr', 'Rh', 'Ir', 'Fe', 'Ru'])
    for (const ligand of ['NH3', 'H2O', 'py', 'MeCN'])
      for (const halide of ['Cl', 'Br', 'I', 'F', 'CN', 'NCS', 'N3', 'OH']) yield `[${metal}(${halide})(${ligand})5]2+`;
}

async function register(origin: string, formula: string): Promise<string | null> {
  const answer = await fetch(`${origin}/api/complexes`, {
    method: 'POST',
    headers: { ...headers(), 'content-type': 'application/json' },
    body: JSON.stringify({ formula, lab: labId, geometry: 'OC-6' }),
  });
  return answer.status === 201 ? ((await answer.json()) as { accession: string }).accession : null;
}

/** A file of some 12 000 points, different for each number. */
const spectrumFile = (n: number) =>
  new TextEncoder().encode(
    `Wavelength (nm),Absorbance\n${Array.from({ length: 12_000 }, (_, i) => `${200 + i / 16},${((i * 7 + n) % 991) / 1000}`).join('\n')}\n`,
  );

async function upload(origin: string, complex: string, n: number): Promise<{ id: string; sha256: string } | null> {
  const bytes = spectrumFile(n);
  const form = new FormData();
  form.set(
    'metadata',
    JSON.stringify({ complex, technique: 'solution', solvent: 'water', concentration: 0.001, pathLength: 1 }),
  );
  form.set('file', new Blob([bytes]), `run ${n}.csv`);
  const answer = await fetch(`${origin}/api/spectra`, { method: 'POST', headers: headers(), body: form });
  return answer.status === 201 ? { id: ((await answer.json()) as { id: string }).id, sha256: sha256(bytes) } : null;
}

/** Keep registering and uploading until the server is gone; note what it acknowledged. */
async function work(
  { origin }: RunningServer,
  acknowledged: Acknowledged,
  names: Generator<string>,
  first: string,
  round: number,
): Promise<void> {
  const registering = (async () => {
    for (const formula of names) {
      const accession = await register(origin, formula);
      if (accession) acknowledged.complexes.push(accession);
    }
  })();
  const uploading = (async () => {
    for (let n = 0; ; n++) {
      const made = await upload(origin, first, round * 1000 + n);
      if (made) acknowledged.spectra.push(made);
    }
  })();
  await Promise.allSettled([registering, uploading]);
}

/** Rows that would tell of a half-written record. */
async function halfRecords(): Promise<number> {
  const { openDatabase } = await import('#src/db/client.ts');
  const { db, close } = await openDatabase(`file:${join(folder, 'zaffre.db')}`);
  const [row] = await db.all<{ half: number }>(sql`select
    (select count(*) from complex where id not in (select complex_id from centre))
    + (select count(*) from complex where id not in (select complex_id from complex_ligand))
    + (select count(*) from complex where id not in (select subject_id from trail where action = 'register'))
    + (select count(*) from spectrum where id not in (select spectrum_id from spectrum_points))
    + (select count(*) from spectrum where id not in (select spectrum_id from spectrum_species))
    + (select count(*) from spectrum where id not in (select subject_id from trail where action = 'upload')) as half`);
  close();
  return row!.half;
}

async function allUploads(origin: string): Promise<string[]> {
  const answer = await fetch(`${origin}/api/spectra?limit=500`, { headers: headers() });
  return ((await answer.json()) as { items: { id: string }[] }).items.map(({ id }) => id);
}

test(`killed ${ROUNDS} times while it writes, it loses nothing acknowledged and leaves nothing half`, async () => {
  const acknowledged: Acknowledged = { complexes: [], spectra: [] };
  const names = formulas();
  server = await startServer(folder);
  const first = await register(server.origin, '[Ni(NH3)6]2+');
  expect(first).not.toBeNull();
  acknowledged.complexes.push(first!);

  for (let round = 0; round < ROUNDS; round++) {
    const before = acknowledged.spectra.length;
    const working = work(server, acknowledged, names, first!, round);
    while (acknowledged.spectra.length === before) await wait(20);
    // At another moment of the writing each round.
    await wait(40 + ((round * 137) % 400));
    await server.kill();
    await working;
    expect(await halfRecords()).toBe(0);
    server = await startServer(folder);

    for (const accession of acknowledged.complexes) {
      const answer = await fetch(`${server.origin}/api/complexes/${accession}`, { headers: headers() });
      expect(answer.status, accession).toBe(200);
    }
    // Not only the acknowledged ones: whatever has a record has its file.
    const known = new Map(acknowledged.spectra.map(({ id, sha256: hash }) => [id, hash]));
    const stored = await allUploads(server.origin);
    expect(stored).toEqual(expect.arrayContaining([...known.keys()]));
    for (const id of stored) {
      const file = await fetch(`${server.origin}/api/spectra/${id}/file`, { headers: headers() });
      const hash = sha256(new Uint8Array(await file.arrayBuffer()));
      const record = (await (await fetch(`${server.origin}/api/spectra/${id}`, { headers: headers() })).json()) as {
        sha256: string;
      };
      expect(hash).toBe(record.sha256);
      if (known.has(id)) expect(hash).toBe(known.get(id));
    }
  }
  await server.kill();
  expect(acknowledged.complexes.length).toBeGreaterThan(ROUNDS);
});
