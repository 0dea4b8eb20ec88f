import { describe, expect, test } from 'vitest';
import { readAddresses, refusedAddresses, toInvite, withoutAddress } from '#src/components/labs/address-list.ts';

const emails = (typed: string) => readAddresses(typed).map(({ email }) => email);
const faults = (typed: string) => readAddresses(typed).map(({ fault }) => fault);

describe('a pasted list', () => {
  test.each([
    ['commas', 'a@lab.example, b@lab.example'],
    ['semicolons, as some mail programs write', 'a@lab.example; b@lab.example;'],
    ['lines of any system', 'a@lab.example\r\nb@lab.example\n'],
    ['tabs of a table', 'a@lab.example\tb@lab.example'],
    ['nothing but a space', 'a@lab.example b@lab.example'],
    ['names beside them', 'Ada A <a@lab.example>, "B, Bo" <b@lab.example>'],
    ['names with separators in quotes', '"A; Ada" <a@lab.example>; "Bo" <b@lab.example>'],
    ['brackets alone', '<a@lab.example>,<b@lab.example>'],
  ])('is parted at %s', (_, typed) => {
    expect(emails(typed)).toEqual(['a@lab.example', 'b@lab.example']);
    expect(faults(typed)).toEqual([null, null]);
  });

  test('holds nothing where nothing was typed', () => {
    for (const typed of ['', '  ', ',;\n', '\t']) expect(readAddresses(typed)).toEqual([]);
  });

  test('holds an address once, whatever its capitals', () => {
    expect(emails('Ada <A@Lab.example>, a@lab.example; a@LAB.EXAMPLE')).toEqual(['a@lab.example']);
  });

  test('tells what is no address, and guesses nothing', () => {
    expect(faults('a@lab.example, bo, c@lab, d@@lab.example, n varga@lab.example')).toEqual([
      null,
      '"bo" has no e-mail address',
      '"c@lab" is not an e-mail address',
      '"d@@lab.example" is not an e-mail address',
      '"n varga@lab.example" is not an e-mail address',
    ]);
  });

  test('survives a quote that never ends, which is held to its line', () => {
    expect(emails('"Ada <a@lab.example>\nb@lab.example')).toEqual(['a@lab.example', 'b@lab.example']);
  });
});

test('one is taken out of the text, the others stay as they were typed', () => {
  expect(withoutAddress('"B, Bo" <b@lab.example>\na@lab.example', 'a@lab.example')).toBe('"B, Bo" <b@lab.example>');
});

test('one address goes alone, several as a list', () => {
  expect(toInvite(readAddresses('a@lab.example'))).toEqual({ email: 'a@lab.example' });
  expect(toInvite(readAddresses('a@lab.example b@lab.example'))).toEqual({
    emails: ['a@lab.example', 'b@lab.example'],
  });
});

test('what the server says of an address stands beside it', () => {
  const addresses = readAddresses('a@lab.example, b@lab.example');
  const errors = [
    { pointer: '#/emails/1', detail: 'no such host' },
    { pointer: '#/expires', detail: 'past' },
    { pointer: '#/emails/7', detail: 'beyond the list' },
  ];
  expect([...refusedAddresses(addresses, { errors })]).toEqual([['b@lab.example', 'no such host']]);
  expect(refusedAddresses(addresses, null).size).toBe(0);
});
