import { and, asc, eq, sql } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { orderLine } from '#db/schema/orders.ts';
import { packAssignment } from '#db/schema/packs.ts';
import { boxKind } from '#db/schema/products.ts';
import type { Db, Tx } from '#server/deps.ts';
import type { LineRow } from './order-queries.ts';

export type NewLine = Omit<typeof orderLine.$inferInsert, 'id'>;

/** More of what an order has at the same price joins its line. */
export async function addLine(tx: Tx, line: NewLine): Promise<void> {
  await tx
    .insert(orderLine)
    .values(line)
    .onConflictDoUpdate({
      target: [orderLine.orderId, orderLine.offerId, orderLine.unitPricePence],
      set: {
        quantity: sql`${orderLine.quantity} + excluded.quantity`,
        discountPence: sql`${orderLine.discountPence} + excluded.discount_pence`,
      },
    });
}

/** Takes so many out of a line, with their share of its discount; the line goes with its last one. */
export async function reduceLine(
  tx: Tx,
  line: Pick<LineRow, 'id' | 'quantity'>,
  taken: { quantity: number; discountPence: number },
): Promise<void> {
  if (taken.quantity === line.quantity) {
    await tx.delete(orderLine).where(eq(orderLine.id, line.id));
    return;
  }
  await tx
    .update(orderLine)
    .set({
      quantity: sql`${orderLine.quantity} - ${taken.quantity}`,
      discountPence: sql`${orderLine.discountPence} - ${taken.discountPence}`,
    })
    .where(eq(orderLine.id, line.id));
}

/** True once a pack has been put into the line, even if it was taken out again. */
export async function hasPacks(tx: Tx, lineId: string): Promise<boolean> {
  const rows = await tx
    .select({ id: packAssignment.id })
    .from(packAssignment)
    .where(eq(packAssignment.orderLineId, lineId))
    .limit(1);
  return rows.length > 0;
}

export type SwapRow = Awaited<ReturnType<typeof listSwapRows>>[number];

/** The boxes of a day by family: a kind and its variants, which can be had instead of each other. */
export function listSwapRows(db: Db | Tx, dayId: string) {
  return db
    .select({
      offerId: offer.id,
      name: boxKind.name,
      summary: boxKind.summary,
      family: sql<string>`coalesce(${boxKind.variantOfId}, ${boxKind.id})`,
      free: sql<number>`case when ${offer.isClosed} then 0 else ${offer.offered} - ${offer.held} - ${offer.sold} end`,
      unitGrams: boxKind.guaranteedGrams,
    })
    .from(offer)
    .innerJoin(boxKind, eq(boxKind.id, offer.boxKindId))
    .where(and(eq(offer.cuttingDayId, dayId), eq(offer.kind, 'box')))
    .orderBy(asc(boxKind.position), asc(boxKind.name));
}
