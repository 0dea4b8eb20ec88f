import { afterEach, beforeEach, expect, vi } from 'vitest';

/** A test in which the program complains to the console fails, unless it replaced this spy and looked at it. */
let complaints: ReturnType<typeof vi.spyOn>;

beforeEach(() => {
  complaints = vi.spyOn(console, 'error');
});

afterEach(() => {
  const calls = complaints.mock.calls;
  complaints.mockRestore();
  expect(calls, 'console.error was called').toEqual([]);
});
