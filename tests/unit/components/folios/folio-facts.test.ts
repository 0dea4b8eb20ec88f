import { expect, test } from 'vitest';
import {
  embargoInstant,
  isUnderEmbargo,
  openGrants,
  ownAccess,
  withItem,
  withoutItem,
} from '#src/components/folios/folio-facts.ts';

const now = '2026-12-01T12:00:00.000Z';
const grant = {
  id: 'g',
  email: 'a@b.example',
  name: 'A',
  level: 'view' as const,
  termsAcceptedAt: null,
  termsLicence: null,
  revokedAt: null,
  grantedBy: 'B',
  createdAt: '2026-11-01T00:00:00.000Z',
};

test('a grant is open until its end and until it is revoked', () => {
  const grants = [
    { ...grant, id: 'open', expires: '2026-12-02T00:00:00.000Z', revoked: false },
    { ...grant, id: 'over', expires: '2026-11-30T00:00:00.000Z', revoked: false },
    { ...grant, id: 'revoked', expires: '2027-12-02T00:00:00.000Z', revoked: true },
  ];
  expect(openGrants({ grants }, now).map(({ id }) => id)).toEqual(['open']);
});

test('an embargo lasts until its instant', () => {
  expect(isUnderEmbargo({ embargoUntil: '2026-12-01T12:00:00.001Z' }, now)).toBe(true);
  expect(isUnderEmbargo({ embargoUntil: now }, now)).toBe(false);
  expect(isUnderEmbargo({ embargoUntil: null }, now)).toBe(false);
  expect(embargoInstant('2027-06-01')).toBe('2027-06-01T00:00:00.000Z');
  expect(embargoInstant('')).toBeNull();
});

test('own access is told with its end', () => {
  expect(ownAccess({ level: null, expires: null })).toBe('member');
  expect(ownAccess({ level: 'view', expires: '2027-01-31T23:59:59.999Z' })).toBe('read until 31 Jan 2027');
  expect(ownAccess({ level: 'download', expires: null })).toBe('read and download');
});

test('an item is added once, and taking out leaves the choice of spectra of the others', () => {
  const items = [{ accession: 'A', spectra: ['s1'] }];
  expect(withItem(items, 'A')).toEqual(items);
  expect(withItem(items, 'B')).toEqual([
    { accession: 'A', spectra: ['s1'] },
    { accession: 'B', spectra: 'all' },
  ]);
  expect(withoutItem(withItem(items, 'B'), 'B')).toEqual(items);
  expect(withoutItem(items, 'Z')).toEqual(items);
});
