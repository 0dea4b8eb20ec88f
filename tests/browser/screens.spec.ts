import AxeBuilder from '@axe-core/playwright';
import { expect, signIn, test } from './people.ts';

// The main screens as each of their people, light and dark, wide and on a tablet: no serious fault of accessibility
// (axe, WCAG 2.2 AA rules), no sideways scrolling of the page, no complaint in the console.

const RULES = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
const MEMBER = [
  '/',
  '/complexes',
  '/complexes/new',
  '/spectra',
  '/ligands',
  '/symmetry',
  '/levels',
  '/plan',
  '/folios',
  '/labs',
  '/api-reference',
];
const GUEST = ['/', '/complexes', '/symmetry', '/levels', '/folios'];

const people = [
  { who: 'nobody', email: null, paths: ['/signin', '/outbox', '/join', '/reset', '/confirm-address'] },
  { who: 'contributor', email: 'contributor@demo.example', paths: [...MEMBER, '/tokens', '/account'] },
  { who: 'lead', email: 'lead@demo.example', paths: ['/', '/folios'] },
  { who: 'steward', email: 'steward@demo.example', paths: ['/', '/labs', '/people', '/trail', '/merges'] },
  { who: 'guest', email: 'guest@demo.example', paths: GUEST },
] as const;

for (const { who, email, paths } of people)
  for (const theme of ['light', 'dark'] as const)
    test(`${who}, ${theme}`, async ({ page, context, baseURL }) => {
      test.setTimeout(180_000);
      await context.addCookies([{ name: 'zaffre-theme', value: theme, url: baseURL! }]);
      if (email) await signIn(page, email);
      // The records look alike to every member; a guest's have fewer parts.
      const records = who === 'contributor' || who === 'guest' ? await firstRecords(page) : [];
      const faults: string[] = [];
      for (const path of [...paths, ...records])
        await test.step(path, async () => {
          for (const width of theme === 'light' ? [1440, 820] : [820]) {
            await page.setViewportSize({ width, height: 900 });
            await page.goto(path);
            await page.waitForLoadState('networkidle');
            const overflow = await page.evaluate(
              () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
            );
            if (overflow > 0) faults.push(`${path} at ${width} px scrolls sideways by ${overflow} px`);
          }
          const { violations } = await new AxeBuilder({ page }).withTags(RULES).analyze();
          for (const { id, impact, nodes } of violations)
            if (impact === 'serious' || impact === 'critical')
              faults.push(`${path}: ${id}: ${nodes.map(({ html }) => html.slice(0, 160)).join(' | ')}`);
        });
      expect(faults).toEqual([]);
    });

/** The pages of one complex, one spectrum and one folio that this person sees. */
async function firstRecords(page: import('@playwright/test').Page): Promise<string[]> {
  const first = async (path: string) =>
    ((await (await page.request.get(path)).json()) as { items: { id?: string; accession?: string }[] }).items[0];
  const complex = await first('/api/complexes?metal=Co&sort=-spectra&limit=1');
  const spectrum = await first('/api/spectra?limit=1');
  const folio = await first('/api/folios?limit=1');
  return [
    complex && `/complexes/${complex.accession}`,
    spectrum && `/spectra/${spectrum.id}`,
    folio && `/folios/${folio.id}`,
  ].filter((path) => path !== undefined);
}
