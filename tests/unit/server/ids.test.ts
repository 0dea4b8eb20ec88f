import { expect, test } from 'vitest';
import { newId } from '#src/server/ids.ts';

test('ids are UUIDs of version 7 and the variant of RFC 9562', () => {
  expect(newId()).toMatch(/^[0-9a-f]{8}-[0-9a-f]{4}-7[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/);
});

test('ids of one process sort in the order they were made, within a millisecond and when the clock goes back', () => {
  const now = Date.now() + 60_000;
  const ids = [...Array.from({ length: 10_000 }, () => newId(now)), newId(now - 5000), newId(now + 60_000)];
  expect(ids).toEqual([...ids].sort());
  expect(new Set(ids).size).toBe(ids.length);
});

test('an id tells its millisecond', () => {
  const at = Date.now() + 600_000;
  expect(Number.parseInt(newId(at).replaceAll('-', '').slice(0, 12), 16)).toBe(at);
});
