import { spawn } from 'node:child_process';
import { closeSync, mkdirSync, openSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { isStopping, onStop } from './program.mjs';
import { Refusal } from './say.mjs';
import { logDir, root } from './settings.mjs';

/** A process number is used again by the system, so a process is named by its number and its start time. */
export function identify(pid) {
  try {
    const [state, ...fields] = readFileSync(`/proc/${pid}/stat`, 'utf8').split(') ').at(-1).split(' ');
    return state === 'Z' ? undefined : { pid, startedAt: fields[18] };
  } catch {
    return undefined;
  }
}

export function isRunning(identity) {
  return identity !== undefined && identify(identity.pid)?.startedAt === identity.startedAt;
}

/** Sends the signal and waits; after `patience` ms it sends the harder one. */
export async function stopProcess(identity, { signal = 'SIGTERM', harder = 'SIGKILL', patience = 10_000 } = {}) {
  if (!isRunning(identity)) return;
  process.kill(identity.pid, signal);
  for (const until = Date.now() + patience; isRunning(identity) && Date.now() < until;) await pause(20);
  if (!isRunning(identity)) return;
  process.kill(identity.pid, harder);
  while (isRunning(identity)) await pause(20);
}

export function openLog(name) {
  mkdirSync(logDir, { recursive: true });
  const file = path.join(logDir, `${name}.log`);
  return { file, fd: openSync(file, 'w') };
}

/** The last lines of a log, for the sentence that says what went wrong. */
export function tail(file, lines = 12) {
  const kept = readFileSync(file, 'utf8').trimEnd().split('\n').slice(-lines);
  return kept.map((line) => `    ${line}`).join('\n');
}

/** Runs a command to its end, its output in a log; refuses with the log's last lines when it fails. */
export async function run(command, args, { log: name, env = process.env, uid, gid, cwd = root } = {}) {
  const log = openLog(name);
  const child = spawn(command, args, { cwd, env, uid, gid, stdio: ['ignore', log.fd, log.fd] });
  closeSync(log.fd);
  const identity = identify(child.pid);
  const withdraw = onStop(() => stopProcess(identity));
  const code = await new Promise((resolve) => {
    child.on('error', (error) => resolve(error.message));
    child.on('exit', (exit, signal) => resolve(exit ?? signal));
  });
  withdraw();
  if (code === 0) return readFileSync(log.file, 'utf8');
  if (isStopping()) throw new Refusal('Stopped.');
  throw new Refusal(
    `${path.basename(command)} ${args[0] ?? ''} failed (${code}). The whole output is in ${log.file}; it ends with:\n${tail(log.file)}`,
  );
}
