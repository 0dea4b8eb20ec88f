import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { type MailService, startMailService } from '#fakes/mail.ts';
import type { Database } from '#src/db/client.ts';
import { mails } from '#src/db/schema/index.ts';
import { bundleReady, guestInvitation, memberInvitation } from '#src/server/mail/sharing-mails.ts';
import {
  MAIL_TRIES,
  type MailTransport,
  mailPause,
  queueMail,
  resendTransport,
  sendDueMail,
} from '#src/server/mail.ts';
import { freshDatabase } from './fresh-database.ts';

let database: Database;
let service: MailService;
let send: MailTransport;

beforeEach(async () => {
  database = await freshDatabase();
  service = await startMailService();
  send = resendTransport({ apiKey: 'key', baseUrl: service.baseUrl, from: 'Zaffre <zaffre@demo.example>' });
});

afterEach(() => service.close());

const mail = (key: string) => ({
  key,
  kind: 'test',
  to: 'ada@demo.example',
  subject: 'Bands',
  text: 'text',
  html: '<p>html</p>',
});
const queue = (...keys: string[]) =>
  database.write(async (tx) => {
    for (const key of keys) await queueMail(tx, mail(key));
  });
const states = async () => (await database.db.select().from(mails)).map(({ state, tries }) => ({ state, tries }));

test('sends what is queued, with its key, and marks it', async () => {
  await queue('a', 'b');
  expect(await sendDueMail(database, send)).toBe(2);
  expect(service.sent.map(({ idempotencyKey, to, subject }) => ({ idempotencyKey, to, subject }))).toEqual([
    { idempotencyKey: 'a', to: ['ada@demo.example'], subject: 'Bands' },
    { idempotencyKey: 'b', to: ['ada@demo.example'], subject: 'Bands' },
  ]);
  expect(await states()).toEqual([
    { state: 'sent', tries: 1 },
    { state: 'sent', tries: 1 },
  ]);
  expect(await sendDueMail(database, send)).toBe(0);
});

test('a key is queued once, and not at all when its transaction fails', async () => {
  await queue('a', 'a');
  await expect(
    database.write(async (tx) => {
      await queueMail(tx, mail('b'));
      throw new Error('the rest failed');
    }),
  ).rejects.toThrow('the rest failed');
  expect(await states()).toHaveLength(1);
});

test('a process that dies between sending and marking leaves a mail that arrives once', async () => {
  await queue('a');
  const dies: MailTransport = async (m) => {
    await send(m);
    return new Promise(() => undefined); // never comes back
  };
  void sendDueMail(database, dies);
  await expect.poll(() => service.sent.length).toBe(1);
  expect(await states()).toEqual([{ state: 'queued', tries: 1 }]);
  const afterClaim = () => Date.now() + 61_000;
  expect(await sendDueMail(database, send, afterClaim)).toBe(1);
  expect(service.sent).toHaveLength(1);
  expect(await states()).toEqual([{ state: 'sent', tries: 2 }]);
});

test.each([
  ['busy', 429, 'rate_limit_exceeded'],
  ['broken', 500, 'internal_server_error'],
  ['gone', 0, ''],
])('a service that is %s is tried again later', async (_, status, name) => {
  await queue('a');
  service.failNext(1, status, name);
  await sendDueMail(database, send);
  const [row] = await database.db.select().from(mails);
  expect(row).toMatchObject({ state: 'queued', tries: 1 });
  expect(row!.nextAt - Date.now()).toBeGreaterThan(mailPause(1) - 5_000);
  expect(await sendDueMail(database, send)).toBe(0);
  await sendDueMail(database, send, () => Date.now() + mailPause(1));
  expect(await states()).toEqual([{ state: 'sent', tries: 2 }]);
});

test('gives up after so many tries, and at once where the mail itself is refused', async () => {
  await queue('a');
  service.failNext(MAIL_TRIES, 503);
  let now = Date.now();
  for (let i = 1; i <= MAIL_TRIES; i++) {
    await sendDueMail(database, send, () => now);
    now += 7_300_000;
  }
  expect(await states()).toEqual([{ state: 'failed', tries: MAIL_TRIES }]);

  await queue('b');
  service.failNext(1, 422, 'validation_error');
  await sendDueMail(database, send);
  expect((await database.db.select().from(mails)).at(-1)).toMatchObject({
    state: 'failed',
    tries: 1,
    error: 'validation_error: told to fail',
  });
});

