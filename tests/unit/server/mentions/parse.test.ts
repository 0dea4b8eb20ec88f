import { expect, test } from 'vitest';
import { mentionedIn, sentenceWith } from '#src/server/mentions/parse.ts';

test.each([
  ['Ask @anna about it.', ['anna']],
  ['@anna.meier@lab.example, please check', ['anna.meier@lab.example']],
  ['(@Anna.Meier@Lab.Example.)', ['anna.meier@lab.example']],
  ['@anna and @bo, then @anna again', ['anna', 'bo']],
  ['@anna.\n@bo', ['anna', 'bo']],
])('%j names %j', (text, handles) => {
  expect(mentionedIn(text)).toEqual(handles);
});

test.each([
  'write to anna@lab.example',
  'N2@C60 in toluene',
  '[Co(NH3)6]3+@zeolite',
  'run @ 298 K',
  '@anna@nowhere',
  '@',
  '',
  null,
  undefined,
])('%j names nobody', (text) => {
  expect(mentionedIn(text)).toEqual([]);
});

test('at most twenty people are told by one text', () => {
  const text = Array.from({ length: 30 }, (_, i) => `@person${i}`).join(' ');
  expect(mentionedIn(text)).toHaveLength(20);
  expect(mentionedIn(text)[0]).toBe('person0');
});

test('the sentence is the one that names the person, whatever dots an address holds', () => {
  const text = 'Dried at 110 °C. Did @anna.b@lab.example see the shoulder? It moves.';
  expect(sentenceWith(text, 'anna.b@lab.example')).toBe('Did @anna.b@lab.example see the shoulder?');
  expect(sentenceWith('first line\nfor @bo\nthird', 'bo')).toBe('for @bo');
  expect(sentenceWith(`@bo ${'x'.repeat(700)}`, 'bo')).toHaveLength(600);
});
