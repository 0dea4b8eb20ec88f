import { changePerson, expect, signIn, test } from './people.ts';

// A spectrum of two bands of Cr(III) is fitted, touched by keys, taken over and found on record as it was left.

/** ε of two Gaussians (invented), with a chirp in place of noise, as delimited text. */
function spectrumFile(): string {
  const gaussian = (x: number, at: number, height: number, fwhm: number) =>
    height * Math.exp(-4 * Math.LN2 * ((x - at) / fwhm) ** 2);
  const rows = Array.from({ length: 241 }, (_, i) => {
    const x = 15_000 + 75 * i;
    const y = gaussian(x, 21_550, 40.1, 3600) + gaussian(x, 28_500, 33.4, 4100) + 0.02 * Math.sin(i * i);
    return `${x},${y.toFixed(5)}`;
  });
  return [`wavenumber / cm-1,epsilon / dm3 mol-1 cm-1`, ...rows].join('\n');
}

test('bands are fitted, locked, moved by keys, taken back, taken over, and stand on record as fitted', async ({
  page,
  context,
}) => {
  test.setTimeout(120_000);
  await signIn(page, 'contributor@demo.example');
  const complexes = await (await page.request.get('/api/complexes?limit=1')).json();
  const { accession } = complexes.items[0];
  const sent = await page.request.post('/api/spectra', {
    headers: { origin: new URL(page.url()).origin },
    multipart: {
      file: { name: 'fit.csv', mimeType: 'text/csv', buffer: Buffer.from(spectrumFile()) },
      metadata: JSON.stringify({
        complex: accession,
        technique: 'solution',
        solvent: 'water',
        bandwidth: 1,
        xUnit: 'cm-1',
        yUnit: 'epsilon',
        synthetic: true,
        title: 'Two bands to be fitted',
      }),
    },
  });
  expect(sent.status(), await sent.text()).toBe(201);
  const { id } = await sent.json();
  await page.goto(`/spectra/${id}`);
  const fit = page.getByRole('region', { name: 'Fit', exact: true });
  const position = (component: number) => fit.getByLabel(`position of component ${component}`, { exact: true });

  await test.step('the criterion finds two bands', async () => {
    await page.getByRole('button', { name: 'Fit bands' }).click();
    await fit.getByRole('button', { name: 'Find and fit bands' }).click();
    await expect(position(2)).toHaveValue(/^2850\d|^2849\d/);
    await expect(position(1)).toHaveValue(/^2155\d|^2154\d/);
    await expect(position(3)).toHaveCount(0);
    await expect(fit.getByText(/^2 Gaussians, rms/)).toBeVisible();
    await expect(fit.getByRole('img', { name: /^Residual, curve minus fit/ })).toBeVisible();
  });

  await test.step('keys move a component, and a step taken back brings its errors again', async () => {
    const before = await position(1).inputValue();
    await fit.getByRole('slider', { name: 'Component 1: position and height' }).press('Shift+ArrowRight');
    await expect(position(1)).toHaveValue(String(Math.round(Number(before)) + 100));
    await expect(fit.getByText(/Changed since the last fit/)).toBeVisible();
    await fit.getByRole('button', { name: 'Undo' }).click();
    await expect(position(1)).toHaveValue(before);
    await expect(fit.getByText(/Changed since the last fit/)).toHaveCount(0);
  });

  await test.step('a pointer drags a side, and a lock holds its part through a fit', async () => {
    const side = fit.getByRole('slider', { name: 'Component 1: width, upper side' });
    const width = fit.getByLabel('width of component 1', { exact: true });
    const before = Number(await width.inputValue());
    const box = (await side.boundingBox())!;
    await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
    await page.mouse.down();
    await page.mouse.move(box.x + box.width / 2 + 30, box.y + box.height / 2, { steps: 4 });
    await page.mouse.up();
    await expect.poll(async () => Number(await width.inputValue())).toBeGreaterThan(before + 500);
    await position(1).fill('21600');
    await position(1).press('Enter');
    await fit.getByRole('button', { name: 'Lock position of component 1', exact: true }).click();
    await fit.getByRole('button', { name: 'Fit from these components' }).click();
    await expect(fit.getByText(/^2 Gaussians, rms/)).toBeVisible();
    await expect(position(1)).toHaveValue('21600');
    await expect.poll(async () => Math.abs(Number(await width.inputValue()) - 3600)).toBeLessThan(60);
  });

  await test.step('what was done is here after a reload', async () => {
    await page.reload();
    await page.getByRole('button', { name: 'Fit bands' }).click();
    await expect(position(1)).toHaveValue('21600');
    await expect(fit.getByRole('button', { name: 'Lock position of component 1', exact: true })).toHaveAttribute(
      'aria-pressed',
      'true',
    );
    await fit.getByRole('button', { name: 'Lock position of component 1', exact: true }).click();
    await fit.getByRole('button', { name: 'Fit from these components' }).click();
    await expect(position(1)).toHaveValue(/^2155\d|^2154\d/);
  });

  let wavenumbers: number[] = [];
  await test.step('the components become the band list and are saved with their history', async () => {
    await fit.getByRole('button', { name: 'Take over as bands' }).click();
    await page.getByRole('button', { name: 'Save bands' }).click();
    await expect(page.getByText('Saved', { exact: true }).first()).toBeVisible();
    await page.reload();
    await expect(
      page
        .getByRole('region', { name: 'Bands' })
        .getByText(/21.5[45]\d/)
        .first(),
    ).toBeVisible();
    const stored = await (await page.request.get(`/api/spectra/${id}`)).json();
    wavenumbers = stored.bands.map((band: { wavenumber: number }) => band.wavenumber);
    expect(stored.bands.map((band: { found: string }) => band.found)).toEqual(['fitted', 'fitted']);
    // A tenth of 1 nm at 21 550 cm⁻¹ is 4.6 cm⁻¹; the fit comes on top.
    for (const { uncertainty } of stored.bands) expect(uncertainty).toBeGreaterThan(4.6);
    expect(stored.fit.steps.map((step: { operation: string }) => step.operation)).toContain('lock');
  });

  await test.step('another person makes the same steps and gets the same numbers', async () => {
    await changePerson(context, page, 'lead@demo.example');
    await page.goto(`/spectra/${id}`);
    await page.getByRole('button', { name: 'Fit bands' }).click();
    await fit.getByRole('button', { name: 'Make these steps again' }).click();
    await expect(position(1)).toHaveValue(String(wavenumbers[0]));
    await expect(position(2)).toHaveValue(String(wavenumbers[1]));
  });
});
