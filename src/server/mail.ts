import { and, asc, eq, lte, sql } from 'drizzle-orm';
import { Resend } from 'resend';
import type { Database, Tx } from '#src/db/client.ts';
import { mails } from '#src/db/schema/index.ts';
import { newId, nowIso } from './ids.ts';
import { log } from './log.ts';
import { TOKEN_LINK_KINDS, withoutLinks } from './mail/secret-links.ts';
import { oneLine } from './mail/templates.ts';
import { type Settings, settings } from './settings.ts';

export interface MailToQueue {
  /** What makes it this one mail, such as `invitation:<id>`: a second mail of the same key is not queued. */
  key: string;
  kind: string;
  /** One address. */
  to: string;
  subject: string;
  text: string;
  html: string;
}

/** Attempts before a mail is given up. With the pauses below that takes about five hours. */
export const MAIL_TRIES = 8;
/** How long an attempt may take before another process may try the same mail, in milliseconds. */
const CLAIM_MS = 60_000;
const SEND_TIMEOUT_MS = 20_000;
/** Pause after the n-th failed attempt, in milliseconds: 30 s, 2 min, 8 min … at most 2 h. */
export const mailPause = (tries: number): number => Math.min(30_000 * 4 ** (tries - 1), 7_200_000);

/**
 * Put a mail in the queue, in the transaction of what it tells of: both stand or neither does.
 *
 * @throws {Error} when `to` is not one plain address
 */
export async function queueMail(tx: Tx, mail: MailToQueue): Promise<void> {
  if (!/^[^\s@,;<>"]+@[^\s@,;<>"]+$/.test(mail.to)) throw new Error('a mail goes to one plain address');
  const row = {
    ...mail,
    subject: oneLine(mail.subject),
    id: newId(),
    state: 'queued' as const,
    nextAt: Date.now(),
    createdAt: nowIso(),
  };
  await tx.insert(mails).values(row).onConflictDoNothing({ target: mails.key });
}

/** Hand one mail to the mail service. `final`: it will never be taken, however often it is tried. */
export type MailTransport = (
  mail: MailToQueue,
) => Promise<{ ok: true } | { ok: false; reason: string; final: boolean }>;

/**
 * The mail service's own client, which would follow a redirect wherever it leads and take the mail, with its key, along.
 */
class StrictResend extends Resend {
  override fetchRequest<T>(path: string, options: object = {}) {
    return super.fetchRequest<T>(path, { ...options, redirect: 'error' });
  }
}

/** Transport over the mail service's own client. The key goes along as idempotency key: a repeat sends nothing twice. */
export function resendTransport({
  apiKey,
  baseUrl,
  from,
}: {
  apiKey: string;
  baseUrl?: string;
  from: string;
}): MailTransport {
  const resend = new StrictResend(apiKey, baseUrl ? { baseUrl } : undefined);
  return async ({ key, to, subject, text, html }) => {
    const sent = resend.emails.send({ from, to, subject, text, html }, { idempotencyKey: key });
    const { error } = await within(sent, SEND_TIMEOUT_MS);
    if (!error) return { ok: true };
    const status = error.statusCode ?? 0;
    // A wrong key or a used-up quota is the operator's to mend, so these wait like a service that is away.
    return { ok: false, reason: `${error.name}: ${error.message}`, final: status === 400 || status === 422 };
  };
}

async function within<T>(work: Promise<T>, ms: number): Promise<T> {
  let timer: NodeJS.Timeout | undefined;
  const late = new Promise<never>((_, reject) => {
    timer = setTimeout(() => reject(new Error(`no answer within ${ms / 1000} s`)), ms);
  });
  try {
    return await Promise.race([work, late]);
  } finally {
    clearTimeout(timer);
  }
}

/**
 * The transport that the settings name. Without an API key (demo mode) mail goes to a stand-in on this machine, and
 * the outbox page shows what was sent.
 */
export async function openTransport({
  mail,
}: Pick<Settings, 'mail'>): Promise<{ send: MailTransport; close(): Promise<void> }> {
  const { apiKey, baseUrl, from } = mail;
  if (apiKey) return { send: resendTransport({ apiKey, baseUrl, from }), close: async () => undefined };
  const { startMailService } = await import('#fakes/mail.ts');
  const service = await startMailService();
  return { send: resendTransport({ apiKey: 'none', baseUrl: service.baseUrl, from }), close: service.close };
}

/**
 * Send what is due, oldest first. Each mail is claimed for a minute before it goes out: a process that dies in
 * between leaves it to be sent again under the same key.
 *
 * @param keepLinks - whether links with a token in them stay in the table afterwards: in a demo, whose outbox shows them
 * @returns how many mails were tried
 */
export async function sendDueMail(
  database: Database,
  send: MailTransport,
  now = Date.now,
  keepLinks = settings().mode === 'demo',
): Promise<number> {
  for (let tried = 0; ; tried++) {
    const mail = await claim(database, now());
    if (!mail) return tried;
    const result = await send(mail).catch((error: unknown) => ({
      ok: false as const,
      reason: String(error),
      final: false,
    }));
    const after = outcome(mail.tries, result, now());
    const emptied = keepLinks || after.state === 'queued' ? {} : withoutTokens(mail);
    await database.write((tx) =>
      tx
        .update(mails)
        .set({ ...after, ...emptied })
        .where(eq(mails.id, mail.id)),
    );
    if (!result.ok)
      log.warn({ mail: mail.id, kind: mail.kind, tries: mail.tries, reason: result.reason }, 'mail not sent');
  }
}

function outcome(tries: number, result: Awaited<ReturnType<MailTransport>>, now: number) {
  if (result.ok) return { state: 'sent' as const, sentAt: new Date(now).toISOString(), error: null };
  if (result.final || tries >= MAIL_TRIES) return { state: 'failed' as const, error: result.reason };
  return { state: 'queued' as const, error: result.reason, nextAt: now + mailPause(tries) };
}

/** What is kept of a mail that holds a token and will not be sent any more. */
const withoutTokens = ({ kind, text }: typeof mails.$inferSelect) =>
  TOKEN_LINK_KINDS.has(kind) ? { text: withoutLinks(text, 'the link went out with the mail'), html: '' } : {};

async function claim({ db, write }: Database, now: number): Promise<typeof mails.$inferSelect | undefined> {
  const due = and(eq(mails.state, 'queued'), lte(mails.nextAt, now));
  // Looking first keeps an idle loop from taking the write lock.
  const [next] = await db
    .select({ id: mails.id })
    .from(mails)
    .where(due)
    .orderBy(asc(mails.nextAt), asc(mails.id))
    .limit(1);
  if (!next) return undefined;
  const claimed = await write((tx) =>
    tx
      .update(mails)
      .set({ tries: sql`${mails.tries} + 1`, nextAt: now + CLAIM_MS })
      .where(and(eq(mails.id, next.id), due))
      .returning(),
  );
  return claimed[0];
}
