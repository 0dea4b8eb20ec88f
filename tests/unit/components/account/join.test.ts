import { expect, test } from 'vitest';
import { readFragment } from '#src/components/account/invitation-token.ts';
import { joinStep, landing, missingCharacters } from '#src/components/account/join-step.ts';

test('the token is the fragment, with or without a name before it', () => {
  expect(readFragment('#Zm9vYmFy_-')).toBe('Zm9vYmFy_-');
  expect(readFragment('#token=Zm9v')).toBe('Zm9v');
  expect(readFragment('#')).toBeNull();
  expect(readFragment('')).toBeNull();
});

test('what comes next hangs on whether the address has an account and on who is signed in', () => {
  const known = { email: 'a@b.example', hasAccount: true };
  const unknown = { email: 'a@b.example', hasAccount: false };
  expect(joinStep(unknown, null)).toBe('new-account');
  expect(joinStep(known, null)).toBe('sign-in');
  expect(joinStep(known, 'a@b.example')).toBe('accept');
  expect(joinStep(known, 'c@d.example')).toBe('other-account');
  expect(joinStep(unknown, 'c@d.example')).toBe('other-account');
});

test('fifteen characters are enough', () => {
  expect(missingCharacters('')).toBe(15);
  expect(missingCharacters('x'.repeat(14))).toBe(1);
  expect(missingCharacters('x'.repeat(15))).toBe(0);
  expect(missingCharacters('🜁'.repeat(14))).toBe(1);
  expect(missingCharacters('e\u0301'.repeat(14))).toBe(1);
});

test('a guest lands on the folio, a member on the day sheet', () => {
  expect(landing({ folio: 'f1' })).toBe('/folios/f1');
  expect(landing({ folio: null })).toBe('/');
});
