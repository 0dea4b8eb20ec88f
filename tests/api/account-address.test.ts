import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { mailsTo, runJobs, TestBrowser, tokenInMail } from './account-browser.ts';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { givePassword, TEST_PASSWORD } from './second-factor-people.ts';

let registry: Awaited<ReturnType<typeof openRegistry>>;
const password = TEST_PASSWORD;

async function server() {
  const { database } = await import('#src/server/database.ts');
  return { ...(await database()), tables: await import('#src/db/schema/index.ts') };
}
async function newcomer(name: string, labs = {}) {
  const made = await person(name, { labs });
  await givePassword(made.id);
  const browser = new TestBrowser();
  expect(await browser.signIn({ email: made.email, password })).toBeNull();
  return { ...made, browser };
}
type Newcomer = Awaited<ReturnType<typeof newcomer>>;
const ask = ({ browser }: Newcomer, email: string, typed = password) =>
  browser.call('POST', '/api/account/address', { email, password: typed });
const confirm = (token: string) => call('POST', '/api/account/address/confirm', { json: { token } });
const linkTo = (email: string) => tokenInMail(email, 'address-change');
const pending = async ({ browser }: Newcomer) =>
  (await json<{ email: string; addressChange: Record<string, unknown> | null }>(browser.call('GET', '/api/account')))
    .addressChange;

beforeAll(async () => {
  registry = await openRegistry();
});
afterAll(() => registry.close());
beforeEach(async () => {
  const { write, tables } = await server();
  await write((tx) => tx.delete(tables.limits));
});

