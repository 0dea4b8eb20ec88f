import { execFileSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { readZip } from '../api/read-zip.ts';
import { decimalCommaFile, jcampFile } from './files.ts';
import { changePerson, expect, signIn, test } from './people.ts';

// The main job from end to end, as its people do it: register, measure, share, join, find, take away, and nothing else.

const GUEST = 'n.varga@glaze.example';
const GUEST_PASSWORD = 'a kiln is not a furnace';

test('a contributor registers and measures, a lead shares, a guest finds and takes away what was shared and nothing else', async ({
  page,
  context,
}) => {
  test.setTimeout(180_000);
  let accession = '';
  let folio = '';

  await test.step('the contributor registers a salt; everything derivable is derived', async () => {
    await signIn(page, 'contributor@demo.example');
    await page.goto('/complexes/new');
    await page.getByLabel(/^Formula/).fill('K3[Cr(C2O4)3]·3H2O');
    const main = page.getByRole('main');
    await expect(main.getByText('Cr(III)').first()).toBeVisible();
    await expect(main.getByText('d3', { exact: true }).first()).toBeVisible();
    await expect(main.getByText('487.39')).toBeVisible();
    await expect(page.getByRole('radio', { name: /^octahedral/ })).toBeChecked();
    // Derived facts are not typed: the only fields are the formula and a person's own choices.
    await expect(page.getByRole('textbox', { name: /d-count|oxidation|metal|mass/i })).toHaveCount(0);
    await page.getByText('Yes, label it').click();
    await page.getByLabel('Label of the preparation').fill('NQ-301');
    await page.getByRole('button', { name: 'Register', exact: true }).click();
    await expect(page).toHaveURL(/\/complexes\/ZF\d{6}-[0-9A-Z]$/);
    accession = page.url().split('/').pop()!;
    await expect(page.getByText('NQ-301').first()).toBeVisible();
  });

  await test.step('the same ion written otherwise is found to be here', async () => {
    await page.goto('/complexes/new');
    await page.getByLabel(/^Formula/).fill('[Cr(ox)3]^3-');
    await expect(page.getByRole('link', { name: accession }).first()).toBeVisible();
  });

  for (const { name, text } of [
    { name: 'cr-ox.jdx', text: jcampFile() },
    { name: 'cr-ox.txt', text: decimalCommaFile() },
  ])
    await test.step(`the contributor uploads ${name} after seeing how it was read`, async () => {
      await page.goto(`/spectra/new?complex=${accession}`);
      await page
        .locator('input[type=file]')
        .setInputFiles({ name, mimeType: 'application/octet-stream', buffer: Buffer.from(text) });
      await expect(page.getByText(name === 'cr-ox.jdx' ? /401/ : /201/).first()).toBeVisible();
      await page.getByLabel('Solvent', { exact: true }).fill('water');
      await page
        .getByLabel(/concentration/i)
        .first()
        .fill('0.005');
      await page.getByRole('button', { name: 'Store the spectrum' }).click();
      await expect(page).toHaveURL(/\/spectra\/[0-9a-f-]{36}$/, { timeout: 20_000 });
      await expect(page.getByRole('main').getByText('water').first()).toBeVisible();
    });

  await test.step('both curves stand in the complex with ε', async () => {
    await page.goto(`/complexes/${accession}`);
    await expect(page.getByText('2 spectra')).toBeVisible();
    const { items } = (await (await page.request.get(`/api/spectra?complex=${accession}`)).json()) as {
      items: { id: string; concentration: number; xMin: number }[];
    };
    expect(items).toHaveLength(2);
    for (const { id } of items) {
      const points = (await (await page.request.get(`/api/spectra/${id}/points?yUnit=epsilon`)).json()) as {
        y: number[];
      };
      // ε of the two bands: 0.475 / (0.005 mol dm⁻³ · 1 cm) = 95 and its neighbours, the second file 1 % above.
      expect(Math.max(...points.y)).toBeGreaterThan(94);
      expect(Math.max(...points.y)).toBeLessThan(98);
    }
  });

  await test.step('the lead makes a folio of it and invites a guest', async () => {
    await changePerson(context, page, 'lead@demo.example');
    await page.goto('/folios/new');
    await page.getByLabel('Name').fill('Oxalates');
    await page
      .getByRole('button', { name: /make|create/i })
      .last()
      .click();
    await expect(page).toHaveURL(/\/folios\/[0-9a-f-]{36}/);
    folio = page.url().split('/').pop()!;
    await page.waitForLoadState('networkidle');
    await page.getByLabel('Add a complex').fill(accession);
    await page.getByRole('option', { name: new RegExp(accession) }).click();
    await expect(page.getByRole('main').getByText('1 complex')).toBeVisible();
    await page.getByRole('form', { name: 'Invite a guest' }).getByLabel('E-mail address').fill(GUEST);
    await page.getByRole('form', { name: 'Invite a guest' }).getByLabel('May').selectOption('download');
    await page.getByRole('button', { name: 'Invite', exact: true }).click();
    await expect(page.getByRole('main').getByText(GUEST).first()).toBeVisible();
  });

  await test.step('the guest joins by the link in the mail', async () => {
    await context.clearCookies();
    await page.goto('/outbox');
    await expect(page.getByText(GUEST).first()).toBeVisible();
    const link = await page.getByRole('link', { name: /\/join#/ }).getAttribute('href');
    await page.goto(link!);
    await page.getByLabel('Your name').fill('Noor Varga');
    await page.getByLabel('New password').fill(GUEST_PASSWORD);
    await page.getByRole('button', { name: /accept/i }).click();
    await expect(page).toHaveURL(new RegExp(`/folios/${folio}`));
    expect(page.url()).not.toContain('#');
  });

  await test.step('the guest finds the complex by metal and by geometry', async () => {
    await page.goto('/complexes');
    const rows = page.getByRole('table').getByRole('row').filter({ hasText: 'ZF' });
    await expect(rows).toHaveCount(1);
    await page
      .getByRole('button', { name: /^(Cr\b|chromium)/i })
      .first()
      .click();
    await expect(page).toHaveURL(/metal=Cr/);
    await expect(rows).toHaveCount(1);
    await page.goto('/complexes?geometry=OC-6');
    await expect(rows.first()).toContainText(accession);
    await page.goto('/complexes?geometry=T-4');
    await expect(rows).toHaveCount(0);
  });

  await test.step('the guest downloads the bundle, and its checksums verify', async () => {
    await page.goto(`/folios/${folio}`);
    await page.getByRole('button', { name: 'Make a bundle' }).click();
    const link = page.getByRole('link', { name: /^Download/ });
    await expect(link).toBeVisible({ timeout: 60_000 });
    const waiting = page.waitForEvent('download');
    await link.click();
    const download = await waiting;
    const folder = mkdtempSync(join(tmpdir(), 'zaffre-bundle-'));
    try {
      const zip = join(folder, 'bundle.zip');
      await download.saveAs(zip);
      const { readFileSync } = await import('node:fs');
      const entries = readZip(readFileSync(zip));
      for (const { path, bytes } of entries) {
        mkdirSync(dirname(join(folder, path)), { recursive: true });
        writeFileSync(join(folder, path), bytes);
      }
      const top = entries[0]!.path.split('/')[0]!;
      const said = execFileSync('sha256sum', ['-c', 'manifest-sha256.txt'], {
        cwd: join(folder, top),
        encoding: 'utf8',
      });
      expect(said).not.toMatch(/FAILED/);
      const paths = entries.map(({ path }) => path);
      expect(paths.filter((path) => path.endsWith('cr-ox.jdx') || path.endsWith('cr-ox.txt'))).toHaveLength(2);
      const original = entries.find(({ path }) => path.endsWith('cr-ox.txt'))!;
      expect(original.bytes.toString('utf8')).toBe(decimalCommaFile());
      const text = entries.map(({ bytes }) => bytes.toString('latin1')).join('\n');
      expect(text).toContain(accession);
    } finally {
      rmSync(folder, { recursive: true, force: true });
    }
  });

  await test.step('everything else is refused, pages and API', async () => {
    const { items } = (await (await page.request.get('/api/complexes')).json()) as { items: { accession: string }[] };
    expect(items.map((item) => item.accession)).toEqual([accession]);
    for (const path of ['/complexes/new', '/labs', '/spectra/new', '/folios/new']) {
      const response = await page.goto(path);
      expect([403, 404], path).toContain(response!.status());
    }
    const other = await otherAccession();
    expect((await page.goto(`/complexes/${other}`))!.status()).toBe(404);
    const refusals: [string, string, unknown, number][] = [
      ['GET', `/api/complexes/${other}`, undefined, 404],
      ['GET', '/api/labs', undefined, 403],
      ['POST', '/api/complexes', { formula: '[Ni(NH3)6]2+', lab: 'x' }, 403],
      ['POST', `/api/complexes/${accession}/preparations`, { label: 'x', lab: 'x' }, 403],
      // What hangs on the body is judged after the body was read: the same answer as for an accession that nobody has.
      ['POST', '/api/bundles', { complexes: [other] }, 422],
      ['POST', '/api/tokens', { name: 'x', scopes: ['read'], expires: '2027-01-01' }, 403],
      ['GET', `/api/folios/${folio}/grants`, undefined, 403],
    ];
    for (const [method, path, data, status] of refusals) {
      const response = await page.request.fetch(path, {
        method,
        ...(data ? { data } : {}),
        headers: { origin: new URL(page.url()).origin },
      });
      expect(response.status(), `${method} ${path}: ${await response.text()}`).toBe(status);
      expect(response.headers()['content-type']).toBe('application/problem+json');
    }
  });

  async function otherAccession(): Promise<string> {
    const browser = context.browser()!;
    const theirs = await browser.newContext({ baseURL: new URL(page.url()).origin });
    const seen = await theirs.newPage();
    await signIn(seen, 'contributor@demo.example');
    const { items } = (await (await seen.request.get('/api/complexes?metal=Ni&limit=1')).json()) as {
      items: { accession: string }[];
    };
    await theirs.close();
    return items[0]!.accession;
  }
});
