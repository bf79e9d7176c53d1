import { and, desc, eq, inArray } from 'drizzle-orm';
import { orderLine } from '#db/schema/orders.ts';
import { pack, packAssignment, stockMovement } from '#db/schema/packs.ts';
import type { Tx } from '#server/deps.ts';

/** Takes an order's packs out of it again; those that the ledger has in the order go back to the chiller. */
export async function returnPacks(tx: Tx, orderId: string, byUserId: string | null): Promise<void> {
  const ofOrder = tx.select({ id: orderLine.id }).from(orderLine).where(eq(orderLine.orderId, orderId));
  const ended = await tx
    .update(packAssignment)
    .set({ isLive: false })
    .where(and(eq(packAssignment.isLive, true), inArray(packAssignment.orderLineId, ofOrder)))
    .returning({ packId: packAssignment.packId });
  for (const { packId } of ended) {
    const [last] = await tx
      .select({ toPlace: stockMovement.toPlace })
      .from(stockMovement)
      .where(eq(stockMovement.packId, packId))
      .orderBy(desc(stockMovement.createdAt))
      .limit(1);
    const [row] = await tx.select().from(pack).where(eq(pack.id, packId));
    if (!row || last?.toPlace !== 'order') continue;
    await tx.insert(stockMovement).values({
      carcaseId: row.carcaseId,
      packId,
      fromPlace: 'order',
      toPlace: 'chiller',
      grams: row.grams,
      reason: 'order cancelled',
      byUserId,
    });
  }
}
