import { and, asc, eq, gt, inArray, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import { offer } from '#db/schema/allocations.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { orderLine } from '#db/schema/orders.ts';
import { boxKind, cut } from '#db/schema/products.ts';
import type { Db } from '#server/deps.ts';

/** What an order was made of, as products: a swapped box stands for the box that it was swapped from. */
export function listOrderedProducts(db: Db, orderId: string) {
  const ordered = alias(boxKind, 'ordered');
  return db
    .select({
      name: orderLine.name,
      quantity: orderLine.quantity,
      box: { id: boxKind.id, slug: boxKind.slug, name: boxKind.name, isActive: boxKind.isActive },
      cut: { id: cut.id, name: cut.name, isSoldLoose: cut.isSoldLoose },
    })
    .from(orderLine)
    .innerJoin(offer, eq(offer.id, orderLine.offerId))
    .leftJoin(ordered, eq(ordered.id, offer.boxKindId))
    .leftJoin(boxKind, sql`${boxKind.id} = coalesce(${ordered.variantOfId}, ${ordered.id})`)
    .leftJoin(cut, eq(cut.id, offer.cutId))
    .where(eq(orderLine.orderId, orderId))
    .orderBy(asc(offer.kind), asc(orderLine.name));
}

/** What is free of these products on each open day, the next day first. */
export function listFreeProducts(db: Db, productKeys: readonly string[], now: Date) {
  return db
    .select({
      dayId: cuttingDay.id,
      day: cuttingDay.day,
      productKey: offer.productKey,
      free: sql<number>`${offer.offered} - ${offer.held} - ${offer.sold}`,
    })
    .from(offer)
    .innerJoin(cuttingDay, eq(cuttingDay.id, offer.cuttingDayId))
    .where(
      and(
        inArray(offer.productKey, [...productKeys]),
        eq(cuttingDay.state, 'open'),
        gt(cuttingDay.cutOffAt, now),
        eq(offer.isClosed, false),
      ),
    )
    .orderBy(asc(cuttingDay.day));
}
