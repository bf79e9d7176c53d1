import { and, eq, inArray, sql } from 'drizzle-orm';
import { pack, packAssignment } from '#db/schema/packs.ts';
import { reservation } from '#db/schema/trade.ts';
import type { Tx } from '#server/deps.ts';

/** Packs that were put to butchers' lines. */
export function listTradePacks(tx: Tx, lineIds: readonly string[]) {
  return tx
    .select({
      lineId: packAssignment.reservationLineId,
      packId: pack.id,
      carcaseId: pack.carcaseId,
      grams: pack.grams,
    })
    .from(packAssignment)
    .innerJoin(pack, eq(pack.id, packAssignment.packId))
    .where(and(eq(packAssignment.isLive, true), inArray(packAssignment.reservationLineId, [...lineIds])));
}

export async function markDispatched(tx: Tx, reservationIds: readonly string[]): Promise<void> {
  await tx
    .update(reservation)
    .set({ state: 'dispatched', version: sql`${reservation.version} + 1` })
    .where(and(inArray(reservation.id, [...reservationIds]), eq(reservation.state, 'confirmed')));
}
