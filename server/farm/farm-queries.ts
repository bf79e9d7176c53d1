import { and, desc, inArray, lte } from 'drizzle-orm';
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

export async function setSetting(db: Db | Tx, setting: { key: string; validFrom: Day; value: unknown }): Promise<void> {
  await db
    .insert(datedSetting)
    .values(setting)
    .onConflictDoUpdate({ target: [datedSetting.key, datedSetting.validFrom], set: { value: setting.value } });
}

/** The values in force on a day of those settings that were set by then. */
export async function listSettings(db: Db | Tx, keys: readonly string[], on: Day): Promise<Map<string, unknown>> {
  const rows = await db
    .selectDistinctOn([datedSetting.key], { key: datedSetting.key, value: datedSetting.value })
    .from(datedSetting)
    .where(and(inArray(datedSetting.key, [...keys]), lte(datedSetting.validFrom, on)))
    .orderBy(datedSetting.key, desc(datedSetting.validFrom));
  return new Map(rows.map((row) => [row.key, row.value]));
}
