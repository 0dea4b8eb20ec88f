import { expect, test } from 'vitest';
import {
  addressOf,
  hasFilter,
  orderOf,
  queryFrom,
  rangeNm,
  requestOf,
  sortedBy,
  toggled,
} from '#src/components/spectra/list/spectra-query.ts';

test('a query goes into the address and comes back from it', () => {
  const query = { ...queryFrom(''), lab: ['a', 'b'], flag: ['saturated'], q: ' green ', sort: 'title' };
  expect(addressOf(query)).toBe('?lab=a%2Cb&flag=saturated&q=green&sort=title');
  expect(queryFrom(addressOf(query))).toEqual({ ...query, q: 'green' });
  expect(addressOf(queryFrom(''))).toBe('');
});

test('lists may be repeated in an address or hold commas', () => {
  expect(queryFrom('?technique=solution&technique=emission,reflectance').technique).toEqual([
    'solution',
    'emission',
    'reflectance',
  ]);
});

test('another filter or order starts from the first page', () => {
  const later = { ...queryFrom(''), cursors: ['x'] };
  expect(requestOf(later)).toContain('cursor=x');
  expect(toggled(later, 'lab', 'a')).toMatchObject({ lab: ['a'], cursors: [] });
  expect(toggled(toggled(later, 'lab', 'a'), 'lab', 'a').lab).toEqual([]);
  expect(sortedBy(later, 'title').cursors).toEqual([]);
});

test('a column orders the rows, the same one again turns them round; the latest come first', () => {
  const start = queryFrom('');
  expect(orderOf(start, 'created')).toBe('falling');
  expect(sortedBy(start, 'created').sort).toBe('created');
  expect(sortedBy(sortedBy(start, 'title'), 'title').sort).toBe('-title');
  expect(orderOf(start, 'title')).toBeNull();
});

test('an order alone is no filter', () => {
  expect(hasFilter(queryFrom('?sort=title'))).toBe(false);
  expect(hasFilter(queryFrom('?flag=saturated'))).toBe(true);
});

test('the range is told in nm, the shorter wavelength first', () => {
  expect(rangeNm({ xMin: 12_500, xMax: 40_000 })).toEqual([250, 800]);
});
