import { and, asc, desc, eq, inArray, ne, sql } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { customerOrder, orderLine } from '#db/schema/orders.ts';
import type { Db, Tx } from '#server/deps.ts';

/** Days that are still worked on, soonest first. */
export function listWorkingDays(db: Db | Tx) {
  return db.select().from(cuttingDay).where(ne(cuttingDay.state, 'closed')).orderBy(asc(cuttingDay.day));
}

/** Lines of paid orders of one offer, the last to have come first. What is being packed stands too. */
export function listLinesOfOffer(db: Db | Tx, offerId: string) {
  return db
    .select({
      orderId: customerOrder.id,
      orderNo: customerOrder.orderNo,
      name: customerOrder.name,
      state: customerOrder.state,
      version: customerOrder.version,
      totalPence: customerOrder.totalPence,
      depositPence: customerOrder.depositPence,
      lineId: orderLine.id,
      quantity: orderLine.quantity,
      unitPricePence: orderLine.unitPricePence,
      discountPence: orderLine.discountPence,
      otherLines: sql<number>`(select count(*)::int from order_line other
        where other.order_id = ${customerOrder.id} and other.id <> ${orderLine.id})`,
    })
    .from(orderLine)
    .innerJoin(customerOrder, eq(customerOrder.id, orderLine.orderId))
    .where(and(eq(orderLine.offerId, offerId), inArray(customerOrder.state, ['confirmed', 'packed', 'ready'])))
    .orderBy(desc(customerOrder.reachedPaymentAt), desc(customerOrder.orderNo));
}
export type HitLine = Awaited<ReturnType<typeof listLinesOfOffer>>[number];

/** Takes what is free of an offer off sale: what a settled order gives up cannot be made. */
export async function shutOffer(tx: Tx, offerId: string): Promise<void> {
  await tx
    .update(offer)
    .set({ offered: sql`${offer.held} + ${offer.sold}` })
    .where(eq(offer.id, offerId));
}
