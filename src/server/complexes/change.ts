import { and, eq, inArray, or, sql } from 'drizzle-orm';
import type { ComplexPatch } from '../../contracts/complexes.ts';
import { isUniqueViolation, type Tx } from '../../db/client.ts';
import {
  bands,
  centres,
  complexes,
  complexLigands,
  ligandSites,
  mergeTasks,
  preparationComponents,
  spectra,
} from '../../db/schema/index.ts';
import { type ComplexChange, leads } from '../access/records.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { nowIso } from '../ids.ts';
import { notifyMentions, textBefore } from '../mentions/notify.ts';
import { record } from '../trail.ts';
import { deriveIdentity } from './derive-identity.ts';
import { duplicate, duplicateInSight, identityColumns, insertParts, noteHiddenDuplicates } from './register.ts';

const IDENTITY = ['geometry', 'isomer', 'chirality', 'spinState'] as const;

async function deleteParts(tx: Tx, complexId: string): Promise<void> {
  await tx.delete(ligandSites).where(eq(ligandSites.complexId, complexId));
  await tx.delete(complexLigands).where(eq(complexLigands.complexId, complexId));
  await tx.delete(centres).where(eq(centres.complexId, complexId));
}

/** What stands now, as choices, so that a patch changes only what it names. */
async function presentChoices(tx: Tx, { complex }: ComplexChange, patch: ComplexPatch) {
  const rows = await tx.select().from(centres).where(eq(centres.complexId, complex.id)).orderBy(centres.ordinal);
  return {
    formula: complex.formula,
    answers: complex.answers,
    geometry: rows.map((row) => row.geometry),
    spinState: rows.map((row) => row.spinState),
    isomer: complex.sites
      ? {
          sites: complex.sites,
          chelates: complex.chelates ?? [],
          chirality: patch.chirality === undefined ? complex.chirality : patch.chirality,
        }
      : null,
  };
}

/** Attested assignments rest on the identity: when it changes they are proposed again. */
async function reopenAttestations(tx: Tx, complexId: string): Promise<number> {
  const reopened = await tx
    .update(bands)
    .set({
      state: 'proposed',
      judgement: 'Reopened: the identity of the complex changed',
      version: sql`${bands.version} + 1`,
    })
    .where(
      and(
        eq(bands.state, 'attested'),
        inArray(bands.spectrumId, tx.select({ id: spectra.id }).from(spectra).where(eq(spectra.complexId, complexId))),
      ),
    )
    .returning({ id: bands.id });
  return reopened.length;
}

function checkState(access: ComplexChange, patch: ComplexPatch): void {
  const { complex, asker } = access;
  if (!patch.state || patch.state === complex.state) return;
  if (patch.state === 'draft')
    throw new HttpError(422, 'A registered complex does not become a draft again: withdraw it');
  if (patch.state === 'withdrawn') {
    if (complex.state === 'draft') throw new HttpError(422, 'A draft is deleted, not withdrawn');
    if (!patch.withdrawnReason)
      throw new HttpError(422, 'Say why it is withdrawn', {
        errors: [{ pointer: '#/withdrawnReason', detail: 'A reason is needed' }],
      });
  }
  if (complex.state === 'withdrawn' && !leads(asker, complex.labId))
    throw new HttpError(403, 'A lead of the home lab may take a withdrawal back');
}

/**
 * Change a complex. A change of geometry, isomer or hand re-derives it from its formula and reopens attestations.
 *
 * @throws {HttpError} 409 when it would become another record's twin, 412 when somebody changed it meanwhile, 422
 */
