import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres';
import pg from 'pg';
import * as schema from './schema/index.ts';

export type Db = NodePgDatabase<typeof schema>;
export type Tx = Parameters<Parameters<Db['transaction']>[0]>[0];

export type Connection = { db: Db; pool: pg.Pool; close: () => Promise<void> };

/** Opens a pool of 20. The caller closes it. */
export function connect(databaseUrl: string, onIdleError: (error: Error) => void): Connection {
  const pool = new pg.Pool({ connectionString: databaseUrl, max: 20 });
  // Without a listener, a database that stops would end the process.
  pool.on('error', onIdleError);
  return { db: drizzle(pool, { schema, casing: 'snake_case' }), pool, close: () => pool.end() };
}
