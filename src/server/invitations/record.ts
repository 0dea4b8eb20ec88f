import { desc, eq, type SQL } from 'drizzle-orm';
import type { InvitationRecord } from '#src/contracts/invitations.ts';
import type { Db, Tx } from '#src/db/client.ts';
import { accounts, folios, invitations, labs } from '#src/db/schema/index.ts';
import type { FolioInvite, LabInvite } from '../access/sharing.ts';
import { database } from '../database.ts';
import { nowIso } from '../ids.ts';

type Row = typeof invitations.$inferSelect;

/** What became of an invitation by now. One that was used or revoked stays so after its time. */
export function invitationState(row: Pick<Row, 'acceptedAt' | 'revokedAt' | 'expiresAt'>): InvitationRecord['state'] {
  if (row.acceptedAt) return 'accepted';
  if (row.revokedAt) return 'revoked';
  return row.expiresAt <= nowIso() ? 'lapsed' : 'sent';
}

/** Invitations with what they offer, newest first. The lab is the one joined, or the one whose folio it is. */
export async function invitationRows(db: Db | Tx, where: SQL) {
  const rows = await db
    .select({ invitation: invitations, lab: labs, folio: folios, inviter: accounts })
    .from(invitations)
    .innerJoin(accounts, eq(accounts.id, invitations.invitedBy))
    .leftJoin(folios, eq(folios.id, invitations.folioId))
    .leftJoin(labs, eq(labs.id, invitations.labId))
    .where(where)
    .orderBy(desc(invitations.id));
  return rows;
}

/** An invitation as those see it who may invite; never its token, which stands only in the mail. */
export function invitationRecord(row: Awaited<ReturnType<typeof invitationRows>>[number]): InvitationRecord {
  const { invitation, lab, folio, inviter } = row;
  return {
    id: invitation.id,
    email: invitation.email,
    state: invitationState(invitation),
    role: invitation.role,
    level: invitation.level,
    folio: folio && { id: folio.id, name: folio.name },
    lab: lab && { id: lab.id, name: lab.name },
    invitedBy: inviter.name,
    createdAt: invitation.createdAt,
    expiresAt: invitation.expiresAt,
    accessUntil: invitation.grantExpiresAt,
    sends: invitation.sends,
    sentAt: invitation.sentAt ?? invitation.createdAt,
    acceptedAt: invitation.acceptedAt,
    revokedAt: invitation.revokedAt,
  };
}

const listed = async (where: SQL) => (await invitationRows((await database()).db, where)).map(invitationRecord);

/** Invitations into a lab, newest first. */
export const listLabInvitations = ({ lab }: LabInvite) => listed(eq(invitations.labId, lab.id));

/** Invitations to a folio, newest first. */
export const listFolioInvitations = ({ folio }: FolioInvite) => listed(eq(invitations.folioId, folio.id));
