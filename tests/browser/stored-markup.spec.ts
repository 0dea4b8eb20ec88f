import type { APIResponse, Page } from '@playwright/test';
import { decimalCommaFile } from './files.ts';
import { expect, signIn, test } from './people.ts';

// Whatever people type is text: markup in any field is shown as it was typed and runs nowhere, neither for those who
// typed it nor for stewards, leads and guests who look at it later.

/** Would set a mark on the page if any part of it were taken for markup; with a name, to be found again as text. */
const markup = (field: string) =>
  `${field} <img src=x onerror="window.ran='${field}'"><svg onload="window.ran=1"></svg>`;

/** Writes by the cookie of the page, from its own origin. */
function writer(page: Page, origin: string) {
  const checked = async (answer: APIResponse) => {
    expect(answer.ok(), `${answer.url()}: ${await answer.text()}`).toBe(true);
    return (answer.status() === 204 ? {} : await answer.json()) as { id: string; accession: string; items: [] };
  };
  return {
    send: async (method: string, path: string, data: unknown, headers: Record<string, string> = {}) =>
      checked(await page.request.fetch(path, { method, data, headers: { origin, 'if-match': '*', ...headers } })),
    upload: async (
      path: string,
      multipart: Record<string, string | { name: string; mimeType: string; buffer: Buffer }>,
    ) => checked(await page.request.post(path, { multipart, headers: { origin } })),
  };
}

test('markup in every text field is text on every page that shows it', async ({ page, baseURL }) => {
  test.setTimeout(180_000);
  await signIn(page, 'steward@demo.example');
  const { send, upload } = writer(page, baseURL!);
  await send('PATCH', '/api/account', { name: markup('account') });
  const lab = await send('POST', '/api/labs', {
    name: markup('lab'),
    place: markup('place'),
    description: markup('description'),
  });
  const complex = await send('POST', '/api/complexes', {
    formula: '[Ni(pn)3]2+',
    geometry: 'OC-6',
    lab: lab.id,
    notes: markup('notes'),
  });
  await send('POST', `/api/complexes/${complex.accession}/preparations`, {
    label: markup('label').slice(0, 100),
    lab: lab.id,
    host: markup('host'),
    isotopicLabel: markup('isotopes'),
    storage: markup('storage'),
    atmosphere: markup('atmosphere'),
    notes: markup('preparation notes'),
  });
  const spectrum = await upload('/api/spectra', {
    file: {
      name: 'scan <img src=x onerror=window.ran=2>.csv',
      mimeType: 'text/csv',
      buffer: Buffer.from(decimalCommaFile()),
    },
    metadata: JSON.stringify({
      complex: complex.accession,
      lab: lab.id,
      technique: 'solution',
      solvent: 'water',
      concentration: 0.005,
      pathLength: 1,
      temperature: 298,
      cell: markup('cell').slice(0, 200),
      operator: markup('operator').slice(0, 200),
      medium: { electrolyte: markup('electrolyte').slice(0, 200) },
    }),
  });
  await send('PUT', `/api/spectra/${spectrum.id}/bands`, [
    {
      wavenumber: 17_540,
      height: 75,
      quantity: 'epsilon',
      found: 'typed',
      assignment: { class: 'other', reason: markup('reason') },
    },
  ]);
  const folio = await send('POST', '/api/folios', {
    name: markup('folio').slice(0, 150),
    description: markup('folio description'),
    lab: lab.id,
    licence: 'CC0-1.0',
    shows: 'proposed',
    items: [{ accession: complex.accession, spectra: 'all' }],
  });
  await send('POST', `/api/folios/${folio.id}/invitations`, { email: 'guest@demo.example', level: 'view' });
  const soon = new Date(Date.now() + 86_400_000).toISOString();
  await send('POST', '/api/tokens', { name: markup('token').slice(0, 150), scopes: ['read'], expires: soon });
  await send('PATCH', `/api/complexes/${complex.accession}`, {
    state: 'withdrawn',
    withdrawnReason: markup('withdrawn'),
  });

  const shown: [path: string, text: string][] = [
    ['/', 'account <img'],
    ['/account', 'account <img'],
    ['/labs', 'lab <img'],
    [`/labs/${lab.id}`, 'description <img'],
    ['/people', 'account <img'],
    [`/complexes/${complex.accession}`, 'notes <img'],
    ['/complexes?state=withdrawn', 'lab <img'],
    ['/spectra', 'lab <img'],
    [`/spectra/${spectrum.id}`, 'operator <img'],
    ['/folios', 'folio <img'],
    [`/folios/${folio.id}`, 'folio description <img'],
    ['/tokens', 'token <img'],
    ['/trail', 'account <img'],
    ['/outbox', 'folio <img'],
  ];
  for (const [path, text] of shown)
    await test.step(path, async () => {
      await page.goto(path);
      await page.waitForLoadState('networkidle');
      await expect(page.getByText(text).filter({ visible: true }).first(), path).toBeVisible();
      expect(
        await page.evaluate(() => [
          (window as { ran?: unknown }).ran,
          document.querySelectorAll('img[src="x"]').length,
        ]),
      ).toEqual([undefined, 0]);
    });
});
