import { expect, test } from 'vitest';
import { ownPath, signInPath } from '#src/components/account/own-path.ts';

test.each(['/folios/1', '/complexes?metal=Co,Ru&sort=-updated', '/join', '/complexes#bands'])(
  'a path of our own is followed: %s',
  (path) => expect(ownPath(path)).toBe(path),
);

// Ways in which a browser reads an address of another host (WHATWG URL Standard: "\" counts as "/", tabs and line
// breaks are dropped).
test.each([
  '//other.example/x',
  '/\\other.example',
  '/\t/other.example',
  '/\n/other.example',
  'https://other.example',
  'javascript:alert(1)',
  'other.example',
  '',
  null,
  undefined,
])('anything else leads to the day sheet: %j', (wanted) => expect(ownPath(wanted)).toBe('/'));

test('neither the API nor the sign-in page is a place to land on', () => {
  expect(ownPath('/api/auth/signout')).toBe('/');
  expect(ownPath('/signin?next=/signin')).toBe('/');
  expect(ownPath('/x/../api/tokens')).toBe('/');
  expect(ownPath('/signing-off')).toBe('/signing-off');
});

test('the way back is written so that it is read again', () => {
  const path = '/complexes?metal=Co&q=a b';
  expect(ownPath(new URL(signInPath(path), 'http://x').searchParams.get('next'))).toBe('/complexes?metal=Co&q=a%20b');
  expect(signInPath('/')).toBe('/signin');
});
