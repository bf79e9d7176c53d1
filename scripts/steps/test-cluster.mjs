import { existsSync, mkdirSync, readdirSync, rmSync, statfsSync } from 'node:fs';
import path from 'node:path';
import { removeCluster, startPostgres } from '../postgres.mjs';
import { freePort } from './ports.mjs';
import { identify } from './processes.mjs';
import { onStop } from './program.mjs';
import { dataDir } from './settings.mjs';

const roomInMemory = 512 * 1024 * 1024;

/** In memory where there is room: the tests' databases are thrown away, and a disk would only slow them down. */
function chooseFolder() {
  if (!existsSync('/dev/shm')) return dataDir;
  const { bavail, bsize } = statfsSync('/dev/shm');
  return bavail * bsize > roomInMemory ? '/dev/shm' : dataDir;
}

/** A killed run leaves its server and its files: both go before the next run, unless they are another user's. */
async function clearLeftovers(folder) {
  for (const name of readdirSync(folder)) {
    const pid = /^wholeside-test-(\d+)$/.exec(name)?.[1];
    if (!pid || identify(Number(pid))) continue;
    try {
      await removeCluster(path.join(folder, name));
    } catch (error) {
      if (error.code !== 'EACCES' && error.code !== 'EPERM') throw error;
    }
  }
}

/** A PostgreSQL server of this process's own, on a free port. The run's stops end it and remove its files. */
export async function startTestCluster() {
  const folder = chooseFolder();
  mkdirSync(folder, { recursive: true });
  await clearLeftovers(folder);
  let home = path.join(folder, `wholeside-test-${process.pid}`);
  onStop(() => rmSync(home, { recursive: true, force: true }));
  const cluster = await startPostgres({
    home,
    port: await freePort(),
    durable: false,
    settings: { max_connections: 300 },
  });
  home = cluster.home;
  return cluster;
}
