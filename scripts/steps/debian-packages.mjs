import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { run } from './processes.mjs';
import { Refusal, step } from './say.mjs';

/** The words that go before a command to run it as root; refuses when this user may not. */
export function asRoot(names) {
  if (process.getuid() === 0) return [];
  if (spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' }).status === 0) return ['sudo', '-n'];
  throw new Refusal(
    `${names.join(' and ')} must be installed and this user may not do it: run "sudo apt-get install ${names.join(' ')}" once, then start again.`,
  );
}

async function apt(prefix, args) {
  // sudo drops the environment, so the variable goes through env.
  const command = [
    ...prefix,
    'env',
    'DEBIAN_FRONTEND=noninteractive',
    'apt-get',
    '-o',
    'DPkg::Lock::Timeout=300',
    ...args,
  ];
  await run(command[0], command.slice(1), { log: 'apt' });
}

/** Installs Debian's packages with what they need and nothing more. `before` runs between two of them. */
export async function installPackages(names, { first, before } = {}) {
  const prefix = asRoot(names);
  if (!existsSync('/usr/bin/apt-get'))
    throw new Refusal(`Install ${names.join(' and ')} first: this is no Debian machine.`);
  await step(`Installing ${names.join(', ')} from Debian's packages`, async () => {
    await apt(prefix, ['update']);
    if (first) await apt(prefix, ['install', '-y', '--no-install-recommends', first]);
    if (before) await run([...prefix, ...before][0], [...prefix, ...before].slice(1), { log: 'apt' });
    await apt(prefix, ['install', '-y', '--no-install-recommends', ...names]);
  });
}
