import { join } from 'node:path';
import AxeBuilder from '@axe-core/playwright';
import { createClient } from '@libsql/client';
import type { Page } from '@playwright/test';
import { expect, signIn, test } from './people.ts';

// Somebody forgets their password, sees where they are signed in, and loses a session while a page of it is open.
// People of their own, so that the demo accounts keep their password and their sessions.

const PASSWORD = 'ten small octahedra in a row';
const FRESH = 'eleven tetrahedra on a shelf';
let number = 0;

/** A new contributor, invited by the lead and signed up by the link in the mail. */
async function newPerson(page: Page, baseURL: string): Promise<string> {
  const email = `account${Date.now()}${++number}@demo.example`;
  await signIn(page, 'lead@demo.example');
  const headers = { origin: new URL(baseURL).origin };
  const labs = (await (await page.request.get('/api/labs')).json()) as { items: { id: string; role: string | null }[] };
  const own = labs.items.find(({ role }) => role === 'lead')!;
  const invitation = { email, role: 'contributor' };
  const sent = await page.request.post(`/api/labs/${own.id}/invitations`, { headers, data: invitation });
  expect(sent.status(), await sent.text()).toBe(201);
  await page.context().clearCookies();
  const outbox = (await (await page.request.get('/api/outbox')).json()) as { items: { to: string; text: string }[] };
  const token = /\/join#(?:token=)?(\S+)/.exec(outbox.items.find(({ to }) => to === email)!.text)?.[1];
  const data = { token, name: 'Demo Account', password: PASSWORD };
  const accepted = await page.request.post('/api/invitations/accept', { headers, data });
  expect(accepted.status(), await accepted.text()).toBe(200);
  return email;
}

/** The link of the latest mail of a kind to an address: the outbox leaves it out, so that it is read from the database. */
async function mailedLink(to: string, kind: string): Promise<string> {
  const client = createClient({ url: `file:${join(process.env.ZAFFRE_TEST_DATA!, 'zaffre.db')}` });
  try {
    let link: string | undefined;
    await expect(async () => {
      const sql = 'select text from mail where "to" = ? and kind = ? order by id desc limit 1';
      const { rows } = await client.execute({ sql, args: [to, kind] });
      link = /https?:\/\/\S+#\S+/.exec(String(rows[0]?.text ?? ''))?.[0];
      expect(link).toBeDefined();
    }).toPass();
    return link!;
  } finally {
    client.close();
  }
}

/** Open a page and wait until its islands listen. */
async function open(page: Page, address: string): Promise<void> {
  await page.goto(address);
  await expect(page.locator('astro-island[ssr]')).toHaveCount(0);
}

async function expectNoSeriousFault(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag22aa']).analyze();
  const serious = violations.filter(({ impact }) => impact === 'serious' || impact === 'critical');
  expect(serious.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)).toEqual([]);
}

test('a forgotten password is replaced by way of a link', async ({ page, baseURL }) => {
  const email = await newPerson(page, baseURL!);
  await open(page, '/signin');
  await page.getByRole('link', { name: 'Forgotten your password?' }).click();
  await expect(page).toHaveURL(/\/reset$/);
  await page.getByLabel('E-mail address').fill(email);
  await expectNoSeriousFault(page);
  await page.getByRole('button', { name: 'Send the link' }).click();
  await expect(page.getByText(/If this address has an account/)).toBeVisible();
  const link = await mailedLink(email, 'password-reset');

  await open(page, link);
  await expect(page.getByText(email)).toBeVisible();
  // The token is not in the address any more, and a reload still finds it.
  await expect(page).toHaveURL(/\/reset$/);
  await page.reload();
  await page.getByLabel('New password', { exact: true }).fill('zaffre cobalt spectra');
  await page.getByRole('button', { name: 'Set the new password' }).click();
  await expect(page.getByText(/guessed first/)).toBeVisible();
  await page.getByLabel('New password', { exact: true }).fill(FRESH);
  await page.getByRole('button', { name: 'Set the new password' }).click();
  await expect(page.getByText('Your password is changed.')).toBeVisible();
  await page.getByRole('link', { name: 'Sign in' }).click();
  await expect(page.getByLabel('E-mail address')).toHaveValue(email);
  await signIn(page, email, FRESH);

  await open(page, '/outbox');
  await page
    .getByRole('button', { name: /Choose a new password/ })
    .first()
    .click();
  await expect(page.getByRole('article')).toContainText('the link is left out here');
  await page.goto('about:blank');
  await open(page, link);
  await expect(page.getByRole('alert')).toContainText('does not work, or no longer');
  await page.getByRole('button', { name: 'Ask for a new link' }).click();
  await expect(page.getByRole('button', { name: 'Send the link' })).toBeVisible();
});

test('a session is seen and ended from another browser; the page open there leads back after signing in', async ({
  page,
  browser,
  baseURL,
}) => {
  const email = await newPerson(page, baseURL!);
  await signIn(page, email, PASSWORD);
  const elsewhere = await browser.newContext({ baseURL: baseURL! });
  const there = await elsewhere.newPage();
  await signIn(there, email, PASSWORD);
  await open(there, '/account');
  await there.getByRole('textbox', { name: 'Name', exact: true }).fill('Demo Renamed');

  await open(page, '/account');
  const list = page.getByRole('list', { name: 'Sessions' });
  await expect(list.getByRole('listitem')).toHaveCount(2);
  await expect(list.getByRole('listitem').first()).toContainText('this browser');
  await expectNoSeriousFault(page);
  await list.getByRole('button', { name: /^End / }).click();
  await expect(list.getByRole('listitem')).toHaveCount(1);

  await there.getByRole('button', { name: 'Save the name' }).click();
  await there.getByRole('alert').getByRole('link', { name: 'Sign in again' }).click();
  await there.getByLabel('E-mail address').fill(email);
  await there.getByLabel('Password', { exact: true }).fill(PASSWORD);
  await there.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(there).toHaveURL(/\/account$/);
  await expect(there.locator('astro-island[ssr]')).toHaveCount(0);
  await there.getByRole('textbox', { name: 'Name', exact: true }).fill('Demo Renamed');
  await there.getByRole('button', { name: 'Save the name' }).click();
  await expect(there.getByText('Saved')).toBeVisible();
  await elsewhere.close();
});

test('an address changes when both have confirmed it', async ({ page, baseURL }) => {
  const email = await newPerson(page, baseURL!);
  const newEmail = email.replace('account', 'moved');
  await signIn(page, email, PASSWORD);
  await open(page, '/account');
  const form = page.getByRole('form', { name: 'Change of address' });
  await form.getByLabel('New address').fill(newEmail);
  await form.getByLabel('Your password').fill(PASSWORD);
  await form.getByRole('button', { name: 'Ask for the change' }).click();
  await expect(page.getByText('has still to confirm')).toHaveCount(2);
  for (const [address, told] of [
    [email, 'This address has confirmed.'],
    [newEmail, `The account has the address ${newEmail} now.`],
  ] as const) {
    await page.goto('about:blank');
    await open(page, await mailedLink(address, 'address-change'));
    await expect(page.getByText(newEmail).first()).toBeVisible();
    await page.getByRole('button', { name: 'Confirm the change' }).click();
    await expect(page.getByText(told)).toBeVisible();
  }
  await page.getByRole('link', { name: 'Your account' }).click();
  await expect(page.getByText(`You sign in as ${newEmail}.`)).toBeVisible();
});
