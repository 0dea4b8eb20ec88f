import { expect, test } from 'vitest';
import { countWords, draftTotal, draftWords } from '#src/components/people/draft-words.ts';

test.each([
  [{ complexes: 0, preparations: 0, spectra: 0 }, null],
  [{ complexes: 1, preparations: 0, spectra: 0 }, '1 complex'],
  [{ complexes: 2, preparations: 0, spectra: 1 }, '2 complexes and 1 spectrum'],
  [{ complexes: 1, preparations: 1, spectra: 4 }, '1 complex, 1 preparation and 4 spectra'],
])('drafts %j read %j', (drafts, words) => {
  expect(draftWords(drafts)).toBe(words);
});

test('all kinds count together', () => {
  expect(draftTotal({ complexes: 1, preparations: 2, spectra: 4 })).toBe(7);
});

test.each([
  [1, '1 access token'],
  [2, '2 access tokens'],
])('%i: %s', (n, words) => {
  expect(countWords(n, 'access token')).toBe(words);
});
