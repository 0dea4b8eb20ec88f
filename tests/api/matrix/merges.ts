import { call, json } from '../harness.ts';
import { type Fixture, type MatrixRow, register, statuses } from './fixture.ts';

const any = { 'if-match': '*' };

/** Two records of one complex: North's own, then South's for the programme, and the task that follows. */
async function twins(f: Fixture): Promise<{ hidden: string; open: string; task: string }> {
  const formula = `[${metals[used % metals.length]}${acids[Math.floor(used++ / metals.length)]}(py)5]2+`;
  const hidden = await register(f.people.contributor.token, f.north, { formula, visibility: 'lab' });
  const open = await register(f.people.otherContributor.token, f.south, { formula });
  const { items } = await json<{ items: { id: string; first: { complex: { accession: string } } }[] }>(
    call('GET', '/api/merge-tasks?limit=500', { as: f.people.steward.token }),
  );
  return { hidden, open, task: items.find(({ first }) => first.complex.accession === hidden)!.id };
}
/** Formulae that no other row registers: one a pair. */
const metals = ['Fe', 'Mn', 'Ru', 'Rh', 'Ir', 'Os', 'V', 'Ti', 'Mo', 'W', 'Co', 'Cr'];
const acids = ['F', 'Cl', 'Br', 'I'];
let used = 0;

async function spectrumOn(f: Fixture, visibility: 'programme' | 'lab'): Promise<string> {
  const { spectrum } = await import('../shared-content.ts');
  const { database } = await import('#src/server/database.ts');
  const { complexes } = await import('#src/db/schema/index.ts');
  const { eq } = await import('drizzle-orm');
  const { db } = await database();
  const [row] = await db.select().from(complexes).where(eq(complexes.accession, f.open));
  const owner = { lab: f.north, maker: f.people.contributor.id };
  const title = f.fresh();
  const text = `nm,A\n400,0.1\n410,0.2\n# ${title}\n`; // another file each time: the same one is not moved twice
  return (await spectrum(owner, row!.id, { visibility, title, text })).id;
}

const reason = 'the same ion written in two ways';
let target: Promise<string> | undefined;
const isomer = (f: Fixture) => {
  target ??= register(f.people.lead.token, f.north, { formula: '[Co(OH2)(NH3)5]3+' });
  return target;
};

export const rows: Record<string, MatrixRow> = {
  listMergeTasks: { send: () => ({ path: '/api/merge-tasks' }), expect: statuses({ steward: 200, others: 403 }) },
  settleMergeTask: {
    send: async (f) => ({
      path: `/api/merge-tasks/${(await twins(f)).task}/settle`,
      json: { outcome: 'different', reason: 'other ligands after all' },
    }),
    expect: statuses({ steward: 204, others: 403 }),
  },
  mergeComplex: {
    send: async (f) => {
      const { hidden, open } = await twins(f);
      return { path: `/api/complexes/${hidden}/merge`, json: { into: open, reason }, headers: any };
    },
    expect: statuses({ steward: 200, others: 403 }),
  },
  moveSpectrum: {
    send: async (f) => ({
      path: `/api/spectra/${await spectrumOn(f, 'programme')}/move`,
      json: { complex: await isomer(f), reason: 'the aqua complex was measured' },
      headers: any,
    }),
    expect: statuses({ guests: 403, readToken: 403, contributor: 403, southMembers: 403, others: 200 }),
  },
  'moveSpectrum, lab only': {
    send: async (f) => ({
      path: `/api/spectra/${await spectrumOn(f, 'lab')}/move`,
      json: { complex: await isomer(f), reason: 'the aqua complex was measured' },
      headers: any,
    }),
    expect: statuses({ guests: 403, readToken: 403, contributor: 403, southMembers: 404, others: 200 }),
  },
};
