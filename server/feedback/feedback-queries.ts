import { and, asc, count, desc, eq, sql } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { orderFeedback } from '#db/schema/customers.ts';
import { customerOrder, orderLine } from '#db/schema/orders.ts';
import { boxKind } from '#db/schema/products.ts';
import type { Db, Tx } from '#server/deps.ts';

export async function findFeedback(db: Db | Tx, orderId: string) {
  const rows = await db.select().from(orderFeedback).where(eq(orderFeedback.orderId, orderId));
  return rows[0] ?? null;
}

/** One an order: a second word takes the place of the first. */
export async function saveFeedback(
  db: Db | Tx,
  { orderId, stars, words, changedAt }: { orderId: string; stars: number; words: string; changedAt: Date },
): Promise<void> {
  await db
    .insert(orderFeedback)
    .values({ orderId, stars, words, createdAt: changedAt, changedAt })
    .onConflictDoUpdate({ target: orderFeedback.orderId, set: { stars, words, changedAt } });
}

export function listNewestFeedback(db: Db, limit: number) {
  return db
    .select({
      orderNo: customerOrder.orderNo,
      name: customerOrder.name,
      day: cuttingDay.day,
      lines: sql<string[]>`array(select ${orderLine.quantity} || ' × ' || ${orderLine.name} from ${orderLine}
        where ${orderLine.orderId} = ${customerOrder.id} order by ${orderLine.name})`,
      stars: orderFeedback.stars,
      words: orderFeedback.words,
      changedAt: orderFeedback.changedAt,
    })
    .from(orderFeedback)
    .innerJoin(customerOrder, eq(customerOrder.id, orderFeedback.orderId))
    .innerJoin(cuttingDay, eq(cuttingDay.id, customerOrder.cuttingDayId))
    .orderBy(desc(orderFeedback.changedAt))
    .limit(limit);
}

/** For each kind of box, how many orders with it were judged and how, in tenths of a star. */
export function sumFeedbackByBox(db: Db) {
  return db
    .select({
      name: boxKind.name,
      count: count(),
      averageTenths: sql<number>`round(avg(${orderFeedback.stars}) * 10)::int`,
    })
    .from(orderFeedback)
    .innerJoin(orderLine, eq(orderLine.orderId, orderFeedback.orderId))
    .innerJoin(offer, and(eq(offer.id, orderLine.offerId), eq(offer.kind, 'box')))
    .innerJoin(boxKind, eq(boxKind.id, offer.boxKindId))
    .groupBy(boxKind.id, boxKind.name, boxKind.position)
    .orderBy(asc(boxKind.position), asc(boxKind.name));
}