export async function changeComplex(access: ComplexChange, patch: ComplexPatch): Promise<void> {
  checkState(access, patch);
  const { complex, asker } = access;
  const { write } = await database();
  try {
    await write(async (tx) => {
      const changed = await tx
        .update(complexes)
        .set({ version: complex.version + 1, updatedAt: nowIso() })
        .where(and(eq(complexes.id, complex.id), eq(complexes.version, complex.version)))
        .returning({ id: complexes.id });
      if (changed.length === 0) throw new HttpError(412, 'Somebody changed it meanwhile: read it again and repeat');

      let reopened = 0;
      let { identityKey } = complex;
      if (IDENTITY.some((name) => name in patch)) {
        const present = await presentChoices(tx, access, patch);
        const wanted = Object.fromEntries(IDENTITY.filter((name) => name in patch).map((name) => [name, patch[name]]));
        // Another polyhedron has other sites: the old isomer does not carry over.
        const isomer = 'geometry' in patch && !('isomer' in patch) ? { isomer: null } : {};
        const identity = deriveIdentity({
          ...present,
          ...isomer,
          ...wanted,
          chirality: patch.chirality ?? undefined,
        });
        identityKey = identity.key;
        if (identity.key !== complex.identityKey) {
          const twin = await duplicateInSight(tx, asker, identity.key, complex.id);
          if (twin) throw duplicate(twin);
          reopened = await reopenAttestations(tx, complex.id);
          await noteHiddenDuplicates(tx, asker, complex.id, identity.key);
        }
        await tx.update(complexes).set(identityColumns(identity)).where(eq(complexes.id, complex.id));
        await deleteParts(tx, complex.id);
        await insertParts(tx, complex.id, identity);
      }
      const { notes, visibility, embargoUntil, state, withdrawnReason } = patch;
      const plain = {
        ...(notes === undefined ? {} : { notes }),
        ...(visibility === undefined ? {} : { visibility }),
        ...(embargoUntil === undefined ? {} : { embargoUntil }),
        ...(state === undefined ? {} : { state, withdrawnReason: state === 'withdrawn' ? withdrawnReason! : null }),
      };
      if (Object.keys(plain).length > 0) await tx.update(complexes).set(plain).where(eq(complexes.id, complex.id));
      // A draft may have got a twin out of its maker's sight since it was begun.
      if (complex.state === 'draft' && state === 'registered')
        await noteHiddenDuplicates(tx, asker, complex.id, identityKey);
      const [text, before] = [notes === undefined ? complex.notes : notes, textBefore(complex.notes, complex, patch)];
      await notifyMentions(tx, asker, { text, before, subject: { type: 'complex', id: complex.id } });
      const action = state && state !== complex.state ? (state === 'withdrawn' ? 'withdraw' : 'register') : 'change';
      await record(tx, asker, {
        action,
        subjectType: 'complex',
        subjectId: complex.id,
        detail: { ...patch, ...(reopened ? { reopened } : {}) },
      });
    });
  } catch (error) {
    if (isUniqueViolation(error)) throw new HttpError(409, 'Another record of this identity was registered just now');
    throw error;
  }
}

/** Delete a draft with all that hangs on it. @throws {HttpError} 409 for what is no draft or is used */
export async function deleteDraft({ complex, asker }: ComplexChange): Promise<void> {
  if (complex.state !== 'draft') throw new HttpError(409, 'Only a draft can be deleted: withdraw a registered complex');
  const { write } = await database();
  await write(async (tx) => {
    const [spectrum] = await tx
      .select({ id: spectra.id })
      .from(spectra)
      .where(eq(spectra.complexId, complex.id))
      .limit(1);
    const [part] = await tx
      .select({ id: preparationComponents.preparationId })
      .from(preparationComponents)
      .where(eq(preparationComponents.complexId, complex.id))
      .limit(1);
    if (spectrum || part) throw new HttpError(409, 'It has preparations or spectra: delete or move those first');
    await deleteParts(tx, complex.id);
    await tx.delete(mergeTasks).where(or(eq(mergeTasks.firstId, complex.id), eq(mergeTasks.secondId, complex.id)));
    await tx.delete(complexes).where(eq(complexes.id, complex.id));
    await record(tx, asker, {
      action: 'delete-draft',
      subjectType: 'complex',
      subjectId: complex.id,
      detail: { accession: complex.accession },
    });
  });
}
