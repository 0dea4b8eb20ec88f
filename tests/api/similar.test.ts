import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { complex, spectrum } from './shared-content.ts';

let close: () => Promise<void>;
let north: string;
let member: { id: string; token: string };
let stranger: { token: string };
let mine: { id: string };
let like: { id: string };
let hidden: { id: string };

beforeAll(async () => {
  ({ close } = await openRegistry());
  north = await lab('North');
  const south = await lab('South');
  member = await person('a member', { labs: { [north]: 'contributor' } });
  stranger = await person('a member elsewhere', { labs: { [south]: 'contributor' } });
  const owner = { lab: north, maker: member.id };
  const [first, second] = [await complex(owner, 1), await complex(owner, 2)];
  mine = await spectrum(owner, first.id, { points: 40 });
  like = await spectrum(owner, second.id, { points: 60, fileName: 'another.csv', text: 'another' });
  hidden = await spectrum(owner, second.id, { points: 50, fileName: 'own.csv', text: 'own', visibility: 'lab' });
});
afterAll(() => close());

describe('similar spectra', () => {
  interface Similar {
    items: { spectrum: { id: string }; cosine: number; angle: number; from: number; to: number }[];
    compared: number;
  }
  const similar = (token: string) => json<Similar>(call('GET', `/api/spectra/${mine.id}/similar`, { as: token }));

  test('are those in sight, most alike first, never the spectrum itself', async () => {
    const { items, compared } = await similar(member.token);
    expect(items.map((item) => item.spectrum.id).sort()).toEqual([like.id, hidden.id].sort());
    expect(compared).toBe(2);
    for (const { cosine, angle, from, to } of items) {
      expect(cosine).toBeGreaterThan(0.9);
      expect(Math.cos((angle * Math.PI) / 180)).toBeCloseTo(cosine, 10);
      expect(to).toBeGreaterThan(from);
    }
    const cosines = items.map(({ cosine }) => cosine);
    expect(cosines).toEqual([...cosines].sort((a, b) => b - a));
  });

  test('are neither listed nor counted where they are out of sight', async () => {
    const { items, compared } = await similar(stranger.token);
    expect(items.map((item) => item.spectrum.id)).toEqual([like.id]);
    expect(compared).toBe(1);
  });
});

describe('the filter by a fragment of a ligand', () => {
  const list = (smiles: string, token = member.token) =>
    call('GET', `/api/complexes?facets=1&substructure=${encodeURIComponent(smiles)}`, { as: token });
  interface Page {
    items: { formula: string }[];
    total: number;
  }

  beforeAll(async () => {
    for (const [formula, visibility] of [
      ['[Ru(bpy)3]2+', 'programme'],
      ['[Fe(phen)3]2+', 'lab'],
      ['[Co(en)3]3+', 'programme'],
    ])
      await json(
        call('POST', '/api/complexes', {
          as: member.token,
          json: { formula, lab: north, geometry: 'OC-6', visibility },
        }),
        201,
      );
  });

  test('finds complexes by what their ligands hold, however the SMILES is written', async () => {
    for (const pyridine of ['c1ccncc1', 'n1ccccc1', 'C1=CC=NC=C1']) {
      const { items, total } = await json<Page>(list(pyridine));
      expect(items.map(({ formula }) => formula).sort()).toEqual(['[Fe(phen)3]2+', '[Ru(bpy)3]2+']);
      expect(total).toBe(2);
    }
    expect((await json<Page>(list('NCCN'))).items.map(({ formula }) => formula)).toContain('[Co(en)3]3+');
    expect((await json<Page>(list('[Si]'))).total).toBe(0);
  });

  test('counts only what is in sight', async () => {
    const { items, total } = await json<Page>(list('c1ccncc1', stranger.token));
    expect(items.map(({ formula }) => formula)).toEqual(['[Ru(bpy)3]2+']);
    expect(total).toBe(1);
  });

  test.each(['C(', 'not a molecule', '<svg onload=alert(1)>'])('refuses %s', async (text) => {
    const { errors } = await json<{ errors: { pointer: string }[] }>(list(text), 400);
    expect(errors[0]!.pointer).toBe('#/substructure');
  });
});
