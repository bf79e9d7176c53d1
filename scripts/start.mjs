// npm start: the whole demo on this machine, installing and building what is missing.
import { ensurePostgres } from './postgres.mjs';
import { migrateDemoDatabase, seedDemoDatabase, startDemoCluster } from './steps/demo-database.mjs';
import { showAddresses, startServices } from './steps/demo-services.mjs';
import { ensureDependencies } from './steps/dependencies.mjs';
import { requireFreePorts } from './steps/ports.mjs';
import { program } from './steps/program.mjs';
import { Refusal } from './steps/say.mjs';
import { claimRun } from './steps/services.mjs';
import { demoEnvironment, readPorts, requireNode } from './steps/settings.mjs';
import { ensureWebApp } from './steps/web-app.mjs';

async function start() {
  requireNode();
  const ports = readPorts();
  await claimRun();
  // PostgreSQL's port is looked at when it starts: its server may be running and simply be joined.
  const { PG_PORT: _later, ...ownPorts } = ports;
  await requireFreePorts(ownPorts);
  await ensurePostgres();
  await ensureDependencies();
  const cluster = await startDemoCluster(ports);
  const databaseUrl = await migrateDemoDatabase(cluster, ports);
  await seedDemoDatabase(databaseUrl, ports);
  await ensureWebApp();
  const env = demoEnvironment({ ports, databaseUrl });
  const services = await startServices(env);
  showAddresses(env);
  throw new Refusal(await Promise.race(services.map((service) => service.ended)));
}

await program(start, { signalCode: 0 });
