import { count, eq, isNotNull, sql } from 'drizzle-orm';
import { auditEntry } from '#db/schema/audit.ts';
import { user } from '#db/schema/auth.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { datedSetting, farm } from '#db/schema/farm.ts';
import { customerOrder } from '#db/schema/orders.ts';
import { pack } from '#db/schema/packs.ts';
import { reservation } from '#db/schema/trade.ts';
import type { Db } from '#db/client.ts';
import type { Jobs } from '#server/queue.ts';
import type { Day } from '#shared/domain/day.ts';

const KEY = 'demo farm';

type Counts = { audit: number; users: number; orders: number; packs: number; reservations: number; days: number };
type Mark = { next: Day; counts: Counts };

export type DemoState = 'empty' | 'current' | 'stale and untouched' | 'stale and used' | 'not a demo';

/** Rows that grow with whatever a person does: when they are as the seed left them, nobody has used the demo. */
async function countRows(db: Db): Promise<Counts> {
  const of = async (table: Parameters<typeof db.$count>[0]) => db.$count(table);
  return {
    // Only what people did: the server's own jobs leave entries without a name.
    audit: await db.$count(auditEntry, isNotNull(auditEntry.byUserId)),
    users: await of(user),
    orders: await of(customerOrder),
    packs: await of(pack),
    reservations: await of(reservation),
    days: await of(cuttingDay),
  };
}

/** Leaves a note of what was seeded, by which a later start knows whether anybody has used it. */
export async function markDemo(db: Db, next: Day, today: Day): Promise<void> {
  const value: Mark = { next, counts: await countRows(db) };
  await db.insert(datedSetting).values({ key: KEY, validFrom: today, value });
}

export async function readDemoState(db: Db, today: Day): Promise<DemoState> {
  const [farms] = await db.select({ rows: count() }).from(farm);
  if (farms?.rows === 0) return 'empty';
  const [note] = await db.select({ value: datedSetting.value }).from(datedSetting).where(eq(datedSetting.key, KEY));
  if (!note) return 'not a demo';
  const mark = note.value as Mark;
  if (today <= mark.next) return 'current';
  const counts = await countRows(db);
  const isUntouched = (Object.keys(counts) as (keyof Counts)[]).every((key) => counts[key] === mark.counts[key]);
  return isUntouched ? 'stale and untouched' : 'stale and used';
}

/** Empties every table of ours and the queue; the schema stays. */
export async function emptyDatabase(db: Db): Promise<void> {
  const { rows } = await db.execute<{ name: string }>(
    sql`select quote_ident(tablename) as name from pg_tables where schemaname = 'public'`,
  );
  await db.execute(sql.raw(`truncate ${rows.map(({ name }) => name).join(', ')} restart identity cascade`));
  await db.execute(sql`delete from graphile_worker._private_jobs`);
}

/** Jobs that the seed's own services left behind and nobody waits for, such as planning again what was planned since. */
export async function forgetJobs(db: Db, names: readonly (keyof Jobs)[]): Promise<void> {
  const list = sql.join(
    names.map((name) => sql`${name}`),
    sql`, `,
  );
  await db.execute(sql`delete from graphile_worker._private_jobs where task_id in
    (select id from graphile_worker._private_tasks where identifier in (${list}))`);
}
