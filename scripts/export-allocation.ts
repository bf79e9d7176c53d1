// npm run allocation:export -- [allocation id] > day.lp: the model of a kept allocation (the newest, unless named), as any
// other solver reads it. Takes the database from DATABASE_URL, or that of the running demo.
import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';
import pg from 'pg';
import { dataDir, readPorts } from './steps/settings.mjs';

function databaseUrl(): string {
  if (process.env.DATABASE_URL) return process.env.DATABASE_URL;
  const password = path.join(process.env.PG_DATA_DIR ?? path.join(dataDir, 'postgres'), 'password');
  if (!existsSync(password)) throw new Error('Set DATABASE_URL, or start the demo first with npm start.');
  return `postgres://wholeside:${readFileSync(password, 'utf8')}@127.0.0.1:${readPorts().PG_PORT}/wholeside`;
}

const client = new pg.Client({ connectionString: databaseUrl() });
await client.connect().catch((error: Error) => {
  console.error(`The database does not answer (${error.message}): start the demo first, with npm start.`);
  process.exit(1);
});
try {
  const { rows } = await client.query<{ model: string | null }>(
    `select input->>'lpText' as model from allocation where $1::uuid is null or id = $1::uuid
     order by created_at desc limit 1`,
    [process.argv[2] ?? null],
  );
  const model = rows[0]?.model;
  if (!model) throw new Error('There is no such allocation.');
  process.stdout.write(model);
} finally {
  await client.end();
}
