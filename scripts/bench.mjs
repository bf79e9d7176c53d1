// npm run bench: four measures, each as a ratio within this run, so that the machine falls out of them.
// npm run bench -- allocation (or list, load or lighthouse) takes one of them.
import { spawn } from 'node:child_process';
import { ensurePostgres } from './postgres.mjs';
import { measureBoxList } from './bench/box-list.mjs';
import { measureFirstLoad } from './bench/first-load.mjs';
import { measureLighthouse } from './bench/lighthouse.mjs';
import { runServer } from './bench/servers.mjs';
import { ensureChromium } from './steps/chromium.mjs';
import { migrateDatabase, seedDatabase } from './steps/demo-database.mjs';
import { ensureDependencies } from './steps/dependencies.mjs';
import { identify, stopProcess } from './steps/processes.mjs';
import { onStop, program } from './steps/program.mjs';
import { Refusal, say, step } from './steps/say.mjs';
import { demoEnvironment, readPorts, requireNode, root } from './steps/settings.mjs';
import { ensureSolvers } from './steps/solvers.mjs';
import { startTestCluster } from './steps/test-cluster.mjs';
import { ensureWebApp } from './steps/web-app.mjs';

const kib = (bytes) => `${(bytes / 1024).toFixed(0)} KiB`;

function benchAllocation() {
  const child = spawn(process.execPath, ['--import', 'tsx', 'scripts/bench/allocation-bench.ts'], {
    cwd: root,
    stdio: 'inherit',
  });
  const identity = identify(child.pid);
  onStop(() => stopProcess(identity));
  return new Promise((resolve, reject) => {
    child.on('exit', (code) =>
      code === 0 ? resolve() : reject(new Refusal(`The allocation bench ended with ${code}.`)),
    );
  });
}

/** The demo's own farm on a database of this run's own. */
async function startShop() {
  await ensurePostgres();
  const cluster = await step('Starting a PostgreSQL server for the bench', startTestCluster);
  cluster.query('postgres', 'create database bench');
  const databaseUrl = cluster.url('bench');
  const env = demoEnvironment({ ports: readPorts(), databaseUrl });
  await migrateDatabase(env);
  await seedDatabase(env);
  const server = await runServer('shop', ['--import', 'tsx', 'server/main.ts'], env, { health: '/api/health' });
  return { ...server, databaseUrl };
}

async function bench() {
  requireNode();
  const wanted = process.argv.slice(2);
  const wants = (name) => wanted.length === 0 || wanted.includes(name);
  await ensureDependencies();
  if (wants('allocation')) {
    await ensureSolvers();
    await benchAllocation();
  }
  if (!['list', 'load', 'lighthouse'].some(wants)) return;
  await ensureWebApp();
  if (wants('load') || wants('lighthouse')) await ensureChromium();
  const shop = await startShop();
  if (wants('list')) {
    const { list, bare, ratio } = await step('Asking for the public box list', () =>
      measureBoxList(shop.url, shop.databaseUrl),
    );
    say(`Public box list against a bare pg handler: ${ratio.toFixed(2)} of its throughput`);
    say(`  ${list.toFixed(0)} answers a second against ${bare.toFixed(0)}, 20 connections, median of 3 rounds`);
  }
  if (wants('load')) {
    const { ours, floor, ratio } = await measureFirstLoad(shop.url);
    say(`JavaScript of the shop's first page against an empty app: ${ratio.toFixed(2)} times`);
    say(
      `  ${kib(ours.bytes)} in ${ours.files} files against ${kib(floor.bytes)} in ${floor.files}, as gzip sends them`,
    );
  }
  if (wants('lighthouse')) {
    say("Lighthouse, a phone's settings, against a page with one heading, median of seven rounds:");
    console.table(await measureLighthouse(shop.url));
  }
  await shop.stop();
}

await program(bench);
