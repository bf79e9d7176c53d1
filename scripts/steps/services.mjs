import { spawn } from 'node:child_process';
import { closeSync, existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { identify, isRunning, openLog, stopProcess, tail } from './processes.mjs';
import { isStopping, onStop } from './program.mjs';
import { Refusal, say } from './say.mjs';
import { dataDir, root } from './settings.mjs';

const runFile = path.join(dataDir, 'running.json');
const readRunFile = () => (existsSync(runFile) ? JSON.parse(readFileSync(runFile, 'utf8')) : undefined);

/** Refuses while another `npm start` or `npm run dev` of this checkout is running. */
export function refuseWhileRunning() {
  const earlier = readRunFile();
  if (earlier && isRunning(earlier.starter)) {
    throw new Refusal(
      `Wholeside is already running here (process ${earlier.starter.pid}): stop it first, with Ctrl-C in its window.`,
    );
  }
  return earlier;
}

/** Takes the checkout for this run, and ends what a killed run has left behind. */
export async function claimRun() {
  const earlier = refuseWhileRunning();
  for (const service of earlier?.services ?? []) {
    if (!isRunning(service)) continue;
    say(`- Stopping what an earlier run left behind (process ${service.pid})`);
    await stopProcess(service);
  }
  mkdirSync(dataDir, { recursive: true });
  writeFileSync(runFile, JSON.stringify({ starter: identify(process.pid), services: [] }));
  onStop(() => rmSync(runFile, { force: true }));
}

function record(identity) {
  const running = readRunFile();
  writeFileSync(runFile, JSON.stringify({ ...running, services: [...running.services, identity] }));
}

async function answers(url) {
  try {
    const response = await fetch(url, { signal: AbortSignal.timeout(2_000) });
    await response.arrayBuffer();
    return response.ok;
  } catch {
    return false;
  }
}

/**
 * Starts one of our programs and waits until `health` answers. It has a process group of its own, so that Ctrl-C reaches
 * this script only, which then stops them in reverse order. `ended` settles with a sentence when it ends by itself.
 */
export async function startService({ name, args, env, health }) {
  const log = openLog(name.replaceAll(' ', '-'));
  const child = spawn(process.execPath, args, { cwd: root, env, detached: true, stdio: ['ignore', log.fd, log.fd] });
  closeSync(log.fd);
  const identity = identify(child.pid);
  record(identity);
  onStop(() => stopProcess(identity));
  const ended = new Promise((resolve) => {
    child.on('exit', (code, signal) =>
      resolve(`The ${name} ended (${code ?? signal}). Its log, ${log.file}, ends with:\n${tail(log.file)}`),
    );
  });
  const ready = async () => {
    for (const until = Date.now() + 90_000; Date.now() < until && !isStopping(); await pause(100)) {
      if (await answers(health)) return undefined;
    }
    return `The ${name} does not answer at ${health}. Its log, ${log.file}, ends with:\n${tail(log.file)}`;
  };
  const trouble = await Promise.race([ready(), ended]);
  if (trouble) throw new Refusal(trouble);
  return { ended };
}
