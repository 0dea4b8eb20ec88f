import { expect, test } from 'vitest';
import { heirsOf } from '#src/components/labs/heirs.ts';

const member = (
  id: string,
  role: 'lead' | 'contributor',
  since: string,
  state: 'active' | 'deactivated' = 'active',
) => ({
  id,
  name: id,
  email: null,
  role,
  since,
  state,
});
const people = [
  member('young lead', 'lead', '2026-03-01T00:00:00.000Z'),
  member('old lead', 'lead', '2026-01-01T00:00:00.000Z'),
  member('gone lead', 'lead', '2025-01-01T00:00:00.000Z', 'deactivated'),
  member('maker', 'contributor', '2026-01-01T00:00:00.000Z'),
  member('other', 'contributor', '2026-02-01T00:00:00.000Z'),
];
const names = (leaver: string, me: string) => heirsOf(people, leaver, me).map(({ id }) => id);

test('the lead who removes comes first, then leads by service, then contributors; never who goes or is closed', () => {
  expect(names('maker', 'young lead')).toEqual(['young lead', 'old lead', 'other']);
});

test('who leaves has the longest-serving lead first', () => {
  expect(names('maker', 'maker')).toEqual(['old lead', 'young lead', 'other']);
  expect(names('old lead', 'old lead')).toEqual(['young lead', 'maker', 'other']);
});

test('nobody is left of a lab of one', () => {
  expect(heirsOf([people[0]!], 'young lead', 'young lead')).toEqual([]);
});
