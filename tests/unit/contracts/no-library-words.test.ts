import { readdirSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';

const folder = path.resolve(import.meta.dirname, '../../../shared/contracts');
const files = readdirSync(folder).filter((name) => name.endsWith('-schema.ts'));

type Endpoint = { body?: z.ZodType; query?: z.ZodType };

/** How the library speaks by itself, which no person should read. */
const LIBRARY = /^(Invalid|Too (small|big)|Unrecognized|Expected|Required)/;

/** Nothing at all, and something of the wrong kind in every field that the schema names. */
function wrongInputs(schema: z.ZodType): unknown[] {
  const shape = schema instanceof z.ZodObject ? Object.keys(schema.shape) : [];
  const filled = [42, 'x', true, [], {}, null, -1, 1e12, 'x'.repeat(5_000), [{}]];
  return [undefined, {}, [], 'x', ...filled.map((value) => Object.fromEntries(shape.map((key) => [key, value])))];
}

describe('what a form is told', () => {
  test.each(files)('by the schemas of %s, never speaks the library’s own words', async (file) => {
    const schemas = (await import(path.join(folder, file))) as Record<string, unknown>;
    const spoken = Object.values(schemas).flatMap((value) => {
      const { body, query } = (value ?? {}) as Endpoint;
      return [body, query].flatMap((schema) =>
        schema instanceof z.ZodType
          ? wrongInputs(schema).flatMap(
              (input) => schema.safeParse(input).error?.issues.map((issue) => issue.message) ?? [],
            )
          : [],
      );
    });
    expect(spoken.filter((message) => LIBRARY.test(message))).toEqual([]);
  });
});
