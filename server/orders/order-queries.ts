import { and, asc, eq, sql, type SQL } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { collectionPoint, collectionSlot, customerOrder, orderLine } from '#db/schema/orders.ts';
import { pack, packAssignment } from '#db/schema/packs.ts';
import { cut } from '#db/schema/products.ts';
import type { Db, Tx } from '#server/deps.ts';
import type { HeldLine } from './hold.ts';

export type OrderRow = typeof customerOrder.$inferSelect;
export type NewOrderRow = typeof customerOrder.$inferInsert;

/** Null when this basket has its order already; a second press waits here for the first to end. */
export async function insertOrder(tx: Tx, order: NewOrderRow): Promise<OrderRow | null> {
  const rows = await tx
    .insert(customerOrder)
    .values(order)
    .onConflictDoNothing({ target: customerOrder.basketKey })
    .returning();
  return rows[0] ?? null;
}

export async function findOrder(db: Db | Tx, where: { id?: string; token?: string; basketKey?: string }) {
  const rows = await db.select().from(customerOrder).where(matches(where));
  return rows[0] ?? null;
}

/** Every change of an order begins here: the row first, then its offers in id order, then its slot. */
export async function lockOrder(tx: Tx, where: { id?: string; token?: string }): Promise<OrderRow | null> {
  const rows = await tx.select().from(customerOrder).where(matches(where)).for('update');
  return rows[0] ?? null;
}

function matches({ id, token, basketKey }: { id?: string; token?: string; basketKey?: string }): SQL | undefined {
  if (id) return eq(customerOrder.id, id);
  if (token) return eq(customerOrder.token, token);
  return eq(customerOrder.basketKey, basketKey ?? '');
}

export async function updateOrder(tx: Db | Tx, orderId: string, change: Partial<NewOrderRow>): Promise<OrderRow> {
  const rows = await tx.update(customerOrder).set(change).where(eq(customerOrder.id, orderId)).returning();
  const row = rows[0];
  if (!row) throw new Error(`The order ${orderId} has gone.`);
  return row;
}

/** Keeps the payment page of one attempt; false when the order has moved on meanwhile. */
export async function storeSession(
  db: Db,
  attempt: { orderId: string; version: number },
  session: { id: string; url: string | null; expiresAt: Date },
): Promise<boolean> {
  const rows = await db
    .update(customerOrder)
    .set({ sessionId: session.id, sessionUrl: session.url, sessionExpiresAt: session.expiresAt })
    .where(
      and(
        eq(customerOrder.id, attempt.orderId),
        eq(customerOrder.version, attempt.version),
        eq(customerOrder.isHeld, true),
        sql`(${customerOrder.sessionId} is null or ${customerOrder.sessionId} = ${session.id})`,
      ),
    )
    .returning({ id: customerOrder.id });
  return rows.length === 1;
}

/** A line with its share of a promotional code. */
type PricedHold = HeldLine & { discountPence?: number };

export async function replaceLines(tx: Tx, orderId: string, lines: readonly PricedHold[]): Promise<void> {
  await tx.delete(orderLine).where(eq(orderLine.orderId, orderId));
  await tx.insert(orderLine).values(
    lines.map(({ offerId, quantity, unitPricePence, unitGrams, name, discountPence = 0 }) => ({
      orderId,
      offerId,
      quantity,
      unitPricePence,
      unitGrams,
      name,
      discountPence,
    })),
  );
}

export function listLines(db: Db | Tx, orderId: string) {
  return db
    .select({
      id: orderLine.id,
      offerId: orderLine.offerId,
      quantity: orderLine.quantity,
      unitPricePence: orderLine.unitPricePence,
      unitGrams: orderLine.unitGrams,
      discountPence: orderLine.discountPence,
      name: orderLine.name,
      kind: offer.kind,
    })
    .from(orderLine)
    .innerJoin(offer, eq(offer.id, orderLine.offerId))
    .where(eq(orderLine.orderId, orderId))
    .orderBy(asc(offer.kind), asc(orderLine.name), asc(orderLine.id));
}