describe('a change of address', () => {
  test.each([
    ['old', 'new'],
    ['new', 'old'],
  ])('takes effect when both have confirmed, %s first', async (first) => {
    const ada = await newcomer(`Ada ${first}`);
    const newEmail = `ada.${first}@new.example`;
    await json(ask(ada, newEmail.toUpperCase()), 202);
    const links = { old: await linkTo(ada.email), new: await linkTo(newEmail) };
    const [one, two] = first === 'old' ? [links.old, links.new] : [links.new, links.old];
    expect(await json(call('POST', '/api/account/address/preview', { json: { token: links.new } }))).toMatchObject({
      email: newEmail,
      newEmail,
      confirmed: false,
    });
    expect(await json(confirm(one))).toEqual({ done: false, newEmail });
    // Once more changes nothing: one address cannot confirm for the other.
    expect(await json(confirm(one))).toEqual({ done: false, newEmail });
    expect(await pending(ada)).toMatchObject({ newEmail, [`${first}Confirmed`]: true });
    expect(await json(ada.browser.call('GET', '/api/account'))).toMatchObject({ email: ada.email });
    expect(await json(confirm(two))).toEqual({ done: true, newEmail });
    expect(await json(ada.browser.call('GET', '/api/account'))).toMatchObject({ email: newEmail, addressChange: null });
    for (const token of [one, two]) expect((await confirm(token)).status).toBe(404);
    for (const to of [ada.email, newEmail])
      expect((await mailsTo(to, 'address-changed')).map(({ subject }) => subject)).toEqual([
        'The address of your account was changed',
      ]);
    expect(await new TestBrowser().signIn({ email: ada.email, password })).toBe('credentials');
    expect(await new TestBrowser().signIn({ email: newEmail, password })).toBeNull();
  });

  test('needs the password, and another address', async () => {
    const bea = await newcomer('Bea');
    expect(await json(ask(bea, 'bea@new.example', 'a wrong one'), 422)).toMatchObject({
      errors: [{ pointer: '#/password' }],
    });
    expect(await json(ask(bea, bea.email), 422)).toMatchObject({ errors: [{ pointer: '#/email' }] });
    expect(await mailsTo('bea@new.example')).toEqual([]);
  });

  test('to an address with an account is answered alike and changes nothing; that address is told', async () => {
    const [cy, dee] = [await newcomer('Cy'), await newcomer('Dee')];
    const free = await ask(cy, 'cy@new.example');
    const taken = await ask(cy, dee.email);
    expect([taken.status, await taken.text()]).toEqual([free.status, await free.text()]);
    expect(await pending(cy)).toMatchObject({ newEmail: dee.email, oldConfirmed: false, newConfirmed: false });
    const [mail] = await mailsTo(dee.email);
    expect(mail).toMatchObject({ kind: 'address-taken' });
    expect(mail!.text).not.toContain(cy.email);
    expect(await json(confirm(await linkTo(cy.email)))).toMatchObject({ done: false });
    expect(await new TestBrowser().signIn({ email: dee.email, password })).toBeNull();
  });

  test('to an address that got an account meanwhile changes nothing', async () => {
    const eve = await newcomer('Eve');
    const newEmail = 'late@test.example';
    await json(ask(eve, newEmail), 202);
    await newcomer('Late');
    await json(confirm(await linkTo(eve.email)));
    expect((await confirm(await linkTo(newEmail))).status).toBe(409);
    expect(await json(eve.browser.call('GET', '/api/account'))).toMatchObject({ email: eve.email });
  });

  test('lapses after a day', async () => {
    const fay = await newcomer('Fay');
    await json(ask(fay, 'fay@new.example'), 202);
    await json(confirm(await linkTo(fay.email)));
    const { write, tables } = await server();
    const past = { expiresAt: new Date(Date.now() - 1).toISOString() };
    await write((tx) => tx.update(tables.addressChanges).set(past).where(eq(tables.addressChanges.accountId, fay.id)));
    expect((await confirm(await linkTo('fay@new.example'))).status).toBe(404);
    expect(await pending(fay)).toBeNull();
  });

  test('is taken back, and replaced by a newer one', async () => {
    const gil = await newcomer('Gil');
    await json(ask(gil, 'gil@one.example'), 202);
    const older = await linkTo('gil@one.example');
    await json(ask(gil, 'gil@two.example'), 202);
    expect((await confirm(older)).status).toBe(404);
    expect(await pending(gil)).toMatchObject({ newEmail: 'gil@two.example' });
    expect((await gil.browser.call('DELETE', '/api/account/address')).status).toBe(204);
    expect((await confirm(await linkTo('gil@two.example'))).status).toBe(404);
    expect(await pending(gil)).toBeNull();
  });

  test('mails at most five an hour', async () => {
    const hal = await newcomer('Hal');
    for (let i = 0; i < 5; i++) await json(ask(hal, `hal${i}@new.example`), 202);
    expect((await ask(hal, 'hal6@new.example')).status).toBe(429);
  });

  test('of a closed account cannot be confirmed', async () => {
    const ivo = await newcomer('Ivo');
    await json(ask(ivo, 'ivo@new.example'), 202);
    const { write, tables } = await server();
    await write((tx) => tx.update(tables.accounts).set({ state: 'deactivated' }).where(eq(tables.accounts.id, ivo.id)));
    expect((await confirm(await linkTo(ivo.email))).status).toBe(404);
  });

  test('leaves invitations with the old address, and ends links to choose a password', async () => {
    const north = await lab('North');
    const lead = await newcomer('Lead', { [north]: 'lead' });
    const jo = await newcomer('Jo');
    const body = { email: jo.email, role: 'contributor' };
    await json(lead.browser.call('POST', `/api/labs/${north}/invitations`, body), 201);
    await json(call('POST', '/api/password-resets', { json: { email: jo.email } }), 202);
    await runJobs();
    const reset = await tokenInMail(jo.email, 'password-reset');
    const invitation = await tokenInMail(jo.email, 'invitation');
    await json(ask(jo, 'jo@new.example'), 202);
    for (const email of [jo.email, 'jo@new.example']) await json(confirm(await linkTo(email)));
    expect(await json(call('POST', '/api/invitations/preview', { json: { token: invitation } }))).toMatchObject({
      email: jo.email,
      hasAccount: false,
    });
    expect((await call('POST', '/api/password-resets/preview', { json: { token: reset } })).status).toBe(404);
  });

  test('shows no link in the outbox of a demo', async () => {
    const kim = await newcomer('Kim');
    await json(ask(kim, 'kim@new.example'), 202);
    const text = await (await call('GET', '/api/outbox')).text();
    expect(text).toContain('kim@new.example');
    for (const email of [kim.email, 'kim@new.example']) expect(text).not.toContain(await linkTo(email));
  });
});
