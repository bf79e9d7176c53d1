import { and, asc, eq, inArray, sql } from 'drizzle-orm';
import { collectionPoint, collectionSlot, customerOrder, orderLine } from '#db/schema/orders.ts';
import { mailMessage } from '#db/schema/mail.ts';
import { packAssignment } from '#db/schema/packs.ts';
import type { Db, Tx } from '#server/deps.ts';

/** Paid orders of a day, or one of them, in the order in which people come. */
export function listCollected(db: Db | Tx, where: { dayId: string } | { orderId: string }) {
  return db
    .select({
      order: customerOrder,
      pointName: collectionPoint.name,
      startsAt: collectionSlot.startsAt,
      endsAt: collectionSlot.endsAt,
      items: sql<string[]>`array(select ${orderLine.quantity} || ' × ' || ${orderLine.name} from ${orderLine}
        where ${orderLine.orderId} = ${customerOrder.id} order by ${orderLine.name})`,
      packCount: sql<number>`(select count(*)::int from ${packAssignment}
        join ${orderLine} on ${orderLine.id} = ${packAssignment.orderLineId}
        where ${orderLine.orderId} = ${customerOrder.id} and ${packAssignment.isLive})`,
    })
    .from(customerOrder)
    .innerJoin(collectionSlot, eq(collectionSlot.id, customerOrder.slotId))
    .innerJoin(collectionPoint, eq(collectionPoint.id, collectionSlot.pointId))
    .where(
      and(
        'dayId' in where ? eq(customerOrder.cuttingDayId, where.dayId) : eq(customerOrder.id, where.orderId),
        inArray(customerOrder.state, ['confirmed', 'packed', 'ready', 'collected', 'delivered', 'missed']),
      ),
    )
    .orderBy(asc(collectionSlot.startsAt), asc(collectionPoint.name), asc(customerOrder.orderNo));
}

export type CollectedRow = Awaited<ReturnType<typeof listCollected>>[number];

export function listMailsByEvent(db: Db | Tx, eventKeys: readonly string[]) {
  return db
    .select()
    .from(mailMessage)
    .where(inArray(mailMessage.eventKey, [...eventKeys]));
}
