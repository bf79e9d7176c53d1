// npm run reset: throws the demo's data away and seeds the farm afresh.
import { rmSync } from 'node:fs';
import { dropDemoDatabase, migrateDemoDatabase, seedDemoDatabase, startDemoCluster } from './steps/demo-database.mjs';
import { ensureDependencies } from './steps/dependencies.mjs';
import { program } from './steps/program.mjs';
import { say } from './steps/say.mjs';
import { refuseWhileRunning } from './steps/services.mjs';
import { demoEnvironment, readPorts, requireNode } from './steps/settings.mjs';

async function reset() {
  requireNode();
  const ports = readPorts();
  refuseWhileRunning();
  await ensureDependencies();
  const cluster = await startDemoCluster(ports);
  dropDemoDatabase(cluster);
  const databaseUrl = await migrateDemoDatabase(cluster, ports);
  const { MAIL_FAKE_DIR, PAYMENTS_FAKE_DIR } = demoEnvironment({ ports, databaseUrl });
  for (const folder of [MAIL_FAKE_DIR, PAYMENTS_FAKE_DIR]) rmSync(folder, { recursive: true, force: true });
  await seedDemoDatabase(databaseUrl, ports);
  say('The demo farm is as new: npm start');
}

await program(reset);
