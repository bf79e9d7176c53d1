import pg from 'pg';
import { migrate } from '#db/migrate.ts';

async function withAdmin(url: string, work: (admin: pg.Client) => Promise<unknown>): Promise<void> {
  const admin = new pg.Client({ connectionString: url });
  await admin.connect();
  try {
    await work(admin);
  } finally {
    await admin.end();
  }
}

/** Makes one migrated database per run; each test file gets its own copy of it (postgres.ts). */
export default async function setUp(): Promise<(() => Promise<void>) | undefined> {
  const url = process.env.TEST_DATABASE_URL;
  if (!url) throw new Error('TEST_DATABASE_URL is not set: run the tests with "npm test", which starts a database.');
  // Two projects share this set-up, in one process: the second finds the template made.
  if (process.env.TEST_TEMPLATE_DATABASE) return undefined;
  const template = `template_${process.pid}`;
  await withAdmin(url, (admin) => admin.query(`create database ${template}`));
  const templateUrl = new URL(url);
  templateUrl.pathname = `/${template}`;
  await migrate(templateUrl.href);
  // The workers start later and inherit it.
  process.env.TEST_TEMPLATE_DATABASE = template;
  return () => withAdmin(url, (admin) => admin.query(`drop database if exists ${template} with (force)`));
}
