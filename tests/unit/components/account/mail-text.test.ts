import { expect, test } from 'vitest';
import { mailParts } from '#src/components/account/mail-text.ts';

test('addresses become links, with their fragment, without the full stop that ends the sentence', () => {
  expect(mailParts('Open it:\nhttp://localhost:4321/join#Ab_-9\n\nOr see https://x.example/a.')).toEqual([
    { text: 'Open it:\n' },
    { link: 'http://localhost:4321/join#Ab_-9' },
    { text: '\n\nOr see ' },
    { link: 'https://x.example/a' },
    { text: '.' },
  ]);
});

test('nothing else becomes a link', () => {
  expect(mailParts('javascript:alert(1) and x@y.example')).toEqual([{ text: 'javascript:alert(1) and x@y.example' }]);
  expect(mailParts('')).toEqual([]);
});
