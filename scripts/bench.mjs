// npm run bench: five measures, each as a ratio within this run, so that the machine falls out of them.
// npm run bench -- allocation (or busy, list, load or lighthouse) takes one of them.
import { spawn } from 'node:child_process';
import { ensurePostgres } from './postgres.mjs';
import { measureBusy } from './bench/allocation-busy.mjs';
import { measureBoxList } from './bench/box-list.mjs';
import { measureFirstLoad } from './bench/first-load.mjs';
import { measureLighthouse } from './bench/lighthouse.mjs';
import { runServer } from './bench/servers.mjs';
import { ensureChromium } from './steps/chromium.mjs';
import { freePort } from './steps/ports.mjs';
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
async function prepareFarm() {
  await ensurePostgres();
  const cluster = await step('Starting a PostgreSQL server for the bench', startTestCluster);
  cluster.query('postgres', 'create database bench');
  const databaseUrl = cluster.url('bench');
  const env = demoEnvironment({ ports: readPorts(), databaseUrl });
  await migrateDatabase(env);
  await seedDatabase(env);
  return { databaseUrl, env };
}

let farm;

async function startShop({ main = 'server/main.ts', extra = {} } = {}) {
  const { databaseUrl, env } = await (farm ??= prepareFarm());
  const args = ['--import', 'tsx', main];
  const server = await runServer('shop', args, { ...env, ...extra }, { health: '/api/health' });
  return { ...server, databaseUrl };
}

/** What a visitor notices of an allocation at work. */
async function benchBusy() {
  const port = await freePort();
  const shop = await startShop({
    main: 'scripts/bench/allocation-busy-server.ts',
    extra: { BENCH_CONTROL_PORT: String(port) },
  });
  const rows = await step('Asking the server at rest and while it solves', () =>
    measureBusy(shop.url, `http://127.0.0.1:${port}`),
  );
  say('Answers of the API while an allocation is solved, against idle:');
  console.table(rows);
  await shop.stop();
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
  if (!['busy', 'list', 'load', 'lighthouse'].some(wants)) return;
  await ensureWebApp();
  if (wants('busy')) await benchBusy();
  if (!['list', 'load', 'lighthouse'].some(wants)) return;
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
