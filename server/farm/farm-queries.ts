import { and, desc, eq, lte } from 'drizzle-orm';
import { datedSetting, farm } from '#db/schema/farm.ts';
import type { Day } from '#shared/domain/day.ts';
import type { Db, Tx } from '#server/deps.ts';

export type Farm = typeof farm.$inferSelect;

export async function getFarm(db: Db | Tx): Promise<Farm> {
  const rows = await db.select().from(farm);
  const row = rows[0];
  if (!row) throw new Error('The farm has not been set up: run `npm run create-owner`.');
  return row;
}

/** The value of a setting in force on a day, or null when none was set by then. */
export async function findSetting(db: Db | Tx, key: string, on: Day): Promise<unknown> {
  const rows = await db
    .select({ value: datedSetting.value })
    .from(datedSetting)
    .where(and(eq(datedSetting.key, key), lte(datedSetting.validFrom, on)))
    .orderBy(desc(datedSetting.validFrom))
    .limit(1);
  return rows[0]?.value ?? null;
}

export async function setSetting(db: Db | Tx, setting: { key: string; validFrom: Day; value: unknown }): Promise<void> {
  await db
    .insert(datedSetting)
    .values(setting)
    .onConflictDoUpdate({ target: [datedSetting.key, datedSetting.validFrom], set: { value: setting.value } });
}
