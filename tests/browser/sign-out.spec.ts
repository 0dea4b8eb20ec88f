import type { Page } from '@playwright/test';
import { expect, signIn, test } from './people.ts';

/** What forms kept in this tab, by name. */
const drafts = (page: Page) =>
  page.evaluate(() => Object.keys(sessionStorage).filter((name) => name.startsWith('zaffre-draft:')));
const form = async (page: Page) => {
  await page.goto('/complexes/new');
  await expect(page.locator('astro-island[ssr]')).toHaveCount(0);
  return page.getByLabel(/^Formula/);
};

test('what was typed survives a reload, is for its writer alone, and leaves every tab with the sign-out', async ({
  page,
  context,
}) => {
  await signIn(page, 'contributor@demo.example');
  await (await form(page)).fill('[Ni(bpy)3]2+');
  await expect(await form(page)).toHaveValue('[Ni(bpy)3]2+');

  // Somebody else in the same tab, as after a session that ran out.
  await context.clearCookies();
  await signIn(page, 'lead@demo.example');
  await expect(await form(page)).toHaveValue('');
  await (await form(page)).fill('[Co(en)3]3+');
  expect(await drafts(page)).toHaveLength(1);

  const other = await context.newPage();
  await (await form(other)).fill('[Cr(acac)3]');
  await other.locator('header summary').click();
  await other.getByRole('button', { name: 'Sign out' }).click();
  await expect(other).toHaveURL(/\/signin$/);
  await expect(page).toHaveURL(/\/signin$/);
  for (const tab of [page, other]) expect(await drafts(tab)).toEqual([]);
});
