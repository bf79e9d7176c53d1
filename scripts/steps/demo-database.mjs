import path from 'node:path';
import { startPostgres } from '../postgres.mjs';
import { run } from './processes.mjs';
import { say, step } from './say.mjs';
import { dataDir, demoEnvironment } from './settings.mjs';

const database = 'wholeside';

export function startDemoCluster(ports) {
  const home = path.resolve(process.env.PG_DATA_DIR ?? path.join(dataDir, 'postgres'));
  return step('Starting PostgreSQL', () => startPostgres({ home, port: ports.PG_PORT }));
}

export function dropDemoDatabase(cluster) {
  cluster.query('postgres', `drop database if exists ${database} with (force)`);
}

/** `env` names the database in DATABASE_URL. */
export function migrateDatabase(env) {
  return step('Applying the migrations', () =>
    run(process.execPath, ['--import', 'tsx', 'db/migrate.ts'], { log: 'migrate', env }),
  );
}

/** Fills an empty database with the demo farm; what the seed has to say is shown. */
export async function seedDatabase(env) {
  const said = await step('Seeding the demo farm', () =>
    run(process.execPath, ['--import', 'tsx', 'scripts/seed-demo.ts'], { log: 'seed', env }),
  );
  if (said.trim()) say(said.trimEnd().replace(/^/gm, '  '));
}

/** Makes the demo's database where it is missing and brings its tables up to date. Returns its address. */
export async function migrateDemoDatabase(cluster, ports) {
  const exists = cluster.query('postgres', `select 1 from pg_database where datname = '${database}'`) === '1';
  if (!exists) cluster.query('postgres', `create database ${database}`);
  const databaseUrl = cluster.url(database);
  await migrateDatabase(demoEnvironment({ ports, databaseUrl }));
  return databaseUrl;
}

export function seedDemoDatabase(databaseUrl, ports) {
  return seedDatabase(demoEnvironment({ ports, databaseUrl }));
}
