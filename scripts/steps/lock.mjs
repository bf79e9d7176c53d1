import { mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { identify, isRunning } from './processes.mjs';

function holderOf(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return undefined;
  }
}

/** One script at a time does `work`; a lock whose holder has died is taken over. */
export async function withLock(file, work) {
  mkdirSync(path.dirname(file), { recursive: true });
  for (let unreadable = 0; ; await pause(50)) {
    try {
      writeFileSync(file, JSON.stringify(identify(process.pid)), { flag: 'wx' });
      break;
    } catch (error) {
      if (error.code !== 'EEXIST') throw error;
      const holder = holderOf(file);
      // Between its creation and its writing the file is empty for a moment.
      unreadable = holder ? 0 : unreadable + 1;
      if (holder ? !isRunning(holder) : unreadable > 20) rmSync(file, { force: true });
    }
  }
  try {
    return await work();
  } finally {
    rmSync(file, { force: true });
  }
}
