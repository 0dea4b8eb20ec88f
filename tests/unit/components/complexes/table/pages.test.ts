import { expect, test } from 'vitest';
import { allPages, pageAt } from '#src/components/complexes/table/pages.ts';

/** A list of `total` numbers behind cursors that are the number of the next row. */
function listOf(total: number) {
  const asked: number[] = [];
  const fetchPage = async ({ limit, cursor }: { limit: number; cursor?: string }) => {
    asked.push(limit);
    const from = Number(cursor ?? 0);
    const to = Math.min(total, from + limit);
    const items = Array.from({ length: to - from }, (_, i) => from + i);
    return { items, total, next: to < total ? String(to) : null };
  };
  return { asked, fetchPage };
}

test('a page far in is reached in steps of at most 500', async () => {
  const { asked, fetchPage } = listOf(2000);
  const page = await pageAt(1150, 50, fetchPage);
  expect(page?.items[0]).toBe(1150);
  expect(page?.items).toHaveLength(50);
  expect(asked).toEqual([500, 500, 150, 50]);
});

test('the first page is one request; a page behind the end is none', async () => {
  const { asked, fetchPage } = listOf(60);
  expect((await pageAt(0, 50, fetchPage))?.items).toHaveLength(50);
  expect(asked).toEqual([50]);
  expect(await pageAt(100, 50, fetchPage)).toBeNull();
  expect(await pageAt(60, 50, fetchPage)).toBeNull();
});

test('all items are read once and in order, with progress', async () => {
  const { fetchPage } = listOf(1201);
  const progress: number[][] = [];
  const items = await allPages(fetchPage, (done, total) => progress.push([done, total]));
  expect(items).toEqual(Array.from({ length: 1201 }, (_, i) => i));
  expect(progress).toEqual([
    [500, 1201],
    [1000, 1201],
    [1201, 1201],
  ]);
});

test('an empty list ends at once', async () => {
  expect(await allPages(listOf(0).fetchPage, () => undefined)).toEqual([]);
});
