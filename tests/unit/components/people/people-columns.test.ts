import { expect, test } from 'vitest';
import { PEOPLE_COLUMNS, partOf } from '#src/components/people/people-columns.tsx';
import { tableCsv } from '#src/components/ui/table-csv.ts';

const lab = (name: string, role: 'lead' | 'contributor') => ({ id: name, name, role, onlyLead: false });

test('the highest part is told', () => {
  expect(partOf({ steward: true, labs: [lab('North', 'lead')], folios: 1 })).toBe('steward');
  expect(partOf({ steward: false, labs: [lab('North', 'contributor')], folios: 1 })).toBe('member');
  expect(partOf({ steward: false, labs: [], folios: 1 })).toBe('guest');
  expect(partOf({ steward: false, labs: [], folios: 0 })).toBe('no access');
});

test('as CSV a row holds every lab with its role, and days', () => {
  const person = {
    id: 'a',
    name: 'Ada',
    email: 'ada@lab.example',
    steward: false,
    state: 'active' as const,
    deactivatedAt: null,
    createdAt: '2026-01-01T00:00:00.000Z',
    labs: [lab('North', 'lead'), lab('South', 'contributor')],
    folios: 2,
    lastSignInAt: '2026-11-30T08:00:00.000Z',
    secondFactor: true,
  };
  expect(tableCsv(PEOPLE_COLUMNS, [person]).split('\r\n')).toEqual([
    'Name,Address,Part,Labs,Folios,Second factor,Last sign-in,State',
    'Ada,ada@lab.example,member,"North (lead), South (contributor)",2,yes,2026-11-30,active',
  ]);
});
