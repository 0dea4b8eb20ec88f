import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { LONGEST_PASSWORD_BYTES, SHORTEST_PASSWORD } from '#src/contracts/account.ts';
import { mostUsedPasswords } from '#src/server/accounts/most-used-passwords.ts';
import { DERIVE_AT_ONCE, MOST_TOKENS, POLICIES } from '#src/server/limits/policy.ts';
import { SESSION_IDLE_MS, SESSION_LIFE_MS } from '#src/server/sessions.ts';

const ROOT = join(import.meta.dirname, '../../..');
const page = readFileSync(join(ROOT, 'docs/security.md'), 'utf8').replace(/\s+/g, ' ');
const read = (path: string) => readFileSync(join(ROOT, path), 'utf8').replace(/\s+/g, ' ');

/** Files that the page names, and titles of tests, each behind the file in which it stands. */
function named() {
  const paths = new Set<string>();
  const titles: [file: string, title: string][] = [];
  let file = '';
  for (const [, code, title] of page.matchAll(/`([^`]+)`|“([^”]+)”/g)) {
    if (title) titles.push([file, title]);
    if (!code || !/^(?:src|tests|scripts|fakes|docs|astro\.config)[/.]/.test(code)) continue;
    paths.add(code);
    if (code.startsWith('tests/')) file = code;
  }
  return { paths: [...paths], titles };
}

/** Whether a file has a test or a group of tests of this title. */
const hasTest = (source: string, title: string) =>
  ["'", '"', '`'].some((quote) => {
    const at = source.indexOf(`(${quote}${title}${quote}`);
    const wrapped = source.indexOf(`( ${quote}${title}${quote}`);
    const place = at >= 0 ? at : wrapped;
    return (
      place >= 0 &&
      /(?:test|it|describe)(?:\.\w+)*(?:\((?:[^()]|\([^()]*\))*\)|\(\s*\[.*\]\s*\))?$/.test(source.slice(0, place))
    );
  });

/** Items of the checklist: OWASP ASVS 5.0.0, levels 1 and 2, as far as they bear on this kind of program. */
const ITEMS: Record<string, string> = {
  '1': '1.1 1.2 2.1 2.2 2.3 2.4 2.5 2.9 3.1 3.2 3.4 3.5 3.6 3.11 5.1 5.2',
  '2': '1.1 1.2 2.1 2.2 2.3 3.1 3.2 3.3 4.1',
  '3': '2.1 2.2 3.1 3.2 3.3 3.4 4.1 4.2 4.3 4.4 4.5 4.6 5.1 5.2 5.3 5.5 7.2',
  '4': '1.1 1.2 1.3 2.1',
  '5': '1.1 2.1 2.2 2.3 3.1 3.2 4.1 4.2 4.3',
  '6': '1.1 1.2 2.1 2.2 2.3 2.4 2.5 2.7 2.8 2.9 2.10 2.11 2.12 3.1 3.2 3.3 3.4 3.8 4.1 4.2 4.3 4.6 5.1 5.2 5.5',
  '7': '1.1 2.1 2.3 2.4 3.1 3.2 4.1 4.2 4.3 4.4 4.5 5.1 5.2',
  '8': '1.1 1.2 2.1 2.2 2.3 3.1 4.1',
  '11': '2.1 4.1 4.2 5.1',
  '12': '1.1 2.1',
  '13': '3.1 4.1 4.2 4.3 4.5',
  '14': '2.1 2.2 3.1 3.2 3.3',
  '15': '1.1 1.2 1.3 2.2 2.3 3.1 3.2 3.3 3.4 3.5 3.6 3.7',
  '16': '2.1 2.2 2.5 3.1 3.2 3.3 3.4 4.1 4.2 5.1 5.3',
};
const items = Object.entries(ITEMS).flatMap(([chapter, rest]) => rest.split(' ').map((item) => `${chapter}.${item}`));

describe('the page about security', () => {
  const { paths, titles } = named();

  test('names files that are there', () => {
    expect(paths.length).toBeGreaterThan(60);
    expect(paths.filter((path) => !existsSync(join(ROOT, path)))).toEqual([]);
  });

  test('names tests that are there', () => {
    expect(titles.length).toBeGreaterThan(100);
    expect(titles.filter(([file, title]) => !hasTest(read(file), title))).toEqual([]);
  });

  test('says of every item of the checklist, once, how it stands', () => {
    const rows = [...page.matchAll(/- \*\*(\d+\.\d+\.\d+)\*\* \((?:met|partly|open|operator|n\/a)\): /g)].map(
      ([, item]) => item,
    );
    expect([...rows].sort()).toEqual([...items].sort());
  });

  test('gives the limits that hold', async () => {
    for (const { name, most, windowMs } of Object.values(POLICIES)) {
      const row = new RegExp(
        `\\| \`${name}\` \\| [^|]+ \\| ${most.toLocaleString('en')} in ${windowMs / 60_000} min \\|`,
      );
      expect(page).toMatch(row);
    }
    const { most, waiting, waitMs } = DERIVE_AT_ONCE;
    expect(page).toContain(`${most} at once and ${waiting} waiting up to ${waitMs / 1000} s`);
    expect(page).toContain(`second factors of an account | ${MOST_TOKENS}; 20 |`);
    expect(page).toContain(`end ${SESSION_LIFE_MS / 3_600_000} hours after sign-in`);
    expect(page).toContain(`after ${SESSION_IDLE_MS / 3_600_000} hours without a request`);
    expect(page).toContain(`have ${SHORTEST_PASSWORD} characters at least`);
    expect(page).toContain(`${LONGEST_PASSWORD_BYTES.toLocaleString('en')} bytes at most`);
    expect(page).toContain(`the ${(await mostUsedPasswords()).all.size.toLocaleString('en')} most used ones`);
  });
});

test('a title is found as a title alone', () => {
  const source = "test('a', () => {}); describe.each([1, (2)])('b %s', f); log('c'); test( 'd', f)";
  expect(['a', 'b %s', 'c', 'd', 'e'].filter((title) => hasTest(source, title))).toEqual(['a', 'b %s', 'd']);
});
