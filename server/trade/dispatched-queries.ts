import { and, eq, inArray } from 'drizzle-orm';
import { pack, packAssignment } from '#db/schema/packs.ts';
import type { Db, Tx } from '#server/deps.ts';

export type TradePack = { lineId: string; packId: string; carcaseId: string; code: string; grams: number };

/** Packs that are filled for the lines of a reservation, gone or still in the chiller. */
export async function listTradePacks(db: Db | Tx, lineIds: readonly string[]): Promise<TradePack[]> {
  const rows = await db
    .select({
      lineId: packAssignment.reservationLineId,
      packId: pack.id,
      carcaseId: pack.carcaseId,
      code: pack.code,
      grams: pack.grams,
    })
    .from(packAssignment)
    .innerJoin(pack, eq(pack.id, packAssignment.packId))
    .where(and(eq(packAssignment.isLive, true), inArray(packAssignment.reservationLineId, [...lineIds])))
    .orderBy(pack.code);
  return rows.flatMap((row) => (row.lineId ? [{ ...row, lineId: row.lineId }] : []));
}
