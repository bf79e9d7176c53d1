import type { ShortProduct } from '#shared/contracts/shortfalls.ts';
import { AppError } from '#shared/errors.ts';
import { lockCuttingDay } from '#server/carcases/cutting-day-queries.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { shortfallRefundedMail } from '#server/mail/shortfall-refunded.ts';
import { cancelOrderByOwner } from '#server/orders/cancel-order.ts';
import { hasPacks, reduceLine } from '#server/orders/order-line-queries.ts';
import {
  findOrder,
  listLines,
  lockOrder,
  updateOrder,
  type LineRow,
  type OrderRow,
} from '#server/orders/order-queries.ts';
import { readOrderFacts } from '#server/orders/read-order.ts';
import { freeSold } from '#server/orders/stock-queries.ts';
import { swapBox } from '#server/orders/swap-box.ts';
import { askRefund } from '#server/payments/ask-refund.ts';
import { enqueue } from '#server/queue.ts';
import { shutOffer } from './shortfall-queries.ts';
import { findShortfalls, partPence } from './shortfalls.ts';

export type Settling = { orderId: string; version: number; lineId: string; quantity: number; byUserId: string };

const MOVED_ON = 'This order has changed meanwhile. Nothing was settled; look at it again.';

/** What the customer reads when the whole order has to go. */
const REASON = 'The animals came out lighter than we had reckoned, and there is not enough beef for your order.';

/**
 * Gives back what one line of an order cannot be filled with: the money, the customer's mail and the count of what is sold
 * in one transaction; what is given up is not sold again, and the day is worked out anew. An order with nothing else in it
 * is cancelled whole. Refuses with STATE_CHANGED when the order has moved on since it was seen.
 */
export async function refundShortfall(deps: Deps, settling: Settling): Promise<ShortProduct[]> {
  const order = await findOrder(deps.db, { id: settling.orderId });
  if (order?.version !== settling.version) throw new AppError('STATE_CHANGED', MOVED_ON);
  const lines = await listLines(deps.db, order.id);
  const line = lines.find(({ id }) => id === settling.lineId);
  if (!line || line.quantity < settling.quantity) throw new AppError('STATE_CHANGED', MOVED_ON);
  if (lines.length === 1 && line.quantity === settling.quantity) await cancelWhole(deps, settling, line);
  else await deps.db.transaction((tx) => refundPart(tx, deps, settling));
  return findShortfalls(deps.db);
}

async function cancelWhole(deps: Deps, { orderId, byUserId }: Settling, line: LineRow): Promise<void> {
  await cancelOrderByOwner(deps, { orderId, reason: REASON, byUserId });
  await deps.db.transaction(async (tx) => {
    const order = await findOrder(tx, { id: orderId });
    if (!order) throw new AppError('NOT_FOUND', 'There is no such order.');
    await lockCuttingDay(tx, order.cuttingDayId);
    await shutOffer(tx, line.offerId);
    await enqueue(tx, 'replan-day', { dayId: order.cuttingDayId });
  });
}

async function refundPart(tx: Tx, deps: Deps, settling: Settling): Promise<void> {
  const { order, line } = await lockLine(tx, settling);
  const { quantity, byUserId } = settling;
  const amountPence = partPence(line, quantity);
  const discountPence = quantity * line.unitPricePence - amountPence;
  await reduceLine(tx, line, { quantity, discountPence });
  await freeSold(tx, { offerId: line.offerId, quantity });
  await shutOffer(tx, line.offerId);
  const changed = await updateOrder(tx, order.id, {
    totalPence: order.totalPence - amountPence,
    discountPence: order.discountPence - discountPence,
    version: order.version + 1,
  });
  const what = `${quantity} × ${line.name}`;
  await askRefund(tx, { orderId: order.id, reason: `Could not be filled: ${what}`, amountPence });
  await recordAudit(tx, {
    byUserId,
    action: 'refunded a shortfall',
    subject: 'order',
    subjectId: order.id,
    detail: { offerId: line.offerId, quantity, amountPence },
  });
  await queueMail(tx, {
    eventKey: `shortfall refunded ${order.id} ${changed.version}`,
    kind: 'order changed',
    orderId: order.id,
    to: order.email,
    ...shortfallRefundedMail(await readOrderFacts(deps, tx, changed), { what, amountPence }),
  });
  await enqueue(tx, 'replan-day', { dayId: order.cuttingDayId });
}

/** The day first, as filling and cancelling take their locks. */
async function lockLine(
  tx: Tx,
  { orderId, version, lineId, quantity }: Settling,
): Promise<{ order: OrderRow; line: LineRow }> {
  const known = await findOrder(tx, { id: orderId });
  if (known) await lockCuttingDay(tx, known.cuttingDayId);
  const order = await lockOrder(tx, { id: orderId });
  const line = order && (await listLines(tx, order.id)).find(({ id }) => id === lineId);
  const isSame = order?.version === version && order.state === 'confirmed';
  if (!line || !isSame || line.quantity < quantity) throw new AppError('STATE_CHANGED', MOVED_ON);
  if (order.depositPence !== null) {
    throw new AppError(
      'STATE_CHANGED',
      'Only a deposit was paid for this order: its rest is reckoned by what is packed.',
    );
  }
  if (await hasPacks(tx, line.id)) {
    throw new AppError('STATE_CHANGED', `${line.name} is being packed already. Nothing was settled.`);
  }
  return { order, line };
}

/** Puts another box of the same family in, at the same price, as the customer could; what is given up is not sold again. */
export async function swapShortfall(deps: Deps, settling: Settling & { offerId: string }): Promise<ShortProduct[]> {
  const { orderId, version, lineId, quantity, offerId, byUserId } = settling;
  const order = await findOrder(deps.db, { id: orderId });
  if (order?.version !== version) throw new AppError('STATE_CHANGED', MOVED_ON);
  const line = (await listLines(deps.db, orderId)).find(({ id }) => id === lineId);
  if (!line) throw new AppError('STATE_CHANGED', MOVED_ON);
  await swapBox(deps, { token: order.token, lineId, offerId, quantity, byUserId });
  await deps.db.transaction(async (tx) => {
    await lockCuttingDay(tx, order.cuttingDayId);
    await shutOffer(tx, line.offerId);
    await enqueue(tx, 'replan-day', { dayId: order.cuttingDayId });
  });
  return findShortfalls(deps.db);
}
