import { expect, test } from 'vitest';
import { readRange } from '#src/server/bundles/file.ts';
import { safeName } from '#src/server/bundles/paths.ts';
import { csvOf } from '#src/server/bundles/tables.ts';
import { uuidV5 } from '#src/server/bundles/write.ts';

// The name and namespace of RFC 9562 appendix A.4; the value as Python's uuid.uuid5 gives it.
test('a name-based UUID is that of the standard', () => {
  expect(uuidV5('www.example.com', '6ba7b810-9dad-11d1-80b4-00c04fd430c8')).toBe(
    '2ed6657d-e927-568b-95e1-2665a8aea6a2',
  );
});

test.each([
  ['Ni(en)3 λ=545.CSV', 'Ni_en_3_lambda_545.CSV'],
  ['../../etc/passwd', 'etc_passwd'],
  ['C:\\data\\run.dx', 'C_data_run.dx'],
  ['con.txt', '_con.txt'],
  ['-rf', 'rf'],
  ['', 'file'],
  [`${'a'.repeat(200)}.jdx`, `${'a'.repeat(76)}.jdx`],
])('the file name %j becomes %j', (given, safe) => {
  expect(safeName(given)).toMatch(/^[A-Za-z0-9_][A-Za-z0-9._-]{0,79}$/);
  expect(safeName(given)).toBe(safe);
});

// RFC 9110 §14.1.2 and §14.2.
test.each([
  ['bytes=0-499', { start: 0, end: 499 }],
  ['bytes=500-', { start: 500, end: 999 }],
  ['bytes=-200', { start: 800, end: 999 }],
  ['bytes=-5000', { start: 0, end: 999 }],
  ['bytes=900-5000', { start: 900, end: 999 }],
  ['bytes=1000-', 'unsatisfiable'],
  ['bytes=-0', 'unsatisfiable'],
  ['bytes=5-4', null],
  ['bytes=0-1,5-6', null],
  ['lines=0-1', null],
  ['bytes=-', null],
])('%s of 1000 bytes', (range, expected) => {
  expect(readRange(new Headers({ range }), 1000, '"tag"')).toEqual(expected);
});

test('a guarded cell is text; a number stays one; an empty value is an empty cell', () => {
  const column = (name: string, of: (row: unknown[]) => never) => ({
    name,
    type: 'string' as const,
    description: '',
    of,
  });
  const columns = [0, 1, 2, 3].map((i) => column(`c${i}`, (row) => row[i] as never));
  expect(
    csvOf(columns, [
      ['=1+1', -5, null, '@x'],
      ['a,"b"', 1e-7, true, '-3'],
    ]),
  ).toBe(`c0,c1,c2,c3\r\n'=1+1,-5,,'@x\r\n"a,""b""",1e-7,true,'-3\r\n`);
});
