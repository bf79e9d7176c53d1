import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate as applyMigrations } from 'drizzle-orm/node-postgres/migrator';
import { runMigrations as migrateQueue } from 'graphile-worker';
import pg from 'pg';

const LOCK = 7_240_611;

/** Brings a database to the newest schema. Safe to call from two processes: one waits for the other. */
export async function migrate(databaseUrl: string): Promise<void> {
  const pool = new pg.Pool({ connectionString: databaseUrl, max: 1 });
  try {
    await pool.query('select pg_advisory_lock($1)', [LOCK]);
    await applyMigrations(drizzle(pool), { migrationsFolder: path.join(import.meta.dirname, 'migrations') });
    await pool.query('select pg_advisory_unlock($1)', [LOCK]);
  } finally {
    await pool.end();
  }
  await migrateQueue({ connectionString: databaseUrl });
}

if (process.argv[1] && import.meta.url === pathToFileURL(process.argv[1]).href) {
  const url = process.env.DATABASE_URL;
  if (!url) throw new Error('DATABASE_URL is not set.');
  await migrate(url);
}
