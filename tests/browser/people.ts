import { type BrowserContext, test as base, expect, type Page } from '@playwright/test';

/** The published password of the demo accounts. */
const PASSWORD = 'cobalt-blue-demo';

/** Console errors that belong to an answer which the test asked for: a page that is not there, a refused request. */
const EXPECTED = /Failed to load resource: the server responded with a status of (?:40[134]|422)/;

/** Every page complains to a list; at the end of the test it must be empty. That holds the CSP, too. */
export const test = base.extend<{ complaints: string[] }>({
  complaints: [
    async ({ context }, use) => {
      const complaints: string[] = [];
      const listen = (page: Page) => {
        page.on('console', (message) => {
          if (message.type() === 'error' && !EXPECTED.test(message.text()))
            complaints.push(`${page.url()}: ${message.text()}`);
        });
        page.on('pageerror', (error) => complaints.push(`${page.url()}: ${error.message}`));
      };
      context.on('page', listen);
      for (const page of context.pages()) listen(page);
      await use(complaints);
      expect(complaints).toEqual([]);
    },
    { auto: true },
  ],
});
export { expect };

/** Sign in as a person would. */
export async function signIn(page: Page, email: string, password = PASSWORD): Promise<void> {
  await page.goto('/signin');
  await page.getByLabel('E-mail address').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(page).not.toHaveURL(/signin/);
}

/** Become somebody else in the same browser. */
export async function changePerson(
  context: BrowserContext,
  page: Page,
  email: string,
  password?: string,
): Promise<void> {
  await context.clearCookies();
  await signIn(page, email, password);
}