describe('a mail whose link opens something', () => {
  const secret = {
    ...mail('a'),
    kind: 'password-reset',
    text: 'Choose: https://zaffre.example/reset#s3cret-token',
    html: '<a href="https://zaffre.example/reset#s3cret-token">Choose</a>',
  };
  const queueSecret = () => database.write((tx) => queueMail(tx, secret));
  const kept = async () => (await database.db.select().from(mails))[0]!;

  test('is kept without it once it was sent or given up, and with it as long as it waits', async () => {
    await queueSecret();
    service.failNext(1, 503);
    const at = Date.now();
    await sendDueMail(database, send, () => at, false);
    expect(await kept()).toMatchObject({ state: 'queued', text: secret.text });
    await sendDueMail(database, send, () => at + mailPause(1), false);
    expect(service.sent[0]).toMatchObject({ text: secret.text, html: secret.html });
    expect(await kept()).toMatchObject({ state: 'sent', text: 'Choose: (the link went out with the mail)', html: '' });

    await database.write((tx) => queueMail(tx, { ...secret, key: 'b' }));
    service.failNext(1, 422, 'validation_error');
    await sendDueMail(database, send, Date.now, false);
    expect(JSON.stringify(await database.db.select().from(mails))).not.toContain('s3cret-token');
  });

  test('keeps it in a demo, whose outbox shows the mail; other mails stay as they are', async () => {
    await queueSecret();
    await sendDueMail(database, send);
    expect((await kept()).text).toBe(secret.text);
    await queue('c');
    await sendDueMail(database, send, Date.now, false);
    expect((await database.db.select().from(mails)).at(-1)).toMatchObject({ state: 'sent', text: 'text' });
  });
});

test('a redirect of the mail service is not followed', async () => {
  const asked: string[] = [];
  const server = createServer((request, response) => {
    asked.push(request.url ?? '');
    response.writeHead(308, { location: `${service.baseUrl}/emails` }).end();
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const { port } = server.address() as AddressInfo;
  const astray = resendTransport({
    apiKey: 'key',
    baseUrl: `http://127.0.0.1:${port}`,
    from: 'Zaffre <z@demo.example>',
  });
  expect(await astray(mail('a'))).toMatchObject({ ok: false, final: false });
  expect(asked).toEqual(['/emails']);
  expect(service.sent).toEqual([]);
  server.close();
});

test('refuses an address that is more than one', async () => {
  const to = (address: string) => database.write((tx) => queueMail(tx, { ...mail('a'), to: address }));
  for (const address of ['a@b.example, c@d.example', 'a@b.example\r\nBcc: c@d.example', 'A <a@b.example>', 'nobody'])
    await expect(to(address)).rejects.toThrow('one plain address');
});

const link = 'http://localhost:4321/invitation?a=1&b=2#token';
const expiresAt = '2027-01-05T10:00:00.000Z';

test('an invitation says who, what, until when, in text and in HTML', () => {
  const { subject, text, html } = memberInvitation({ inviter: 'Ada', lab: 'Lab North', role: 'lead', link, expiresAt });
  expect(subject).toBe('Ada invites you to Lab North');
  expect(text).toContain(`Accept the invitation:\n${link}\n`);
  expect(text).toContain('until 5 January 2027 (UTC)');
  expect(html).toContain('<a href="http://localhost:4321/invitation?a=1&amp;b=2#token">');
});

test('what people typed cannot become markup or a header', () => {
  const inviter = '<img src=x onerror=alert(1)>\r\nBcc: all@demo.example';
  const { subject, html } = guestInvitation({
    inviter,
    folio: '"><b>',
    level: 'view',
    licence: 'CC0-1.0',
    link,
    expiresAt,
    accessUntil: expiresAt,
  });
  expect(subject).not.toMatch(/[\r\n]/);
  expect(html).not.toMatch(/<img|<b>/);
  expect(() => bundleReady({ title: 'x', link: 'javascript:alert(1)', size: 1, keptUntil: expiresAt })).toThrow(
    'begins with http',
  );
});

test('a bundle tells its size', () => {
  expect(bundleReady({ title: 'Pigments', link, size: 12_345_678, keptUntil: expiresAt }).text).toContain('12.3 MB');
});
