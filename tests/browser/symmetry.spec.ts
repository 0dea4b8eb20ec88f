import AxeBuilder from '@axe-core/playwright';
import { expect, signIn, test } from './people.ts';

// The symmetry page by keyboard and address, and why the bands of a complex of the demo are weak.

const RULES = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
/** Until the page listens, a press is only what the browser makes of it. */
const listening = (page: import('@playwright/test').Page) => expect(page.locator('astro-island[ssr]')).toHaveCount(0);
/** The heading of a panel that waits makes way for that of the panel itself. */
const scrollTo = (page: import('@playwright/test').Page, name: RegExp) =>
  expect(() => page.getByRole('heading', { name }).scrollIntoViewIfNeeded({ timeout: 2000 })).toPass();
/** Text as it is read, without the spaces that only part its pieces. */
const squeezed = (text: string | null) => (text ?? '').replace(/\s+/g, ' ').trim();

test('a guest multiplies, descends and judges, and the address brings all of it back', async ({ page }) => {
  test.setTimeout(120_000);
  await signIn(page, 'guest@demo.example');
  await page.getByRole('navigation', { name: 'Main' }).getByRole('link', { name: 'Symmetry' }).click();
  await expect(page.getByRole('heading', { name: /Character table of/ })).toContainText('Oh');
  await listening(page);

  await test.step('another group by keyboard', async () => {
    await page.getByRole('navigation', { name: 'Point groups' }).getByRole('link', { name: 'D4h' }).focus();
    await page.keyboard.press('Enter');
    await expect(page).toHaveURL(/group=D4h/);
    const table = page.getByRole('region', { name: 'Character table of D4h' });
    await expect(table.getByRole('row')).toHaveCount(11);
    await page.getByLabel('Double group').check();
    // Four half-integer irreps of D4h: Γ6 and Γ7 of either parity.
    await expect(table.getByRole('row')).toHaveCount(15);
  });

  await test.step('the antisymmetric square of Eg is A2g', async () => {
    const products = page.getByRole('region', { name: 'Products' });
    await products.getByRole('button', { name: 'Multiply by Eg', exact: true }).click();
    await products.getByRole('button', { name: 'Multiply by Eg', exact: true }).click();
    await expect(products.getByRole('status')).toHaveText('Γ = A1g + A2g + B1g + B2g');
    await products.getByRole('radio', { name: 'antisymmetric', exact: true }).check({ force: true });
    await expect(products.getByRole('status')).toHaveText('Γ = A2g');
  });

  await test.step('D2h through the other axes changes B1g and B2g', async () => {
    await scrollTo(page, /^Descent/);
    const descent = page.getByRole('region', { name: /^Descent/ });
    await descent.getByRole('radio', { name: 'D2h' }).check({ force: true });
    const row = (irrep: string) =>
      descent.getByRole('row').filter({ has: page.getByRole('rowheader', { name: irrep }) });
    await expect(row('B 1g').getByRole('cell')).toHaveText('Ag');
    await descent.getByRole('radio', { name: /C 2 double prime/ }).check({ force: true });
    await expect(row('B 1g').getByRole('cell')).toHaveText('B1g');
    await expect(row('B 2g').getByRole('cell')).toHaveText('Ag');
  });

  await test.step('what was chosen stands in the address', async () => {
    await page.goto(page.url());
    await expect(page.getByRole('region', { name: 'Products' }).getByRole('status')).toHaveText('Γ = A2g');
    await scrollTo(page, /^Descent/);
    await expect(page.getByRole('radio', { name: /C 2 double prime/ })).toBeChecked();
    await expect(page.getByLabel('Double group')).toBeChecked();
  });
});

