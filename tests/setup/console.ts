import { afterEach, beforeEach, expect, vi } from 'vitest';

let errors: unknown[][] = [];

// A test that makes something complain on the console fails, unless it says which complaint it expects:
// `vi.mocked(console.error).mockImplementation(() => {})` in the test itself.
beforeEach(() => {
  errors = [];
  const original = console.error;
  vi.spyOn(console, 'error').mockImplementation((...args: unknown[]) => {
    errors.push(args);
    original(...args);
  });
});

afterEach(() => {
  expect(errors, 'nothing is written to console.error').toEqual([]);
});
