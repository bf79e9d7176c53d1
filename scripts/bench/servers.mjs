import { spawn } from 'node:child_process';
import { closeSync } from 'node:fs';
import { setTimeout as pause } from 'node:timers/promises';
import { freePort } from '../steps/ports.mjs';
import { identify, openLog, stopProcess, tail } from '../steps/processes.mjs';
import { onStop } from '../steps/program.mjs';
import { Refusal } from '../steps/say.mjs';
import { root } from '../steps/settings.mjs';

async function answers(url) {
  try {
    return (await fetch(url, { signal: AbortSignal.timeout(5_000) })).status < 500;
  } catch {
    return false;
  }
}

/** Runs one of the measured servers in a process of its own, on a free port, until `stop`. */
export async function runServer(name, args, env, { health = '/' } = {}) {
  const port = await freePort();
  const log = openLog(`bench-${name}`);
  const child = spawn(process.execPath, args, {
    cwd: root,
    env: { ...process.env, NODE_ENV: 'production', ...env, PORT: String(port), BENCH_PORT: String(port) },
    stdio: ['ignore', log.fd, log.fd],
  });
  closeSync(log.fd);
  const identity = identify(child.pid);
  const withdraw = onStop(() => stopProcess(identity));
  const url = `http://127.0.0.1:${port}`;
  for (const until = Date.now() + 60_000; !(await answers(`${url}${health}`)); await pause(200)) {
    if (Date.now() < until && child.exitCode === null) continue;
    throw new Refusal(`The ${name} does not answer. Its log, ${log.file}, ends with:\n${tail(log.file)}`);
  }
  return {
    url,
    stop: async () => {
      withdraw();
      await stopProcess(identity);
    },
  };
}
