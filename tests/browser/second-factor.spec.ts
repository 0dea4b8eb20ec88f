import AxeBuilder from '@axe-core/playwright';
import type { BrowserContext, Page } from '@playwright/test';
import { Secret, TOTP } from 'otpauth';
import { expect, signIn, test } from './people.ts';

// Somebody sets up an authenticator app and a passkey, signs in with each and with a recovery code, and removes them.
// A person of their own, so that the demo accounts go on signing in by password alone.

const PASSWORD = 'ten small octahedra in a row';
const EMAIL = 'second.factor@demo.example';

/** The code that the app shows, `steps` of 30 s from now. */
const codeOf = (base32: string, steps = 0) =>
  TOTP.generate({
    secret: Secret.fromBase32(base32.replace(/\s/g, '')),
    timestamp: Date.now() + steps * 30_000,
  });

/** A new contributor, invited by the lead and signed up by the link in the mail. */
async function newPerson(page: Page, origin: string): Promise<void> {
  await signIn(page, 'lead@demo.example');
  const headers = { origin };
  const labs = (await (await page.request.get('/api/labs')).json()) as { items: { id: string; role: string | null }[] };
  const own = labs.items.find(({ role }) => role === 'lead');
  const invitation = { email: EMAIL, role: 'contributor' };
  const sent = await page.request.post(`/api/labs/${own!.id}/invitations`, { headers, data: invitation });
  expect(sent.status(), await sent.text()).toBe(201);
  await page.context().clearCookies();
  const outbox = (await (await page.request.get('/api/outbox')).json()) as { items: { to: string; text: string }[] };
  const token = /\/join#(?:token=)?(\S+)/.exec(outbox.items.find(({ to }) => to === EMAIL)!.text)?.[1];
  const acceptance = { token, name: 'Demo Second Factor', password: PASSWORD };
  const accepted = await page.request.post('/api/invitations/accept', { headers, data: acceptance });
  expect(accepted.status(), await accepted.text()).toBe(200);
}

/** Address and password, after which the page asks for the second factor. */
async function showPassword(context: BrowserContext, page: Page): Promise<void> {
  await context.clearCookies();
  await page.goto('/signin');
  // Enabled once the form listens: what is typed before that may be lost.
  await expect(page.getByRole('button', { name: /fill in guest/ })).toBeEnabled();
  await page.getByLabel('E-mail address').fill(EMAIL);
  await page.getByLabel('Password', { exact: true }).fill(PASSWORD);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(page.getByLabel('Code', { exact: true })).toBeVisible();
}

async function signInByCode(context: BrowserContext, page: Page, code: string): Promise<void> {
  await showPassword(context, page);
  await page.getByLabel('Code', { exact: true }).fill(code);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(page).not.toHaveURL(/signin/);
}

async function nameAndPassword(page: Page, name: string): Promise<void> {
  const dialog = page.getByRole('dialog');
  await dialog.getByLabel('Name').fill(name);
  await dialog.getByLabel('Your password').fill(PASSWORD);
  await dialog.getByRole('button', { name: 'Continue' }).click();
}

async function expectNoSeriousFault(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag22aa']).analyze();
  const serious = violations.filter(({ impact }) => impact === 'serious' || impact === 'critical');
  expect(serious.map(({ id, nodes }) => `${id}: ${nodes[0]?.html}`)).toEqual([]);
}

test('an authenticator app, a passkey and recovery codes', async ({ page, context, baseURL }) => {
  test.setTimeout(180_000);
  await newPerson(page, new URL(baseURL!).origin);
  await signIn(page, EMAIL, PASSWORD);
  await page.goto('/account');
  const list = page.getByRole('list', { name: 'Your second factors' });
  let secret = '';
  let codes: string[] = [];

  await test.step('an app is set up by its first code, and brings recovery codes', async () => {
    await page.getByRole('button', { name: 'Add an authenticator app' }).click();
    await nameAndPassword(page, 'Phone');
    const dialog = page.getByRole('dialog');
    await expect(dialog.getByRole('img', { name: /QR code/ })).toBeVisible();
    secret = (await dialog.locator('code').textContent()) ?? '';
    await expectNoSeriousFault(page);
    await dialog.getByLabel('Code of the app').fill('000000');
    await dialog.getByRole('button', { name: 'Confirm' }).click();
    await expect(dialog.getByRole('alert')).toContainText('The code does not fit');
    await dialog.getByLabel('Code of the app').fill(codeOf(secret));
    await dialog.getByRole('button', { name: 'Confirm' }).click();
    const shown = page.getByRole('region', { name: 'Your recovery codes' });
    codes = ((await shown.locator('code').textContent()) ?? '').split(/\s+/).filter((code) => code !== '');
    expect(codes).toHaveLength(10);
    const download = page.waitForEvent('download');
    await shown.getByRole('button', { name: 'Download as text' }).click();
    expect((await download).suggestedFilename()).toBe('zaffre-recovery-codes.txt');
    await expectNoSeriousFault(page);
    await shown.getByRole('button', { name: 'I have kept them' }).click();
    await expect(shown).toBeHidden();
    await expect(list).toContainText('Phone');
  });

  await test.step('a code of the app signs in', async () => {
    // The code of the present step confirmed the app, and none is taken twice: the next one it is.
    await signInByCode(context, page, codeOf(secret, 1));
  });

  await test.step('a passkey is set up', async () => {
    const browser = await context.newCDPSession(page);
    await browser.send('WebAuthn.enable');
    await browser.send('WebAuthn.addVirtualAuthenticator', {
      options: {
        protocol: 'ctap2',
        transport: 'internal',
        hasResidentKey: true,
        hasUserVerification: true,
        isUserVerified: true,
        automaticPresenceSimulation: true,
      },
    });
    await page.goto('/account');
    await page.getByRole('button', { name: 'Add a passkey' }).click();
    await nameAndPassword(page, 'Laptop');
    await expect(list).toContainText('Laptop');
  });

  await test.step('the passkey signs in', async () => {
    await showPassword(context, page);
    await page.getByRole('button', { name: 'Use a passkey' }).click();
    await expect(page).not.toHaveURL(/signin/);
  });

  await test.step('a recovery code signs in, once', async () => {
    await signInByCode(context, page, codes[0]!);
    await showPassword(context, page);
    await page.getByLabel('Code', { exact: true }).fill(codes[0]!);
    await page.getByRole('button', { name: 'Sign in', exact: true }).click();
    await expect(page.getByRole('alert')).not.toBeEmpty();
    await signInByCode(context, page, codes[1]!);
    await page.goto('/account');
    await expect(page.getByText('8 of 10 recovery codes left')).toBeVisible();
  });

  await test.step('both are removed with the password', async () => {
    for (const name of ['Phone', 'Laptop']) {
      await page.getByRole('button', { name: `Remove ${name}` }).click();
      const dialog = page.getByRole('dialog');
      await dialog.getByLabel('Your password').fill(PASSWORD);
      await dialog.getByRole('button', { name: 'Remove', exact: true }).click();
      await expect(page.getByRole('button', { name: `Remove ${name}` })).toBeHidden();
    }
    await expect(page.getByText('your password alone signs you in')).toBeVisible();
  });
});
