import { afterEach, beforeEach, expect, vi } from 'vitest';

let noise: string[] = [];

/** Says that the next lines on the console are expected; returns what was printed so far and forgets it. */
export function takeConsole(): string[] {
  const taken = noise;
  noise = [];
  return taken;
}

beforeEach(() => {
  noise = [];
  for (const level of ['error', 'warn'] as const) {
    vi.spyOn(console, level).mockImplementation((...parts: unknown[]) => {
      noise.push(`${level}: ${parts.map(String).join(' ')}`);
    });
  }
});

afterEach(() => {
  vi.restoreAllMocks();
  expect(takeConsole(), 'a test printed to the console').toEqual([]);
});
