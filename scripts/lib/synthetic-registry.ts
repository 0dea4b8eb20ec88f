import type { Database } from '#src/db/client.ts';
import {
  accounts,
  bands,
  centres,
  complexes,
  complexLigands,
  files,
  labs,
  memberships,
  spectra,
} from '#src/db/schema/index.ts';
import { newId, nowIso } from '#src/server/ids.ts';

const METALS: readonly [element: string, group: number][] = [
  ['Ti', 4],
  ['V', 5],
  ['Cr', 6],
  ['Mn', 7],
  ['Fe', 8],
  ['Co', 9],
  ['Ni', 10],
  ['Cu', 11],
  ['Mo', 6],
  ['Ru', 8],
  ['Rh', 9],
  ['W', 6],
  ['Re', 7],
  ['Os', 8],
  ['Ir', 9],
  ['Pt', 10],
];
const LIGANDS = [
  'NH3',
  'H2O',
  'Cl',
  'Br',
  'CN',
  'en',
  'bpy',
  'phen',
  'ox',
  'acac',
  'NCS',
  'py',
  'edta',
  'tpy',
  'CO',
  'PPh3',
];
const GEOMETRIES: readonly [symbol: string, group: string][] = [
  ['OC-6', 'Oh'],
  ['OC-6', 'D3'],
  ['OC-6', 'C4v'],
  ['T-4', 'Td'],
  ['SP-4', 'D4h'],
  ['TBPY-5', 'D3h'],
];

/** The k-th of a list, again and again. */
const turn = <T>(list: readonly T[], k: number): T => list[k % list.length]!;

async function insertAll<Row>(rows: Row[], insert: (part: Row[]) => Promise<unknown>): Promise<void> {
  for (let at = 0; at < rows.length; at += 250) await insert(rows.slice(at, at + 250));
}

/**
 * Fill a migrated database with rows of the right shape for measuring: `count` complexes of four labs, each with a
 * spectrum and two bands. They are no chemistry; nothing but a benchmark may use them.
 *
 * @returns a member of the first lab
 */
export async function fillForMeasuring(
  { write }: Database,
  count: number,
): Promise<{ accountId: string; labId: string }> {
  const createdAt = nowIso();
  const accountId = newId();
  const labIds = Array.from({ length: 4 }, () => newId());
  const ids = Array.from({ length: count }, () => ({ complex: newId(), spectrum: newId() }));
  await write(async (tx) => {
    await tx.insert(accounts).values({ id: accountId, email: 'bench@bench.example', name: 'Bench', createdAt });
    await tx.insert(labs).values(labIds.map((id, k) => ({ id, name: `Lab ${k + 1}`, createdAt })));
    await tx.insert(memberships).values({ accountId, labId: labIds[0]!, role: 'contributor', createdAt });
    await tx.insert(files).values({ sha256: 'bench', size: 1, createdAt });
    const numbered = ids.map((id, k) => ({ ...id, k }));
    await insertAll(numbered, (part) =>
      tx.insert(complexes).values(
        part.map(({ complex, k }) => {
          const formula = `[${turn(METALS, k)[0]}(${turn(LIGANDS, k)})${1 + (k % 6)}(${turn(LIGANDS, Math.floor(k / 16))})]`;
          return {
            id: complex,
            number: k,
            accession: `ZF${String(k).padStart(6, '0')}-0`,
            identityKey: `bench ${k}`,
            formula,
            charge: 0,
            hill: formula,
            composition: {},
            molarMass: 100 + (k % 900),
            pointGroup: turn(GEOMETRIES, k)[1],
            labId: turn(labIds, k),
            makerId: accountId,
            state: 'registered' as const,
            visibility: k % 10 === 0 ? ('lab' as const) : ('programme' as const),
            search: formula.toLowerCase(),
            createdAt,
            updatedAt: createdAt,
          };
        }),
      ),
    );
    await insertAll(numbered, (part) =>
      tx.insert(centres).values(
        part.map(({ complex, k }) => {
          const [element, group] = turn(METALS, k);
          return {
            complexId: complex,
            ordinal: 0,
            element,
            group,
            oxidationState: 2 + (k % 2),
            dCount: group - 2 - (k % 2),
            geometry: turn(GEOMETRIES, k)[0],
            geometryBasis: 'assumed' as const,
          };
        }),
      ),
    );
    await insertAll(
      numbered.flatMap(({ complex, k }) =>
        [0, 1].map((ordinal) => ({
          complexId: complex,
          ordinal,
          abbreviation: turn(LIGANDS, k + 5 * ordinal),
          count: 3,
          denticity: 1,
          donors: ['N'],
        })),
      ),
      (part) => tx.insert(complexLigands).values(part),
    );
    await insertAll(numbered, (part) =>
      tx.insert(spectra).values(
        part.map(({ complex, spectrum, k }) => ({
          id: spectrum,
          complexId: complex,
          labId: turn(labIds, k + 1),
          makerId: accountId,
          title: 'bench',
          technique: 'solution' as const,
          fileSha256: 'bench',
          fileName: 'bench.csv',
          xUnit: 'nm',
          yUnit: 'absorbance',
          points: 2,
          xMin: 10_000,
          xMax: 30_000,
          createdAt,
          updatedAt: createdAt,
        })),
      ),
    );
    await insertAll(
      numbered.flatMap(({ spectrum, k }) =>
        [0, 1].map((ordinal) => ({
          id: newId(),
          spectrumId: spectrum,
          ordinal,
          wavenumber: 12_000 + ((k * 37 + ordinal * 9_000) % 25_000),
          height: 10 + (k % 90),
          quantity: 'epsilon' as const,
          epsilon: 10 + (k % 90),
          found: 'typed' as const,
          class: 'd-d' as const,
          proposedBy: accountId,
        })),
      ),
      (part) => tx.insert(bands).values(part),
    );
  });
  return { accountId, labId: labIds[0]! };
}
