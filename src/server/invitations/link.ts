import { eq } from 'drizzle-orm';
import type { Tx } from '#src/db/client.ts';
import { folios, type invitations, labs } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { newSecret, sha256 } from '../ids.ts';
import { guestInvitation, memberInvitation } from '../mail/sharing-mails.ts';
import { queueMail } from '../mail.ts';
import { settings } from '../settings.ts';

const DAY = 24 * 3600 * 1000; // ms
/** How long a link works, in days. */
export const LINK_DAYS = 14;

/** The instant so many days from now, ISO 8601. */
export const fromNow = (days: number) => new Date(Date.now() + days * DAY).toISOString();

/** When a link made now ends. One that outlives what it gives would be a promise that cannot be kept. */
export const linkEnd = (grantExpiresAt: string | null): string =>
  [fromNow(LINK_DAYS), ...(grantExpiresAt ? [grantExpiresAt] : [])].sort()[0]!;

/** A secret for one link; only its hash is kept. */
export function newLink(): { token: string; tokenHash: string } {
  const token = newSecret();
  return { token, tokenHash: sha256(token) };
}

/** Queue the mail that holds the link of an invitation, one for each time that it is sent. */
export async function mailLink(
  tx: Tx,
  asker: Asker,
  invitation: typeof invitations.$inferSelect,
  token: string,
): Promise<void> {
  const { id, email, sends, expiresAt, level, role, grantExpiresAt } = invitation;
  // In the fragment, so that the token reaches no server log and no Referer header.
  const facts = { inviter: asker.name, link: `${settings().publicOrigin}/join#${token}`, expiresAt };
  const [folio] = await tx
    .select()
    .from(folios)
    .where(eq(folios.id, invitation.folioId ?? ''));
  const [lab] = await tx
    .select()
    .from(labs)
    .where(eq(labs.id, invitation.labId ?? ''));
  const content = folio
    ? guestInvitation({
        ...facts,
        folio: folio.name,
        licence: folio.licence,
        level: level ?? 'view',
        accessUntil: grantExpiresAt!,
      })
    : memberInvitation({ ...facts, lab: lab!.name, role: role ?? 'contributor' });
  await queueMail(tx, { key: `invitation:${id}:${sends}`, kind: 'invitation', to: email, ...content });
}
