import type { Browser, BrowserContext, Page } from '@playwright/test';
import { expect, signIn, test } from './people.ts';

// Sharing as its people live it: a list of guests is invited, one of them loses access while a page lies open, asks for
// it again, and gets it.

const PASSWORD = 'a kiln is not a furnace';
const HAD = 'i.sol@glaze.example';
const NEVER = 'o.berg@glaze.example';

test('a guest whose access ends while a page lies open sees no more of it, is told whom to ask, and asks', async ({
  page,
  browser,
}) => {
  test.setTimeout(120_000);
  let folio = '';
  let accession = '';

  await test.step('the lead pastes a list of guests; a bad entry is marked, and nothing typed is lost', async () => {
    await signIn(page, 'lead@demo.example');
    accession = await openAccession(page);
    folio = await makeFolio(page, accession);
    await open(page, `/folios/${folio}`);
    const form = page.getByRole('form', { name: 'Invite a guest' });
    const box = form.getByRole('textbox', { name: 'E-mail addresses' });
    await box.fill(`Ida Sol <${HAD}>; o.berg@glaze`);
    await form.getByRole('button', { name: 'Invite', exact: true }).click();
    await expect(form.getByText('"o.berg@glaze" is not an e-mail address')).toBeVisible();
    await expect(box).toHaveValue(`Ida Sol <${HAD}>; o.berg@glaze`);
    await box.fill(`Ida Sol <${HAD}>; ${NEVER}`);
    await form.getByRole('button', { name: 'Invite', exact: true }).click();
    await expect(page.getByText('2 invitations are on their way')).toBeVisible();
    await expect(box).toHaveValue('');
  });

  const guest = await another(browser, page);
  await test.step('the guest sees the terms and accepts them', async () => {
    await open(guest, await linkTo(guest, HAD));
    await expect(guest.getByRole('heading', { name: 'Terms' })).toBeVisible();
    await expect(guest.getByRole('link', { name: /CC BY 4\.0/ })).toBeVisible();
    await expect(guest.getByText(/is recorded/)).toBeVisible();
    await guest.getByLabel('Your name').fill('Ida Sol');
    await guest.getByLabel('New password').fill(PASSWORD);
    await guest.getByRole('button', { name: 'Make the account and accept the terms' }).click();
    await expect(guest).toHaveURL(new RegExp(`/folios/${folio}`));
    await expect(guest.getByRole('link', { name: accession })).toBeVisible();
  });

  await test.step('access ends while the page lies open: its content goes from the screen', async () => {
    await open(page, `/folios/${folio}`);
    await page.getByRole('button', { name: `Revoke ${HAD}` }).click();
    await page.getByRole('dialog').getByRole('button', { name: 'Revoke' }).click();
    await expect(page.getByText('Access that ended (1)')).toBeVisible();
    // As when one comes back to the tab.
    await guest.evaluate(() => document.dispatchEvent(new Event('visibilitychange')));
    await expect(guest.getByRole('heading', { name: 'Your access ended' })).toBeVisible();
    await expect(guest.getByText(accession)).toHaveCount(0);
  });

  await test.step('a visit later tells the same; what never was theirs is not told apart', async () => {
    expect(await open(guest, `/folios/${folio}`)).toBe(404);
    await expect(guest.getByText('Your access to “Shared for a while” ended on')).toBeVisible();
    await expect(guest.getByText('can renew it')).toBeVisible();
    await guest.goto('/');
    await expect(guest.getByRole('link', { name: 'Ask for access to Shared for a while again' })).toBeVisible();
    expect((await guest.goto('/folios/00000000-0000-7000-8000-000000000000'))!.status()).toBe(404);
    await expect(guest.getByText('There is nothing here that you may see')).toBeVisible();
    const stranger = await another(browser, page);
    await signIn(stranger, 'guest@demo.example');
    expect((await stranger.goto(`/folios/${folio}`))!.status()).toBe(404);
    await expect(stranger.getByText('There is nothing here that you may see')).toBeVisible();
    await expect(stranger.getByText('Shared for a while')).toHaveCount(0);
    await stranger.context().close();
  });

  await test.step('the guest asks, and the lead grants it', async () => {
    await open(guest, `/folios/${folio}`);
    await guest.getByLabel('Why, in your words').fill('One more series to compare');
    await guest.getByRole('button', { name: 'Send to the lab' }).click();
    await expect(guest.getByText('The leads of the lab were told by mail')).toBeVisible();
    await page.goto('/');
    const waiting = page.getByRole('region', { name: 'Guests ask for more' });
    await expect(waiting.getByText('Ida Sol asks for a longer time')).toBeVisible();
    await waiting.getByRole('link', { name: 'Shared for a while' }).click();
    await expect(page.getByText('One more series to compare')).toBeVisible();
    await page.getByLabel('Answer to Ida Sol').fill('With pleasure');
    await page.getByRole('button', { name: 'Grant', exact: true }).click();
    await expect(page.getByText('Ida Sol was told by mail: granted.')).toBeVisible();
    await guest.goto(`/folios/${folio}`);
    await expect(guest.getByRole('link', { name: accession })).toBeVisible();
    await guest.context().close();
  });
});

/** Go to a page and wait until its islands answer: what is clicked before is lost. */
async function open(page: Page, path: string): Promise<number> {
  const response = await page.goto(path);
  await expect(page.locator('astro-island[ssr]')).toHaveCount(0);
  return response?.status() ?? 0;
}

/** A person in a browser of their own. */
async function another(browser: Browser, page: Page): Promise<Page> {
  const context: BrowserContext = await browser.newContext({
    baseURL: new URL(page.url()).origin,
    locale: 'en-GB',
    timezoneId: 'UTC',
  });
  return context.newPage();
}

async function openAccession(page: Page): Promise<string> {
  const { items } = (await (await page.request.get('/api/complexes?state=registered&limit=1')).json()) as {
    items: { accession: string }[];
  };
  return items[0]!.accession;
}

async function makeFolio(page: Page, accession: string): Promise<string> {
  const labs = (await (await page.request.get('/api/labs')).json()) as { items: { id: string; role: string | null }[] };
  const answer = await page.request.post('/api/folios', {
    headers: { origin: new URL(page.url()).origin },
    data: {
      name: 'Shared for a while',
      lab: labs.items.find(({ role }) => role === 'lead')!.id,
      licence: 'CC-BY-4.0',
      items: [{ accession }],
    },
  });
  expect(answer.status(), await answer.text()).toBe(201);
  return ((await answer.json()) as { id: string }).id;
}

/** The link in the mail to an address, as the open outbox of the demo shows it. */
async function linkTo(page: Page, email: string): Promise<string> {
  const { items } = (await (await page.request.get('/api/outbox?limit=500')).json()) as {
    items: { to: string; text: string }[];
  };
  const mail = items.find(({ to, text }) => to === email && text.includes('/join#'));
  return /\S+\/join#\S+/.exec(mail!.text)![0];
}
