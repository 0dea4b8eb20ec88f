import { and, eq, inArray, or, sql } from 'drizzle-orm';
import type { Tx } from '#src/db/client.ts';
import { accounts, memberships } from '#src/db/schema/index.ts';
import { type Asker, askerAgain, isMember } from '../access/asker.ts';
import { sha256 } from '../ids.ts';
import { disputed, mentioned } from '../mail/people-mails.ts';
import { queueMail } from '../mail.ts';
import { mentionedIn, sentenceWith } from './parse.ts';
import { placeFor, type Subject } from './subjects.ts';

export { mentionedIn } from './parse.ts';

interface MentionText {
  text: string | null | undefined;
  /** What stood there: who was named in it already hears nothing again. Null also when more people see it now. */
  before?: string | null | undefined;
  subject: Subject;
  /** An account that hears of it by another mail. */
  except?: string | undefined;
}

interface Shown {
  state?: string | undefined;
  visibility?: string | undefined;
}

/** The text that stood there, as `before`: none where the change lets more people see it, since they hear of it now. */
export function textBefore(text: string | null, was: Shown, patch: Shown): string | null {
  const isPublished = was.state === 'draft' && patch.state === 'registered';
  const isOpened = was.visibility === 'lab' && patch.visibility === 'programme';
  return isPublished || isOpened ? null : text;
}

/**
 * Tell those whom a text names, by one mail a person and sentence, in the transaction that writes the text. Told are
 * active members who see the record themselves, never who wrote it. A name that fits several members tells nobody.
 */
export async function notifyMentions(
  tx: Tx,
  asker: Asker,
  { text, before, subject, except }: MentionText,
): Promise<void> {
  if (!text) return;
  const known = new Set(mentionedIn(before));
  const handles = mentionedIn(text).filter((handle) => !known.has(handle));
  if (handles.length === 0) return;
  for (const [account, handle] of await membersBehind(tx, handles)) {
    if (account.id === asker.accountId || account.id === except) continue;
    const place = await placeForAccount(tx, account.id, subject);
    if (!place) continue;
    const sentence = sentenceWith(text, handle);
    await queueMail(tx, {
      key: `mention:${subject.id}:${account.id}:${sha256(sentence).slice(0, 32)}`,
      kind: 'mention',
      to: account.email,
      ...mentioned({ by: asker.name, sentence, ...place }),
    });
  }
}

/** Tell the proposer that their assignment is disputed, as long as they see it and are not who disputes. */
export async function notifyDispute(
  tx: Tx,
  asker: Asker,
  { band, reason }: { band: { id: string; proposedBy: string; version: number }; reason: string },
): Promise<void> {
  if (band.proposedBy === asker.accountId) return;
  const [proposer] = await tx.select().from(accounts).where(eq(accounts.id, band.proposedBy));
  const place = proposer && (await placeForAccount(tx, proposer.id, { type: 'band', id: band.id }));
  if (!place) return;
  await queueMail(tx, {
    key: `dispute:${band.id}:${band.version}`,
    kind: 'dispute',
    to: proposer.email,
    ...disputed({ by: asker.name, reason, ...place }),
  });
}

/** Where an account reads the text, judged by its own rights; null for who is no active member or does not see it. */
async function placeForAccount(tx: Tx, accountId: string, subject: Subject) {
  const reader = await askerAgain({ accountId });
  return reader && isMember(reader) ? placeFor(tx, reader, subject) : null;
}

/** Active members by the handles that name exactly one of them, each with the first handle that does. */
async function membersBehind(tx: Tx, handles: string[]) {
  const local = sql<string>`substr(${accounts.email}, 1, instr(${accounts.email}, '@') - 1)`;
  const rows = await tx
    .select({ id: accounts.id, email: accounts.email, local })
    .from(accounts)
    .where(
      and(
        eq(accounts.state, 'active'),
        or(
          eq(accounts.steward, true),
          sql`exists (select 1 from ${memberships} where ${memberships.accountId} = ${accounts.id})`,
        ),
        or(inArray(accounts.email, handles), inArray(local, handles)),
      ),
    );
  const told = new Map<string, readonly [account: { id: string; email: string }, handle: string]>();
  for (const handle of handles) {
    const fitting = rows.filter((row) => (handle.includes('@') ? row.email : row.local) === handle);
    const [account] = fitting;
    if (fitting.length === 1 && account && !told.has(account.id)) told.set(account.id, [account, handle]);
  }
  return told.values();
}
