import pg from 'pg';
import { migrate } from '#db/migrate.ts';
import { stopAll } from '#scripts/steps/program.mjs';
import { startTestCluster } from '#scripts/steps/test-cluster.mjs';

async function withAdmin(url: string, work: (admin: pg.Client) => Promise<unknown>): Promise<void> {
  const admin = new pg.Client({ connectionString: url });
  await admin.connect();
  try {
    await work(admin);
  } finally {
    await admin.end();
  }
}

/**
 * Makes one migrated database per run; each test file gets its own copy of it (postgres.ts). "npm test" hands over a
 * server; vitest called by hand starts one of its own.
 */
export default async function setUp(): Promise<(() => Promise<void>) | undefined> {
  // Two projects share this set-up, in one process: the second finds the template made.
  if (process.env.TEST_TEMPLATE_DATABASE) return undefined;
  const isOurs = process.env.TEST_DATABASE_URL === undefined;
  const url = (process.env.TEST_DATABASE_URL ??= (await startTestCluster()).url('postgres'));
  const template = `template_${process.pid}`;
  await withAdmin(url, (admin) => admin.query(`create database ${template}`));
  const templateUrl = new URL(url);
  templateUrl.pathname = `/${template}`;
  await migrate(templateUrl.href);
  // The workers start later and inherit both.
  process.env.TEST_TEMPLATE_DATABASE = template;
  if (isOurs) return stopAll;
  return () => withAdmin(url, (admin) => admin.query(`drop database if exists ${template} with (force)`));
}
