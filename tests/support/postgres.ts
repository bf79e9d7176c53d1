import { randomUUID } from 'node:crypto';
import pg from 'pg';

function required(value: string | undefined): string {
  if (value) return value;
  throw new Error('The test database is not set up: run the tests with "npm test"; only "api" and "browser" have one.');
}

const adminUrl = () => required(process.env.TEST_DATABASE_URL);

async function asAdmin(sql: string): Promise<void> {
  const client = new pg.Client({ connectionString: adminUrl() });
  await client.connect();
  try {
    await client.query(sql);
  } finally {
    await client.end();
  }
}

/** A database of this test file's own: a copy of the migrated template. Close every connection to it before `drop`. */
export async function makeDatabase(): Promise<{ url: string; drop: () => Promise<void> }> {
  const name = `test_${randomUUID().replaceAll('-', '')}`;
  await asAdmin(`create database ${name} template ${required(process.env.TEST_TEMPLATE_DATABASE)} strategy file_copy`);
  const url = new URL(adminUrl());
  url.pathname = `/${name}`;
  return { url: url.href, drop: () => asAdmin(`drop database if exists ${name} with (force)`) };
}
