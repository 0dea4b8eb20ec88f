import { expect, test } from 'vitest';
import { draftName, forgetDrafts } from '#src/components/ui/draft-store.ts';

/** As a browser's storage, as far as drafts need it. */
function storageOf(...names: string[]): Storage {
  const kept = new Map(names.map((name) => [name, '{}']));
  return {
    get length() {
      return kept.size;
    },
    key: (i: number) => [...kept.keys()][i] ?? null,
    getItem: (name: string) => kept.get(name) ?? null,
    setItem: (name: string, value: string) => void kept.set(name, value),
    removeItem: (name: string) => void kept.delete(name),
    clear: () => kept.clear(),
  };
}
const namesIn = (storage: Storage) => Array.from({ length: storage.length }, (_, i) => storage.key(i));

test('a draft is kept apart for each account', () => {
  expect(draftName('ada', 'register')).not.toBe(draftName('ben', 'register'));
  expect(draftName('ada', 'register')).not.toBe(draftName('', 'register'));
});

test('signing out takes every draft away and nothing else', () => {
  const storage = storageOf(draftName('ada', 'register'), draftName('', 'register'), 'zaffre-invitation', 'other');
  forgetDrafts(storage);
  expect(namesIn(storage)).toEqual(['zaffre-invitation', 'other']);
});

test('another account that signs in finds its own drafts alone', () => {
  const old = 'zaffre-draft:register';
  const storage = storageOf(old, draftName('ada', 'register'), draftName('ada2', 'x'), draftName('ben', 'bands:1'));
  forgetDrafts(storage, 'ada');
  expect(namesIn(storage)).toEqual([draftName('ada', 'register')]);
});
