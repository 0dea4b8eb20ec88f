import { eq, inArray } from 'drizzle-orm';
import type { BandList, FitHistory } from '#src/contracts/spectra.ts';
import { bands, centres } from '#src/db/schema/index.ts';
import type { SpectrumPropose } from '#src/server/access/records.ts';
import { database } from '#src/server/database.ts';
import { HttpError } from '#src/server/http.ts';
import { newId } from '#src/server/ids.ts';
import { notifyMentions } from '#src/server/mentions/notify.ts';
import { record } from '#src/server/trail.ts';
import { takeVersion } from './change.ts';
import { historyFor } from './fit-history.ts';
import { bandContext, deriveBand } from './quantities.ts';
import { refuse } from './refuse.ts';
import { speciesCount } from './species-count.ts';

type Band = typeof bands.$inferSelect;
type Input = BandList[number];

const ASSIGNMENT = ['class', 'centreOrdinal', 'ligand', 'from', 'to', 'reason'] as const;
const MEASURED = ['wavenumber', 'height', 'quantity', 'fwhm', 'shoulder', 'found'] as const;
type Told = Pick<Band, (typeof ASSIGNMENT)[number] | (typeof MEASURED)[number]>;

const told = ({ wavenumber, height, quantity, fwhm, shoulder, found, assignment }: Input): Told => ({
  wavenumber,
  height,
  quantity,
  fwhm: fwhm ?? null,
  shoulder: shoulder ?? false,
  found,
  class: assignment?.class ?? 'unassigned',
  centreOrdinal: assignment?.centre ?? null,
  ligand: assignment?.ligand ?? null,
  from: assignment?.from ?? null,
  to: assignment?.to ?? null,
  reason: assignment?.reason ?? null,
});

const same = (a: Told, b: Told, names: readonly (keyof Told)[]) => names.every((name) => a[name] === b[name]);

/** For each band of the list the one that stands for it: by its id, else by being equal in everything. */
function pairUp(list: readonly Input[], standing: readonly Band[], at: string): (Band | undefined)[] {
  const free = new Map(standing.map((band) => [band.id, band]));
  const pairs = list.map((input, i) => {
    if (input.id === undefined) return undefined;
    const band = free.get(input.id);
    if (!band) throw refuse(`${at}/${i}/id`, 'This spectrum has no such band, or the list names it twice');
    free.delete(input.id);
    return band;
  });
  return pairs.map((band, i) => {
    if (band || list[i]!.id !== undefined) return band;
    const equal = [...free.values()].find((other) => same(told(list[i]!), other, [...MEASURED, ...ASSIGNMENT]));
    if (equal) free.delete(equal.id);
    return equal;
  });
}

/**
 * Put a list of bands in the place of those that stand. A band of which nothing changed keeps its id and its
 * judgement; one that changed is proposed again, by whoever changed its assignment; one left out is gone.
 *
 * @param fit - how the fitted ones were found, where that is told anew
 * @throws {HttpError} 422 for an id or a centre that is not there, 409 for a withdrawn spectrum, 412
 */
export async function replaceBands(
  { asker, complex, spectrum }: SpectrumPropose,
  list: BandList,
  fit?: FitHistory,
): Promise<void> {
  if (spectrum.state === 'withdrawn')
    throw new HttpError(409, 'This spectrum is withdrawn: its bands stay as they are');
  const history = historyFor(list, fit, spectrum.history);
  const at = fit ? '#/bands' : '#';
  const { write } = await database();
  await write(async (tx) => {
    const standing = await tx.select().from(bands).where(eq(bands.spectrumId, spectrum.id));
    const known = await tx.select({ ordinal: centres.ordinal }).from(centres).where(eq(centres.complexId, complex.id));
    list.forEach(({ assignment }, i) => {
      const centre = assignment?.centre;
      if (centre !== undefined && !known.some(({ ordinal }) => ordinal === centre))
        throw refuse(`${at}/${i}/assignment/centre`, 'The complex has no such centre');
    });
    const pairs = pairUp(list, standing, at);
    const context = bandContext({ ...spectrum, history }, await speciesCount(spectrum.id, tx));
    const kept = new Set(pairs.flatMap((band) => band?.id ?? []));
    const gone = standing.filter(({ id }) => !kept.has(id));
    if (gone.length > 0)
      await tx.delete(bands).where(
        inArray(
          bands.id,
          gone.map(({ id }) => id),
        ),
      );

    const changed: string[] = [];
    for (const [ordinal, input] of list.entries()) {
      const now = told(input);
      const before = pairs[ordinal];
      if (before && same(now, before, [...MEASURED, ...ASSIGNMENT])) {
        await tx.update(bands).set({ ordinal }).where(eq(bands.id, before.id));
        continue;
      }
      const id = before?.id ?? newId();
      changed.push(id);
      // Who only mends a number does not become the proposer: otherwise the proposer could attest what is their own.
      const proposedBy = before && same(now, before, ASSIGNMENT) ? before.proposedBy : asker.accountId;
      const row = {
        ...now,
        ...deriveBand(now, context),
        ordinal,
        state: 'proposed' as const,
        proposedBy,
        judgedBy: null,
        judgedAt: null,
        judgement: null,
      };
      if (before)
        await tx
          .update(bands)
          .set({ ...row, version: before.version + 1 })
          .where(eq(bands.id, id));
      else await tx.insert(bands).values({ id, spectrumId: spectrum.id, ...row });
      await notifyMentions(tx, asker, { text: now.reason, before: before?.reason, subject: { type: 'band', id } });
    }
    await takeVersion(tx, spectrum, { history });
    await record(tx, asker, {
      action: 'propose-bands',
      subjectType: 'spectrum',
      subjectId: spectrum.id,
      detail: {
        changed,
        gone: gone.map(({ id, wavenumber, state }) => ({ id, wavenumber, state })),
        kept: list.length - changed.length,
        ...(fit ? { fit } : {}),
      },
    });
  });
}
