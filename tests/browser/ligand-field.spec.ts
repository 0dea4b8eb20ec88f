import AxeBuilder from '@axe-core/playwright';
import type { Locator } from '@playwright/test';
import { expect, signIn, test } from './people.ts';

const WIDE = 90_000;

/** The heading of a panel that waits makes way for that of the panel itself. */
const scrollTo = (heading: Locator) => expect(() => heading.scrollIntoViewIfNeeded({ timeout: 2000 })).toPass();

test('sliders move the marks, a fit is saved and is there after a reload', async ({ page }) => {
  test.setTimeout(WIDE);
  await signIn(page, 'contributor@demo.example');
  const { items } = (await (await page.request.get('/api/complexes?metal=Cr&dCount=3&limit=50')).json()) as {
    items: { accession: string; formula: string; strip: { class: string }[] }[];
  };
  const chromium = items.find(({ strip }) => strip.filter((band) => band.class === 'd-d').length >= 2)!;
  await page.goto(`/complexes/${chromium.accession}`);
  const heading = page.getByRole('heading', { name: 'Level diagram' });
  await scrollTo(heading);
  const panel = page.locator('section', { has: heading }).last();
  await expect(panel.getByRole('group', { name: /Candidates/ })).toBeVisible();
  const line = panel.locator('line[data-at]');
  const before = await line.getAttribute('data-at');
  const marks = panel.locator('circle[data-band]');
  await expect(marks.first()).toBeVisible();
  const height = await marks.first().getAttribute('cy');

  await panel.getByRole('slider', { name: /Racah parameter B/ }).focus();
  for (let i = 0; i < 40; i++) await page.keyboard.press('ArrowLeft');
  await expect(line).not.toHaveAttribute('data-at', before!);
  await expect(marks.first()).not.toHaveAttribute('cy', height!);

  await panel.getByLabel('Note to the fit').fill('browser fit');
  await panel.getByRole('button', { name: 'Save the fit' }).click();
  await expect(panel.getByText('The fit is saved')).toBeVisible();
  await page.reload();
  await scrollTo(heading);
  await expect(page.getByRole('region', { name: 'Saved fits' }).getByText('browser fit').first()).toBeVisible();

  const { violations } = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag22aa']).analyze();
  expect(violations.filter(({ impact }) => impact === 'serious' || impact === 'critical').map(({ id }) => id)).toEqual(
    [],
  );
});

test('the diagram page reads out by keyboard, keeps its state in the address, and gives its drawing away', async ({
  page,
}) => {
  test.setTimeout(WIDE);
  await signIn(page, 'guest@demo.example');
  await page.goto('/levels?n=8&at=10');
  const slider = page.getByRole('slider', { name: 'Δ/B', exact: true });
  await expect(page.getByRole('region', { name: 'Levels at the line' }).getByRole('row')).not.toHaveCount(1);
  await slider.focus();
  await page.keyboard.press('ArrowRight');
  await expect(page).toHaveURL(/at=10\.1/);
  const download = page.waitForEvent('download');
  await page.getByRole('button', { name: 'Download SVG' }).click();
  expect((await download).suggestedFilename()).toBe('levels-d8-OC-6.svg');
});

test('a plan gives bands and a dilution', async ({ page }) => {
  test.setTimeout(WIDE);
  await signIn(page, 'contributor@demo.example');
  await page.goto('/plan');
  await page.getByLabel(/^Formula/).fill('[CoCl(NH3)5]Cl2');
  const dilution = page.locator('section', { has: page.getByRole('heading', { name: 'Dilution plan' }) }).last();
  await expect(dilution.getByRole('row')).not.toHaveCount(0);
  await page.getByLabel('Lowest absorbance').fill('2');
  await expect(page.getByText('The highest absorbance must be above the lowest.')).toBeVisible();
});
