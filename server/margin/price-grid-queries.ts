import { desc, lte } from 'drizzle-orm';
import { priceGrid } from '#db/schema/margin.ts';
import type { Db, Tx } from '#server/deps.ts';
import type { Day } from '#shared/domain/day.ts';

export type PriceGridRow = typeof priceGrid.$inferSelect;

/** Newest edition first. */
export function listPriceGrids(db: Db | Tx): Promise<PriceGridRow[]> {
  return db.select().from(priceGrid).orderBy(desc(priceGrid.edition));
}

/** The one in force on a day: the latest not dated after it; of two dated alike the later edition. */
export async function findPriceGrid(db: Db | Tx, on: Day): Promise<PriceGridRow | null> {
  const rows = await db
    .select()
    .from(priceGrid)
    .where(lte(priceGrid.validFrom, on))
    .orderBy(desc(priceGrid.validFrom), desc(priceGrid.edition))
    .limit(1);
  return rows[0] ?? null;
}

/** Null when somebody else saved this edition first. */
export async function insertPriceGrid(tx: Tx, row: typeof priceGrid.$inferInsert): Promise<PriceGridRow | null> {
  const rows = await tx.insert(priceGrid).values(row).onConflictDoNothing().returning();
  return rows[0] ?? null;
}
