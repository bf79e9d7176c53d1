// npm run allocation:export -- FILE [allocation id]: writes the model of a kept allocation (the newest, unless named) for any
// other solver, as LP or MPS by the file's ending. Takes the database from DATABASE_URL, or that of the running demo.
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import pg from 'pg';
import { lpToMps } from '#shared/engine/linear/lp-to-mps.ts';
import { dataDir, readPorts } from './steps/settings.mjs';

const [file = '', allocationId = null] = process.argv.slice(2);
if (!/\.(lp|mps)$/.test(file)) {
  console.error('Name a file that ends in .lp or .mps: npm run allocation:export -- day.lp');
  process.exit(1);
}

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
    [allocationId],
  );
  const model = rows[0]?.model;
  if (!model) throw new Error('There is no such allocation.');
  writeFileSync(file, file.endsWith('.mps') ? lpToMps(model) : model);
} finally {
  await client.end();
}
