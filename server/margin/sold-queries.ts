import { and, eq, inArray, notInArray } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { customerOrder, orderLine, payment } from '#db/schema/orders.ts';
import { pack, packAssignment } from '#db/schema/packs.ts';
import type { Db, Tx } from '#server/deps.ts';

/** Orders of a day that were paid for and stand. */
export async function listSoldOrders(db: Db | Tx, dayId: string) {
  const orders = await db
    .select({
      id: customerOrder.id,
      totalPence: customerOrder.totalPence,
      deliveryPence: customerOrder.deliveryPence,
      depositPence: customerOrder.depositPence,
      balancePence: customerOrder.balancePence,
    })
    .from(customerOrder)
    .where(
      and(eq(customerOrder.cuttingDayId, dayId), notInArray(customerOrder.state, ['awaiting payment', 'cancelled'])),
    )
    .orderBy(customerOrder.orderNo);
  const ids = orders.map(({ id }) => id);
  const money = ids.length === 0 ? [] : await db.select().from(payment).where(inArray(payment.orderId, ids));
  return orders.map((order) => {
    const own = money.filter(({ orderId }) => orderId === order.id);
    return {
      ...order,
      charges: own.filter(({ kind, state }) => kind === 'charge' && state === 'done').map((row) => row.amountPence),
      refundsPence: own
        .filter(({ kind, state }) => kind === 'refund' && state !== 'failed')
        .reduce((sum, row) => sum + row.amountPence, 0),
    };
  });
}
export type SoldOrder = Awaited<ReturnType<typeof listSoldOrders>>[number];

export async function listSoldLines(db: Db | Tx, orderIds: readonly string[]) {
  if (orderIds.length === 0) return [];
  return db
    .select({
      id: orderLine.id,
      orderId: orderLine.orderId,
      quantity: orderLine.quantity,
      unitPricePence: orderLine.unitPricePence,
      discountPence: orderLine.discountPence,
      unitGrams: orderLine.unitGrams,
      boxKindId: offer.boxKindId,
      cutId: offer.cutId,
    })
    .from(orderLine)
    .innerJoin(offer, eq(offer.id, orderLine.offerId))
    .where(inArray(orderLine.orderId, [...orderIds]))
    .orderBy(orderLine.id);
}
export type SoldLine = Awaited<ReturnType<typeof listSoldLines>>[number];

/** Packs that lie in an order or a reservation, by the line that they fill. */
export async function listPacksOfLines(db: Db | Tx, lineIds: readonly string[]) {
  if (lineIds.length === 0) return [];
  const columns = { carcaseId: pack.carcaseId, cutId: pack.cutId, grams: pack.grams };
  const ofLine = (column: typeof packAssignment.orderLineId | typeof packAssignment.reservationLineId) =>
    db
      .select({ ...columns, lineId: column })
      .from(packAssignment)
      .innerJoin(pack, eq(pack.id, packAssignment.packId))
      .where(and(eq(packAssignment.isLive, true), inArray(column, [...lineIds])))
      .orderBy(pack.id);
  return [...(await ofLine(packAssignment.orderLineId)), ...(await ofLine(packAssignment.reservationLineId))];
}
export type LinePack = Awaited<ReturnType<typeof listPacksOfLines>>[number];
