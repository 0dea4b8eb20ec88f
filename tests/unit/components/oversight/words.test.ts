import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { accessAddress, accessFrom, accessRequest } from '#src/components/oversight/access-query.ts';
import { addressOf, exportOf, narrowed, requestOf, toggled, viewFrom } from '#src/components/oversight/trail-query.ts';
import { changesOf, deedWords, fieldWords, subjectWords, valueWords } from '#src/components/oversight/words.ts';

const ada = { id: 'a', name: 'Ada', email: 'ada@test.example' };
const row = (action: string, type: string, label: string | null, more: { id?: string; detail?: object } = {}) => ({
  actor: ada,
  action,
  subject: { type, id: more.id ?? 'x', label, href: null },
  detail: (more.detail ?? {}) as Record<string, unknown>,
});

test.each([
  [row('register', 'complex', 'ZF000042-X [Co(NH3)6]3+'), 'Ada registered ZF000042-X [Co(NH3)6]3+'],
  [row('attest', 'band', '17 400 cm⁻¹ of Aqua'), 'Ada attested the band at 17 400 cm⁻¹ of Aqua'],
  [row('attest', 'band', null), 'Ada attested a band that is gone'],
  [row('create', 'token', 'Instrument of Ada'), 'Ada made the access token Instrument of Ada'],
  [row('create', 'folio', 'Aqua ions'), 'Ada made the folio Aqua ions'],
  [row('sign-in', 'account', 'Ada, ada@test.example', { id: 'a' }), 'Ada signed in to their account'],
  [
    row('delete-draft', 'complex', null, { detail: { accession: 'ZF000042-X' } }),
    'Ada deleted the draft of ZF000042-X (deleted since)',
  ],
  [row('some-new.deed', 'lab', 'North'), 'Ada some new deed North'],
  [{ ...row('load-demo', 'registry', null), actor: null }, 'The program loaded the demo data into the registry'],
])('%# reads as a sentence', (entry, sentence) =>
  expect(`${entry.actor?.name ?? 'The program'} ${deedWords(entry)} ${subjectWords(entry)}`).toBe(sentence),
);

test('the same action says another thing of another kind of record', () => {
  expect(deedWords(row('revoke', 'invitation', 'x'))).not.toBe(deedWords(row('revoke', 'token', 'x')));
});

test('every action that the program records has words of its own in words.ts', () => {
  const files = ['src/server', 'scripts'].flatMap((folder) =>
    readdirSync(folder, { recursive: true, encoding: 'utf8' }).map((name) => join(folder, name)),
  );
  const recorded = files
    .filter((file) => file.endsWith('.ts'))
    .flatMap((file) => [...readFileSync(file, 'utf8').matchAll(/action: '([^']+)',\s*subjectType: '([a-z]+)'/g)])
    .map(([, action, type]) => ({ action: action!, type: type! }));
  expect(recorded.length).toBeGreaterThan(20);
  const spelledOut = (action: string) => action.replace(/[-._]+/g, ' ');
  const bare = recorded.filter(({ action, type }) => deedWords(row(action, type, 'x')) === spelledOut(action));
  expect(bare).toEqual([]);
});

test('changes are told with before and after, from the row itself or from earlier ones', () => {
  expect(changesOf({ before: { role: 'lead' }, after: { role: 'contributor' }, reason: 'asked' }, {})).toEqual([
    { name: 'role', before: 'lead', after: 'contributor' },
    { name: 'reason', before: undefined, after: 'asked' },
  ]);
  expect(changesOf({ notes: 'new', state: 'registered' }, { notes: 'old' })).toEqual([
    { name: 'notes', before: 'old', after: 'new' },
    { name: 'state', before: undefined, after: 'registered' },
  ]);
  expect(changesOf({}, {})).toEqual([]);
});

test('names and values of fields are spelled out', () => {
  expect(fieldWords('measuredAt')).toBe('measured at');
  expect(fieldWords('embargoUntil')).toBe('embargo until');
  expect([null, '', [], true, 0, ['read', 'write']].map(valueWords)).toEqual([
    'none',
    'none',
    'none',
    'yes',
    '0',
    'read, write',
  ]);
  expect(valueWords([{ a: 1 }])).toContain('"a": 1');
});

test('the view of the trail survives its address; the page does not', () => {
  const view = toggled({ ...viewFrom('?q=Co&from=2026-01-01&sort=seq'), cursors: ['c'] }, 'action', 'change');
  expect(view.cursors).toEqual([]);
  expect(viewFrom(addressOf(view))).toEqual(view);
  expect(addressOf(viewFrom(''))).toBe('');
  expect(toggled(view, 'action', 'change').action).toEqual([]);
  expect(requestOf({ ...view, cursors: ['c'] })).toContain('cursor=c');
  expect(exportOf(view, 'csv')).toBe('/api/trail/export.csv?action=change&from=2026-01-01&q=Co');
  expect(exportOf(narrowed(viewFrom(''), {}), 'jsonl')).toBe('/api/trail/export.jsonl');
});

test('the view of who looked keeps its tab', () => {
  const view = accessFrom('?view=looked&kind=download&folio=f&subjectType=bundle,folio');
  expect(accessFrom(accessAddress(view))).toEqual(view);
  expect(accessAddress(accessFrom(''))).toBe('?view=looked');
  expect(accessRequest(view)).toBe('/api/access-log?kind=download&subjectType=bundle%2Cfolio&folio=f&limit=50');
  expect(accessFrom('?kind=anything').kind).toBe('');
});
