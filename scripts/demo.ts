import { pathToFileURL } from 'node:url';
import { grants } from '#src/db/schema/index.ts';
import { registerComplex } from '#src/server/complexes/register.ts';
import { closeDatabase, database } from '#src/server/database.ts';
import { DEMO_ACCOUNTS } from '#src/server/demo-accounts.ts';
import { createFolio } from '#src/server/folios/change.ts';
import { newId, nowIso } from '#src/server/ids.ts';
import { cobaltToZinc } from './demo/cobalt-to-zinc.ts';
import { heavierMetals } from './demo/heavier-metals.ts';
import { loadComplex } from './demo/load-complex.ts';
import { type DemoPeople, loadPeople } from './demo/load-people.ts';
import { titaniumToIron } from './demo/titanium-to-iron.ts';
import { readOptions, run } from './lib/command.ts';

/** A folio of one lab, and the guest who reads it. */
async function shareFolio(
  people: DemoPeople,
  {
    lead,
    lab,
    name,
    description,
    accessions,
    shows,
    level,
  }: {
    lead: string;
    lab: keyof DemoPeople['labId'];
    name: string;
    description: string;
    accessions: string[];
    shows: 'attested' | 'proposed';
    level: 'view' | 'download' | null;
  },
): Promise<void> {
  const maker = await people.asker(lead);
  const items = accessions.map((accession) => ({ accession, spectra: 'all' as const }));
  const folio = await createFolio(maker, {
    name,
    description,
    lab: people.labId[lab],
    licence: 'CC-BY-4.0',
    shows,
    items,
  });
  if (!level) return;
  const guest = await people.asker(DEMO_ACCOUNTS[3].email);
  const createdAt = nowIso();
  const expiresAt = new Date(Date.now() + 365 * 24 * 3600 * 1000).toISOString();
  const { write } = await database();
  await write((tx) =>
    tx.insert(grants).values({
      id: newId(),
      folioId: folio.id,
      accountId: guest.accountId,
      level,
      expiresAt,
      grantedBy: maker.accountId,
      termsAcceptedAt: createdAt,
      createdAt,
    }),
  );
}

/**
 * Fill an empty registry with the invented Tidewater programme: four labs, about sixty well-known complexes with
 * synthetic spectra, two folios and a guest. Everything goes through the services that the screens use.
 */
export async function loadDemo(): Promise<void> {
  const people = await loadPeople();
  const accession = new Map<string, string>();
  for (const demo of [...titaniumToIron, ...cobaltToZinc, ...heavierMetals])
    accession.set(demo.formula, await loadComplex(demo, people));
  const pick = (...formulas: string[]) => formulas.map((formula) => accession.get(formula)!);

  const contributor = await people.asker(DEMO_ACCOUNTS[2].email);
  await registerComplex(contributor, {
    formula: '[Cr(NCS)(NH3)5]2+',
    geometry: 'OC-6',
    lab: people.labId.quay,
    state: 'draft',
    notes: 'Waiting for the sulfur analysis: κN or κS? Invented for the demo.',
  });

  await shareFolio(people, {
    lead: DEMO_ACCOUNTS[1].email,
    lab: 'quay',
    name: 'Blues and violets for glass',
    level: 'download',
    shows: 'attested',
    description: 'What the Glaze Works (invented) asked for: cobalt and nickel in water, attested bands only.',
    accessions: pick(
      '[Co(H2O)6]2+',
      '[Co(NH3)6]3+',
      '[CoCl(NH3)5]2+',
      'trans-[CoCl2(en)2]+',
      'cis-[CoCl2(en)2]+',
      '[Co(en)3]3+',
      '[Co(ox)3]3-',
      '[Ni(H2O)6]2+',
      '[Ni(NH3)6]2+',
      '[Ni(en)3]2+',
    ),
  });
  await shareFolio(people, {
    lead: 'r.tolvanen@demo.example',
    lab: 'hill',
    name: 'Sensitisers, first comparison',
    level: 'view',
    shows: 'proposed',
    description: 'Diimine complexes for the round of comparison; proposals included. Invented for the demo.',
    accessions: pick(
      '[Ru(bpy)3]2+',
      '[Ru(phen)3]2+',
      '[Ru(tpy)2]2+',
      '[Os(bpy)3]2+',
      '[ReCl(CO)3(bpy)]',
      '[Fe(phen)3]2+',
    ),
  });
  await closeDatabase();
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href)
  run(async () => {
    readOptions('demo', {});
    await loadDemo();
    console.log('The invented Tidewater programme is in the registry.');
  });
