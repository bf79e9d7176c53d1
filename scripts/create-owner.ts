import { createInterface } from 'node:readline/promises';
import { parseArgs } from 'node:util';
import type { z } from 'zod';
import { connect } from '#db/client.ts';
import { migrate } from '#db/migrate.ts';
import { addOwner, hasFarm, NewFarm, NewOwner } from './owner/add-owner.ts';

const USAGE = `Use:
  npm run create-owner -- --email you@example.com --name "Your name" [--farm "Name of the farm" \\
    --address "Farm; Village; Postcode" --phone "01632 960100" --abattoir "Name; approval number" --cutter "Name; approval number"]
The farm's own arguments are needed once, for an empty database. The password is asked for, or read from OWNER_PASSWORD.`;

class Refused extends Error {}

function readArguments() {
  const text = { type: 'string' } as const;
  try {
    const options = { email: text, name: text, farm: text, address: text, phone: text, abattoir: text, cutter: text };
    return parseArgs({ options }).values;
  } catch (error) {
    throw new Refused(`${error instanceof Error ? error.message : String(error)}\n${USAGE}`);
  }
}

async function readPassword(): Promise<string> {
  if (process.env.OWNER_PASSWORD) return process.env.OWNER_PASSWORD;
  const terminal = createInterface({ input: process.stdin, output: process.stdout });
  try {
    return (await terminal.question('Password (at least ten characters): ')).trim();
  } finally {
    terminal.close();
  }
}

function check<S extends z.ZodType>(schema: S, values: unknown): z.output<S> {
  const parsed = schema.safeParse(values);
  if (parsed.success) return parsed.data;
  const lines = parsed.error.issues.map((issue) => `  --${issue.path.join('.')}: ${issue.message}`);
  throw new Refused(`${lines.join('\n')}\n${USAGE}`);
}

async function createOwner(databaseUrl: string): Promise<string> {
  const values = readArguments();
  await migrate(databaseUrl);
  const { db, close } = connect(databaseUrl, (error) => console.error(error.message));
  try {
    const farm = (await hasFarm(db)) ? null : check(NewFarm, values);
    check(NewOwner.pick({ email: true, name: true }), values);
    const owner = check(NewOwner, { ...values, password: await readPassword() });
    if (await addOwner(db, { owner, farm })) return `${owner.email} is an owner now and can sign in.`;
    throw new Refused(`${owner.email} has an account already. Nothing was changed.`);
  } finally {
    await close();
  }
}

try {
  const databaseUrl = process.env.DATABASE_URL;
  if (!databaseUrl) throw new Refused('Set DATABASE_URL to the database that the owner is to be made in.');
  console.log(await createOwner(databaseUrl));
} catch (error) {
  if (!(error instanceof Refused)) throw error;
  console.error(error.message);
  process.exitCode = 1;
}
