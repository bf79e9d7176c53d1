import { and, asc, desc, eq, gt, inArray, lte, notInArray, sql } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { user } from '#db/schema/auth.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { marketingContact } from '#db/schema/customers.ts';
import { customerOrder } from '#db/schema/orders.ts';
import { standingOrder } from '#db/schema/standing-orders.ts';
import type { Db } from '#server/deps.ts';

const hasNoStanding = sql`not exists (select 1 from ${standingOrder} join ${user} on ${user.id} = ${standingOrder.userId}
  where lower(${user.email}) = ${marketingContact.email} and ${standingOrder.state} = 'active')`;

/** Confirmed orders whose day closes between two instants. */
export function listClosing(db: Db, { after, until }: { after: Date; until: Date }) {
  return db
    .select({
      orderId: customerOrder.id,
      reachedPaymentAt: customerOrder.reachedPaymentAt,
      cutOffAt: cuttingDay.cutOffAt,
    })
    .from(customerOrder)
    .innerJoin(cuttingDay, eq(cuttingDay.id, customerOrder.cuttingDayId))
    .where(and(eq(customerOrder.state, 'confirmed'), gt(cuttingDay.cutOffAt, after), lte(cuttingDay.cutOffAt, until)))
    .orderBy(asc(cuttingDay.cutOffAt), asc(customerOrder.orderNo));
}

/**
 * The newest order of everybody who agreed to marketing mail; a checkout that was never paid is no order. Who has a
 * standing order needs no invitation.
 */
export function listNewestOrders(db: Db) {
  return db
    .selectDistinctOn([marketingContact.id], {
      contactId: marketingContact.id,
      token: marketingContact.token,
      order: customerOrder,
      day: cuttingDay.day,
    })
    .from(marketingContact)
    .innerJoin(customerOrder, sql`lower(${customerOrder.email}) = ${marketingContact.email}`)
    .innerJoin(cuttingDay, eq(cuttingDay.id, customerOrder.cuttingDayId))
    .where(
      and(
        eq(marketingContact.isSubscribed, true),
        notInArray(customerOrder.state, ['awaiting payment', 'cancelled']),
        hasNoStanding,
      ),
    )
    .orderBy(marketingContact.id, desc(cuttingDay.day), desc(customerOrder.orderNo));
}

/** The next open day with a box that is free; null while there is nothing to invite to. */
export async function findNextDayOnSale(db: Db, now: Date) {
  const rows = await db
    .select({ day: cuttingDay.day, cutOffAt: cuttingDay.cutOffAt })
    .from(cuttingDay)
    .innerJoin(offer, eq(offer.cuttingDayId, cuttingDay.id))
    .where(
      and(
        eq(cuttingDay.state, 'open'),
        gt(cuttingDay.cutOffAt, now),
        inArray(offer.kind, ['box']),
        eq(offer.isClosed, false),
        sql`${offer.offered} > ${offer.held} + ${offer.sold}`,
      ),
    )
    .orderBy(asc(cuttingDay.day))
    .limit(1);
  return rows[0] ?? null;
}
