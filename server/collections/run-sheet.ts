import type { RunSheet } from '#shared/contracts/packs.ts';
import { canMoveOrder, type OrderState } from '#shared/domain/order-state.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { outForDeliveryMail } from '#server/mail/out-for-delivery.ts';
import { missedCollectionMail } from '#server/mail/missed-collection.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { lockOrder, updateOrder, type OrderRow } from '#server/orders/order-queries.ts';
import { readOrderFacts } from '#server/orders/read-order.ts';
import { findDay } from '#server/orders/stock-queries.ts';
import { listCollected, type CollectedRow } from './collection-queries.ts';

type RunSheetOrder = RunSheet['slots'][number]['orders'][number];

/**
 * Who comes when, with what to hand over. No price and nothing about a person but the name on the box, and the address
 * where the van brings it.
 */
export async function readRunSheet(deps: Deps, dayId: string): Promise<RunSheet> {
  const day = await findDay(deps.db, dayId);
  if (!day) throw new AppError('NOT_FOUND', 'There is no such cutting day.');
  const slots = new Map<string, RunSheet['slots'][number]>();
  for (const row of await listCollected(deps.db, { dayId })) {
    const slot = slots.get(row.order.slotId) ?? {
      pointName: row.pointName,
      startsAt: row.startsAt.toISOString(),
      endsAt: row.endsAt.toISOString(),
      orders: [],
    };
    slot.orders.push(describe(row));
    slots.set(row.order.slotId, slot);
  }
  return { dayId, day: day.day, slots: [...slots.values()] };
}

function describe({ order, items, packCount }: CollectedRow): RunSheetOrder {
  const { id, orderNo, name, state, version } = order;
  const { deliveryAddress, deliveryPostcode } = order;
  const address = deliveryAddress ? [...deliveryAddress, deliveryPostcode ?? ''].join(', ') : null;
  return { id, orderNo, name, items, packCount, address, state, version };
}

/** A tick on the run sheet; collected can be taken back to ready. */
export async function markOrder(
  deps: Deps,
  mark: { orderId: string; version: number; state: OrderState; byUserId: string },
): Promise<RunSheetOrder> {
  await deps.db.transaction(async (tx) => {
    const order = await lockOrder(tx, { id: mark.orderId });
    if (!order) throw new AppError('NOT_FOUND', 'There is no such order.');
    if (order.version !== mark.version) {
      throw new AppError(
        'STATE_CHANGED',
        `Order ${order.orderNo} has changed meanwhile and is ${order.state} now. Your tick was not kept; look at it again.`,
      );
    }
    if (!canMoveOrder(order.state, mark.state)) {
      throw new AppError(
        'STATE_CHANGED',
        `Order ${order.orderNo} is ${order.state} and cannot become ${mark.state}. Nothing was changed.`,
      );
    }
    refuseOtherWay(order, mark.state);
    const marked = await updateOrder(tx, order.id, { state: mark.state, version: order.version + 1 });
    if (mark.state === 'missed') await tellMissed(tx, deps, marked);
    if (mark.state === 'ready' && order.state === 'packed') await tellIfOnVan(tx, deps, marked);
    await recordAudit(tx, {
      byUserId: mark.byUserId,
      action: 'marked',
      subject: 'order',
      subjectId: order.id,
      detail: { from: order.state, to: mark.state },
    });
  });
  const [row] = await listCollected(deps.db, { orderId: mark.orderId });
  if (!row) throw new AppError('NOT_FOUND', 'There is no such order.');
  return describe(row);
}

/** In the transaction of the tick, and once an order: a second tick writes no second mail. */
async function tellMissed(tx: Tx, deps: Deps, order: OrderRow): Promise<void> {
  await queueMail(tx, {
    eventKey: `missed collection ${order.id}`,
    kind: 'missed collection',
    orderId: order.id,
    to: order.email,
    ...missedCollectionMail(await readOrderFacts(deps, tx, order)),
  });
}

/** Nothing that the van brings is collected, and nothing else is delivered. */
function refuseOtherWay(order: OrderRow, state: OrderState): void {
  const isDelivered = order.deliveryAddress !== null;
  if ((state !== 'delivered' || isDelivered) && (state !== 'collected' || !isDelivered)) return;
  throw new AppError(
    'STATE_CHANGED',
    `Order ${order.orderNo} is ${isDelivered ? 'brought by the van' : 'collected'} and cannot become ${state}. Nothing was changed.`,
  );
}

/** Put on the van: the customer is told to expect it. */
async function tellIfOnVan(tx: Tx, deps: Deps, order: OrderRow): Promise<void> {
  if (!order.deliveryAddress) return;
  await queueMail(tx, {
    eventKey: `out for delivery ${order.id}`,
    kind: 'out for delivery',
    orderId: order.id,
    to: order.email,
    ...outForDeliveryMail(await readOrderFacts(deps, tx, order)),
  });
}
