import type { Order, OrderSummary } from '#shared/contracts/orders.ts';
import { canMoveOrder } from '#shared/domain/order-state.ts';
import { refundablePence } from '#shared/domain/refunds.ts';
import { formatDayTime } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { lockCuttingDay } from '#server/carcases/cutting-day-queries.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { orderCancelledMail } from '#server/mail/order-cancelled.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { askRefund } from '#server/payments/ask-refund.ts';
import { stopBalance } from '#server/payments/balance.ts';
import { listPayments } from '#server/payments/payment-queries.ts';
import { deleteUse } from '#server/promo/promo-queries.ts';
import { closeAddition } from './addition-page.ts';
import { unsell } from './hold.ts';
import { findOrder, listLines, lockOrder, updateOrder, type OrderRow } from './order-queries.ts';
import { returnPacks } from './return-packs.ts';
import { closePage } from './place-order.ts';
import { getDay, getOrderByToken, noSuchOrder, readOrderFacts, readSummaries } from './read-order.ts';
import { readOrder } from './view-order.ts';

type Cancelling = { reason: string | null; byUserId: string | null };

/** The customer's own cancelling, by the private link, until the cut-off. A second press finds it done. */
export async function cancelOrder(deps: Deps, token: string): Promise<Order> {
  const known = await closePage(deps, await getOrderByToken(deps.db, token));
  await closeAddition(deps, known.id);
  await deps.db.transaction(async (tx) => {
    const order = await lockWithDay(tx, known);
    if (order.state === 'cancelled') return;
    const day = await getDay(tx, order.cuttingDayId);
    if (order.state !== 'awaiting payment' && deps.clock.now() >= day.cutOffAt) {
      throw new AppError(
        'CUTOFF_PASSED',
        `Orders could be cancelled until ${formatDayTime(day.cutOffAt)}, and the cutting has been planned since. Nothing was changed; ring the farm if you cannot come.`,
      );
    }
    if (order.state !== 'confirmed' && order.state !== 'awaiting payment') throw cannotCancel(order);
    await cancel(tx, deps, { order, reason: null, byUserId: null });
  });
  return readOrder(deps, token);
}

/** The owner may cancel later too, with a reason that the customer reads. */
export async function cancelOrderByOwner(
  deps: Deps,
  { orderId, reason, byUserId }: { orderId: string; reason: string; byUserId: string },
): Promise<OrderSummary> {
  const known = await findOrder(deps.db, { id: orderId });
  if (!known) throw noSuchOrder();
  await closePage(deps, known);
  await closeAddition(deps, known.id);
  await deps.db.transaction(async (tx) => {
    const order = await lockWithDay(tx, known);
    if (!canMoveOrder(order.state, 'cancelled')) throw cannotCancel(order);
    await cancel(tx, deps, { order, reason, byUserId });
  });
  const [summary] = await readSummaries(deps.db, { id: orderId });
  if (!summary) throw noSuchOrder();
  return summary;
}

/** The day first, since filling orders with packs holds the day and then its orders. */
async function lockWithDay(tx: Tx, known: OrderRow): Promise<OrderRow> {
  await lockCuttingDay(tx, known.cuttingDayId);
  const order = await lockOrder(tx, { id: known.id });
  if (!order) throw noSuchOrder();
  return order;
}

function cannotCancel(order: OrderRow): AppError {
  return new AppError(
    'STATE_CHANGED',
    `Order ${order.orderNo} is ${order.state} and cannot be cancelled. Nothing was changed.`,
  );
}

/** Stock, slot, packs, money and the mail in one transaction; the money itself moves after it. */
async function cancel(
  tx: Tx,
  deps: Deps,
  { order, reason, byUserId }: Cancelling & { order: OrderRow },
): Promise<void> {
  const isPaid = order.state !== 'awaiting payment';
  if (isPaid) {
    await unsell(tx, { lines: await listLines(tx, order.id), slotId: order.slotId });
    await returnPacks(tx, order.id, byUserId);
    await deleteUse(tx, order.id);
    await stopBalance(tx, order.id);
  }
  const cancelled = await updateOrder(tx, order.id, { state: 'cancelled', version: order.version + 1 });
  const refundPence = Math.max(0, refundablePence(await listPayments(tx, order.id)));
  if (refundPence > 0) {
    await askRefund(tx, {
      orderId: order.id,
      reason: reason ? 'Cancelled by the farm' : 'Cancelled',
      amountPence: refundPence,
    });
  }
  await recordAudit(tx, {
    byUserId,
    action: 'cancelled',
    subject: 'order',
    subjectId: order.id,
    detail: { from: order.state, reason, refundPence },
  });
  // Somebody who never paid was promised nothing, so there is nothing to tell.
  if (!isPaid) return;
  await queueMail(tx, {
    eventKey: `order cancelled ${order.id}`,
    kind: 'order cancelled',
    orderId: order.id,
    to: order.email,
    ...orderCancelledMail(await readOrderFacts(deps, tx, cancelled), { reason, refundPence }),
  });
}
