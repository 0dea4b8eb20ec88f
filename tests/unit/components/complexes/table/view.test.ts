import { describe, expect, test } from 'vitest';
import {
  bandBins,
  bandText,
  changeView,
  chosenOf,
  filterSearch,
  readView,
  sortBy,
  toggleValue,
  toSearch,
  withoutFilters,
} from '#src/components/complexes/table/view.ts';

const view = (search: string) => readView(new URLSearchParams(search));

describe('the address', () => {
  test('means the same view again, and is as short as it can be', () => {
    const address = '?metal=Co,Ru&dCount=6&bandFrom=420&bandTo=560&minEpsilon=20&q=en&sort=formula&page=3';
    expect(toSearch(view(address))).toBe(address);
    expect(toSearch(view(''))).toBe('');
    expect(toSearch(view('?sort=-updated&page=1'))).toBe('');
  });

  test('takes repeated values and commas alike, each once', () => {
    expect(view('?metal=Co&metal=Ru,Co').lists.metal).toEqual(['Co', 'Ru']);
  });

  test.each(['dCount=six', 'spinState=medium', 'bandFrom=-3', 'minEpsilon=x', 'sort=colour', 'page=0', 'page=1.5'])(
    'leaves out what does not fit: %s',
    (search) => expect(toSearch(view(search))).toBe(''),
  );

  test('keeps the cursor and the page out of the filters', () => {
    expect(filterSearch(view('?metal=Co&page=2&sort=metal')).toString()).toBe('metal=Co');
  });
});

describe('a change', () => {
  test('of what is chosen starts from the first page', () => {
    expect(toSearch(toggleValue(view('?metal=Co&page=4'), 'metal', 'Ru'))).toBe('?metal=Co,Ru');
    expect(toSearch(toggleValue(view('?metal=Co&page=4'), 'metal', 'Co'))).toBe('');
    expect(changeView(view('?page=4'), { q: 'bpy' }).page).toBe(1);
  });

  test('of the order turns round when it is the same column', () => {
    expect(sortBy(view('?sort=metal'), 'metal').sort).toBe('-metal');
    expect(sortBy(view('?sort=-metal'), 'metal').sort).toBe('metal');
    expect(sortBy(view('?sort=metal'), 'labs').sort).toBe('labs');
  });

  test('that clears all keeps the order', () => {
    expect(toSearch(withoutFilters(view('?metal=Co&q=x&bandTo=500&sort=labs&page=2')))).toBe('?sort=labs');
  });
});

test('each chosen thing can be taken away alone', () => {
  const chosen = chosenOf(view('?metal=Co,Ru&bandFrom=420&minEpsilon=20&q=en'));
  expect(chosen.map(({ value }) => value)).toEqual(['Co', 'Ru', 'from 420 nm, ε ≥ 20', 'en']);
  expect(chosen.map(({ without }) => toSearch(without))).toEqual([
    '?metal=Ru&bandFrom=420&minEpsilon=20&q=en',
    '?metal=Co&bandFrom=420&minEpsilon=20&q=en',
    '?metal=Co,Ru&q=en',
    '?metal=Co,Ru&bandFrom=420&minEpsilon=20',
  ]);
});

test.each([
  [{ bandFrom: '420', bandTo: '560', minEpsilon: '' }, '420–560 nm'],
  [{ bandFrom: '', bandTo: '560', minEpsilon: '' }, 'up to 560 nm'],
  [{ bandFrom: '', bandTo: '', minEpsilon: '1000' }, 'ε ≥ 1000'],
  [{ bandFrom: '', bandTo: '', minEpsilon: '' }, ''],
])('a band window in words: %o', (window, text) => expect(bandText(window)).toBe(text));

test('bins of 25 nm from 200 to 1100 nm, empty ones included', () => {
  const bins = bandBins([
    { value: 200, count: 3 },
    { value: 1075, count: 1 },
  ]);
  expect(bins).toHaveLength(36);
  expect([bins[0], bins[1], bins[35]]).toEqual([3, 0, 1]);
});
