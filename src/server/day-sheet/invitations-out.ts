import { and, eq, gt, isNull } from 'drizzle-orm';
import type { DaySheet } from '#src/contracts/day-sheet.ts';
import { invitations } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { database } from '../database.ts';
import { nowIso } from '../ids.ts';
import { invitationRows } from '../invitations/record.ts';

const SHOWN = 6;

/** Invitations that the asker sent and that nobody answered yet, into labs and to folios the asker still has. */
export async function invitationsOut(asker: Asker): Promise<DaySheet['invitations']> {
  const { db } = await database();
  const open = and(
    eq(invitations.invitedBy, asker.accountId),
    isNull(invitations.acceptedAt),
    isNull(invitations.revokedAt),
    gt(invitations.expiresAt, nowIso()),
  )!;
  const rows = await invitationRows(db, open);
  const items = rows.flatMap(({ invitation: { id, email, expiresAt }, lab, folio }) => {
    const labId = lab?.id ?? folio?.labId;
    if (!labId || !(asker.steward || asker.labs.has(labId))) return [];
    const to = folio ?? lab!;
    return [{ id, email, expiresAt, to: to.name, href: folio ? `/folios/${folio.id}` : `/labs/${to.id}` }];
  });
  return { items: items.slice(0, SHOWN), total: items.length };
}
