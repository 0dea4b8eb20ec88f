import type { Page } from '#src/contracts/common.ts';

/** Rows that one request can skip. */
const STRIDE = 500;

/**
 * The page that starts at a row, over a list that is read by cursors: skips ahead in the largest steps, then reads.
 *
 * @param offset - rows before the page, from 0
 * @param fetchPage - one page of the list
 * @returns null when the list ends before the row
 */
export async function pageAt<T>(
  offset: number,
  size: number,
  fetchPage: (query: { limit: number; cursor?: string }) => Promise<Page<T>>,
): Promise<Page<T> | null> {
  let cursor: string | undefined;
  for (let left = offset; left > 0; ) {
    const limit = Math.min(left, STRIDE);
    const skipped = await fetchPage(cursor === undefined ? { limit } : { limit, cursor });
    if (skipped.next === null) return null;
    cursor = skipped.next;
    left -= limit;
  }
  return fetchPage(cursor === undefined ? { limit: size } : { limit: size, cursor });
}

/**
 * All items of a list, page by page.
 *
 * @param onProgress - items so far and in all, after each page
 */
export async function allPages<T>(
  fetchPage: (query: { limit: number; cursor?: string }) => Promise<Page<T>>,
  onProgress: (done: number, total: number) => void,
): Promise<T[]> {
  const items: T[] = [];
  let cursor: string | undefined;
  do {
    const page = await fetchPage(cursor === undefined ? { limit: STRIDE } : { limit: STRIDE, cursor });
    items.push(...page.items);
    onProgress(items.length, Math.max(page.total, items.length));
    cursor = page.next ?? undefined;
  } while (cursor !== undefined);
  return items;
}