test('vibrations: arrows rest for who asked for little motion, atoms may be pasted, and the group is found', async ({
  page,
}) => {
  test.setTimeout(120_000);
  await page.emulateMedia({ reducedMotion: 'reduce' });
  await signIn(page, 'contributor@demo.example');
  await page.goto('/symmetry');
  await listening(page);
  await scrollTo(page, /^Vibrations$/);
  const panel = page.getByRole('region', { name: 'Vibrations', exact: true });
  await expect(panel.getByRole('button', { name: 'Play' })).toBeVisible();
  await panel.getByRole('button', { name: 'Show T2u, partner 1' }).click();
  await expect(panel.getByRole('img')).toHaveAccessibleName(/Vibration T2u, bend\. Displacements: A\d/);
  await expect(page).toHaveURL(/mode=T2u\.0\.0/);
  await panel.getByRole('button', { name: 'Play' }).click();
  await expect(panel.getByRole('button', { name: 'Pause' })).toBeVisible();

  await panel.getByRole('radio', { name: 'coordinates' }).check({ force: true });
  await panel.getByLabel(/^Atoms, one a line/).fill('Pt 0 0 0\nCl 2.3 0 0\nCl -2.3 0 0\nCl 0 2.3 0\nCl 0 -2.3');
  await expect(panel.getByText('Line 5, “Cl 0 -2.3”: three numbers in Å must follow')).toBeVisible();
  await panel.getByLabel(/^Atoms, one a line/).fill('Pt 0 0 0\nCl 2.3 0 0\nCl -2.3 0 0\nCl 0 2.3 0\nCl 0 -2.3 0.08');
  await expect(panel.getByRole('button', { name: /^Go to/ })).toContainText('D4h');
  await panel.getByLabel('Tolerance / Å').fill('0.01');
  await expect(panel.getByRole('button', { name: /^Go to/ })).not.toContainText('D4h');
  await panel.getByRole('button', { name: /^Go to/ }).click();
  await expect(page.getByRole('heading', { name: /Character table of/ })).not.toContainText('Oh');
  const { violations } = await new AxeBuilder({ page }).withTags(RULES).analyze();
  expect(violations.filter(({ impact }) => impact === 'serious' || impact === 'critical')).toEqual([]);
});

test('a complex tells why its strongest d–d band is weak, in the group that is chosen, and lists all transitions', async ({
  page,
}) => {
  test.setTimeout(120_000);
  await signIn(page, 'contributor@demo.example');
  const found = await page.request.get('/api/complexes?metal=Cr&limit=100');
  const { items } = (await found.json()) as { items: { accession: string; formula: string }[] };
  const { accession } = items.find(({ formula }) => formula === '[Cr(en)3]3+')!;
  await page.goto(`/complexes/${accession}`);
  await scrollTo(page, /^Why/);
  const panel = page.getByRole('region', { name: /^Why this band is weak/ });
  const steps = panel.getByRole('listitem');
  await expect(steps.first()).toContainText('Spin: quartet to quartet, allowed.');

  await panel.getByRole('radio', { name: /donor set/ }).check({ force: true });
  await expect(steps.filter({ hasText: 'Laporte' })).toContainText(
    'g to g in Oh, which has a centre of inversion: forbidden.',
  );
  await expect(steps.filter({ hasText: 'Vibronic' })).toContainText('lend intensity');
  await expect(steps.filter({ hasText: 'Strength' })).toContainText('lies in the usual range of its class');

  await panel.getByRole('radio', { name: /framework/ }).check({ force: true });
  await expect(steps.filter({ hasText: 'Laporte' })).toContainText(
    'has no centre of inversion, so the rule has no meaning here',
  );

  const all = page.getByRole('region', { name: 'All transitions' }).first();
  const download = page.waitForEvent('download');
  await all.getByRole('button', { name: 'CSV' }).click();
  expect((await download).suggestedFilename()).toBe(`${accession}-transitions.csv`);
  await all.getByRole('button', { name: 'Explain 2Eg' }).click();
  await expect(
    page
      .getByRole('region', { name: /^Why this transition is weak/ })
      .getByRole('listitem')
      .first(),
  ).toContainText('quartet to doublet, forbidden');

  const label = page.getByRole('region', { name: 'Specimen label' });
  await label.getByRole('link', { name: 'Group D3 on the symmetry page' }).click();
  await expect(page).toHaveURL(/\/symmetry\?group=D3$/);
  expect(squeezed(await page.getByRole('heading', { name: /Character table of/ }).textContent())).toContain('D3');
});

test('a complex without d–d transitions says in words why', async ({ page }) => {
  await signIn(page, 'contributor@demo.example');
  const found = await page.request.get('/api/complexes?metal=Mn&limit=100');
  const { items } = (await found.json()) as { items: { accession: string; formula: string }[] };
  const { accession } = items.find(({ formula }) => formula === '[MnO4]-')!;
  await page.goto(`/complexes/${accession}`);
  await scrollTo(page, /^Why/);
  await expect(page.getByText(/centre has no d–d transitions: its d shell is empty/)).toBeVisible();
});
