import { expect, test } from 'vitest';
import { z } from 'zod';
import { Line, Version } from '#shared/contracts/fields-schema.ts';

const Wish = z.strictObject({
  name: Line,
  version: Version,
  lines: z.array(z.string()).min(2),
  state: z.enum(['fresh', 'frozen']),
  isSure: z.boolean(),
});

function wordsFor(input: unknown): Record<string, string> {
  const parsed = Wish.safeParse(input);
  return Object.fromEntries((parsed.error?.issues ?? []).map((issue) => [issue.path.join('.'), issue.message]));
}

test('a body, when everything is missing, says of each field that it is needed', () => {
  const needed = 'This is needed.';
  expect(wordsFor({})).toEqual({
    name: needed,
    version: needed,
    lines: needed,
    state: 'Choose one of: fresh, frozen.',
    isSure: needed,
  });
  expect(wordsFor(null)).toEqual({ '': needed });
});

test('a body, when types are wrong, says what to give instead', () => {
  expect(wordsFor({ name: 3, version: 'x', lines: 4, state: 'raw', isSure: 'yes' })).toEqual({
    name: 'Give words.',
    version: 'Give a number.',
    lines: 'Give a list.',
    state: 'Choose one of: fresh, frozen.',
    isSure: 'Say yes or no.',
  });
});

test('a body, when bounds are left or a field is unknown, says so plainly', () => {
  expect(wordsFor({ name: '', version: 0, lines: ['a'], state: 'fresh', isSure: true, extra: 1 })).toEqual({
    name: 'This is needed.',
    version: 'At least 1.',
    lines: 'At least 2.',
    '': 'This field is not known here.',
  });
});