export type LineRow = Awaited<ReturnType<typeof listLines>>[number];

export async function getCollection(db: Db | Tx, slotId: string) {
  const rows = await db
    .select({
      name: collectionPoint.name,
      addressLines: collectionPoint.addressLines,
      directions: collectionPoint.directions,
      bring: collectionPoint.bring,
      startsAt: collectionSlot.startsAt,
      endsAt: collectionSlot.endsAt,
    })
    .from(collectionSlot)
    .innerJoin(collectionPoint, eq(collectionPoint.id, collectionSlot.pointId))
    .where(eq(collectionSlot.id, slotId));
  const row = rows[0];
  if (!row) throw new Error(`The slot ${slotId} has gone.`);
  return row;
}

export function listPacksOfOrder(tx: Tx, orderId: string) {
  return tx
    .select({ id: pack.id, carcaseId: pack.carcaseId, grams: pack.grams })
    .from(packAssignment)
    .innerJoin(orderLine, eq(orderLine.id, packAssignment.orderLineId))
    .innerJoin(pack, eq(pack.id, packAssignment.packId))
    .where(and(eq(orderLine.orderId, orderId), eq(packAssignment.isLive, true)));
}

/** Packs that lie in an order, box by box. */
export function listOrderPacks(db: Db | Tx, orderId: string) {
  return db
    .select({
      code: pack.code,
      cut: cut.name,
      grams: pack.grams,
      line: orderLine.name,
      quantity: orderLine.quantity,
      copy: packAssignment.copy,
    })
    .from(packAssignment)
    .innerJoin(orderLine, eq(orderLine.id, packAssignment.orderLineId))
    .innerJoin(pack, eq(pack.id, packAssignment.packId))
    .innerJoin(cut, eq(cut.id, pack.cutId))
    .where(and(eq(orderLine.orderId, orderId), eq(packAssignment.isLive, true)))
    .orderBy(asc(orderLine.name), asc(packAssignment.copy), asc(cut.name), asc(pack.code));
}

export type OrderFilter = {
  dayId?: string | undefined;
  state?: OrderRow['state'] | undefined;
  userId?: string;
  id?: string;
};

/** Orders in the order in which they are collected. An open checkout that was given up is no order. */
export function listOrderRows(db: Db | Tx, { dayId, state, userId, id }: OrderFilter) {
  return db
    .select({
      id: customerOrder.id,
      orderNo: customerOrder.orderNo,
      token: customerOrder.token,
      name: customerOrder.name,
      day: cuttingDay.day,
      state: customerOrder.state,
      paymentState: customerOrder.paymentState,
      totalPence: customerOrder.totalPence,
      startsAt: collectionSlot.startsAt,
      pointName: collectionPoint.name,
      lines: sql<string[]>`array(select ${orderLine.quantity} || ' × ' || ${orderLine.name} from ${orderLine}
        where ${orderLine.orderId} = ${customerOrder.id} order by ${orderLine.name})`,
    })
    .from(customerOrder)
    .innerJoin(cuttingDay, eq(cuttingDay.id, customerOrder.cuttingDayId))
    .innerJoin(collectionSlot, eq(collectionSlot.id, customerOrder.slotId))
    .innerJoin(collectionPoint, eq(collectionPoint.id, collectionSlot.pointId))
    .where(
      and(
        dayId ? eq(customerOrder.cuttingDayId, dayId) : undefined,
        state ? eq(customerOrder.state, state) : undefined,
        userId ? eq(customerOrder.userId, userId) : undefined,
        id ? eq(customerOrder.id, id) : undefined,
        sql`(${customerOrder.state} <> 'awaiting payment' or ${customerOrder.isHeld})`,
        // The next box of a standing order is no order to its buyer until it is charged: it is shown where it can be skipped.
        userId
          ? sql`not (${customerOrder.state} = 'awaiting payment' and ${customerOrder.keepsCard}
              and ${customerOrder.sessionId} is null)`
          : undefined,
      ),
    )
    .orderBy(asc(cuttingDay.day), asc(collectionSlot.startsAt), asc(customerOrder.orderNo));
}
