import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join, relative, resolve } from 'node:path';
import { expect, test } from 'vitest';

/** Static, dynamic and type imports, re-exports among them. */
const IMPORT = /(?:\bfrom\s+|\bimport\s*\(\s*|\bimport\s+)['"]([^'"]+)['"]/g;

const filesOf = (folder: string): string[] =>
  readdirSync(folder, { recursive: true, encoding: 'utf8' })
    .map((name) => join(folder, name))
    .filter((name) => /\.(?:ts|tsx|mjs|astro)$/.test(name));

/** What a file imports: paths of ours from the program's folder, names of packages as they are. */
function importsOf(file: string): string[] {
  const found = [...readFileSync(file, 'utf8').matchAll(IMPORT)].map((match) => match[1]!);
  return found.map((name) => {
    if (name.startsWith('#src/')) return `src/${name.slice(5)}`;
    if (name.startsWith('#fakes/')) return `fakes/${name.slice(7)}`;
    return name.startsWith('.') ? relative('.', resolve(dirname(file), name)) : name;
  });
}

const ours = /^(?:src|fakes|scripts|tests)\//;
const inside = (path: string, folders: string[]) =>
  folders.some((folder) => path === folder || path.startsWith(`${folder}/`));

/** "importer → imported" for every import from `folder` that `isAllowed` does not let through. */
const breaches = (folder: string, isAllowed: (path: string) => boolean): string[] =>
  filesOf(folder).flatMap((file) =>
    importsOf(file)
      .filter((path) => !isAllowed(path))
      .map((path) => `${file} → ${path}`),
  );

const only =
  (...folders: string[]) =>
  (path: string) =>
    !ours.test(path) || inside(path, folders);

test('the patterns see what they must', () => {
  // The walls are only as good as these: each form of import that the code uses is found.
  expect(importsOf('src/server/store.ts')).toEqual(
    expect.arrayContaining(['node:stream', '@aws-sdk/client-s3', 'src/server/settings.ts', 'fakes/object-store.ts']),
  );
  expect(filesOf('src/chem').length).toBeGreaterThan(0);
});

test('the chemistry imports nothing that leads out, and nothing of a machine', () => {
  const isMachine = (path: string) =>
    path.startsWith('node:') || /^(?:astro|react|drizzle-orm|@libsql|zod)(?:\/|$)/.test(path);
  expect(breaches('src/chem', (path) => only('src/chem')(path) && !isMachine(path))).toEqual([]);
});

test('the chemistry knows no clock, no randomness and no environment', () => {
  const impure = /\bMath\.random\b|\bDate\.now\b|\bnew Date\(\)|\bprocess\.|\bfetch\(|\bcrypto\.|\bperformance\.now\b/;
  const code = (file: string) => readFileSync(file, 'utf8').replace(/\/\*[\s\S]*?\*\/|\/\/.*$/gm, '');
  expect(filesOf('src/chem').filter((file) => impure.test(code(file)))).toEqual([]);
});

test('contracts know the chemistry and nothing else', () => {
  expect(breaches('src/contracts', only('src/contracts', 'src/chem'))).toEqual([]);
});

test('tables know nothing but tables', () => {
  expect(breaches('src/db', only('src/db'))).toEqual([]);
});

test('components never reach server or database', () => {
  expect(breaches('src/components', only('src/components', 'src/contracts', 'src/chem', 'src/styles'))).toEqual([]);
});

test('the server never reaches pages or components', () => {
  const isStandIn = (path: string) => path === 'fakes/object-store.ts' || path === 'fakes/mail.ts';
  const allowed = only('src/server', 'src/db', 'src/contracts', 'src/chem');
  expect(breaches('src/server', (path) => allowed(path) || isStandIn(path))).toEqual([]);
});

test('the stand-ins are known to store, mail, scripts and tests only', () => {
  const importers = filesOf('src').filter((file) => importsOf(file).some((path) => inside(path, ['fakes'])));
  expect(importers.sort()).toEqual(['src/server/mail.ts', 'src/server/store.ts']);
});
