// npm run dev: the demo with hot reload. The browser talks to Metro, which passes /api and /fonts on to the server.
import { spawn } from 'node:child_process';
import { ensurePostgres } from './postgres.mjs';
import { migrateDemoDatabase, seedDemoDatabase, startDemoCluster } from './steps/demo-database.mjs';
import { showAddresses, startServices } from './steps/demo-services.mjs';
import { ensureDependencies } from './steps/dependencies.mjs';
import { requireFreePorts } from './steps/ports.mjs';
import { identify, stopProcess } from './steps/processes.mjs';
import { onStop, program } from './steps/program.mjs';
import { Refusal } from './steps/say.mjs';
import { claimRun } from './steps/services.mjs';
import { demoEnvironment, readPorts, requireNode, root } from './steps/settings.mjs';

const metroPort = 8081;

/** Metro keeps the terminal: it takes keys and shows build errors. With CI set it would not reload. */
function startMetro(env) {
  const args = ['node_modules/expo/bin/cli', 'start', '--web', '--host', 'localhost', '--port', String(metroPort)];
  const { CI: _ci, ...rest } = env;
  const child = spawn(process.execPath, args, {
    cwd: root,
    env: { ...rest, EXPO_PUBLIC_FOLDER: 'assets/public', EXPO_OFFLINE: '1', EXPO_NO_TELEMETRY: '1', BROWSER: 'none' },
    stdio: 'inherit',
  });
  const identity = identify(child.pid);
  onStop(() => stopProcess(identity));
  return new Promise((resolve) => child.on('exit', (code) => resolve(`Metro ended (${code}).`)));
}

async function dev() {
  requireNode();
  const ports = readPorts();
  await claimRun();
  const { PG_PORT: _later, ...ownPorts } = ports;
  await requireFreePorts({ ...ownPorts, METRO_PORT: metroPort });
  await ensurePostgres();
  await ensureDependencies();
  const cluster = await startDemoCluster(ports);
  const databaseUrl = await migrateDemoDatabase(cluster, ports);
  await seedDemoDatabase(databaseUrl, ports);
  const origin = `http://localhost:${metroPort}`;
  const env = { ...demoEnvironment({ ports, databaseUrl, origin }), NODE_ENV: 'development' };
  const services = await startServices(env, ['--watch']);
  showAddresses(env);
  throw new Refusal(await Promise.race([startMetro(env), ...services.map((service) => service.ended)]));
}

await program(dev, { signalCode: 0 });
