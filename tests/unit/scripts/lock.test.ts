import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { withLock } from '#scripts/steps/lock.mjs';

let folder: string;
let file: string;

beforeEach(() => {
  folder = mkdtempSync(path.join(tmpdir(), 'wholeside-lock-'));
  file = path.join(folder, 'web-app.lock');
});

afterEach(() => rmSync(folder, { recursive: true, force: true }));

test('two scripts that want one lock, at the same time, work one after the other', async () => {
  const story: string[] = [];
  const work = (name: string) =>
    withLock(file, async () => {
      story.push(`${name} begins`);
      await new Promise((resolve) => setImmediate(resolve));
      story.push(`${name} ends`);
    });
  await Promise.all([work('one'), work('two')]);
  expect(story).toEqual(['one begins', 'one ends', 'two begins', 'two ends']);
  expect(existsSync(file)).toBe(false);
});

test('a lock, when its holder has died, is taken over', async () => {
  // No process has this number and this start.
  writeFileSync(file, JSON.stringify({ pid: process.pid, startedAt: '1' }));
  await expect(withLock(file, () => Promise.resolve('done'))).resolves.toBe('done');
});

test('a lock, when the work under it fails, is given back', async () => {
  await expect(withLock(file, () => Promise.reject(new Error('no room')))).rejects.toThrow('no room');
  expect(existsSync(file)).toBe(false);
});
