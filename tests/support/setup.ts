import { afterEach, beforeEach, expect, vi } from 'vitest';
import './matchers.ts';

/** A test that means to provoke console.error or console.warn says so with `expectConsole()`. */
let allowed = false;
export function expectConsole(): void {
  allowed = true;
}

beforeEach(() => {
  allowed = false;
  vi.spyOn(console, 'error');
  vi.spyOn(console, 'warn');
});

afterEach(() => {
  const calls = [...vi.mocked(console.error).mock.calls, ...vi.mocked(console.warn).mock.calls];
  vi.restoreAllMocks();
  if (!allowed) expect(calls, 'console.error or console.warn was called').toEqual([]);
});
