import { afterEach, beforeEach, expect, vi } from 'vitest';

/** An error on the console that a test does not expect fails it. */
beforeEach(() => {
  vi.spyOn(console, 'error').mockImplementation(() => {});
});

afterEach(() => {
  const calls = vi.mocked(console.error).mock.calls;
  vi.mocked(console.error).mockRestore();
  expect(calls).toEqual([]);
});
