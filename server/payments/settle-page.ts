import type Stripe from 'stripe';
import { AppError } from '#shared/errors.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { nothingLeftMail } from '#server/mail/nothing-left.ts';
import { orderConfirmedMail } from '#server/mail/order-confirmed.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { release, sell, take } from '#server/orders/hold.ts';
import { listLines, lockOrder, updateOrder, type OrderRow } from '#server/orders/order-queries.ts';
import { getDay, readOrderFacts } from '#server/orders/read-order.ts';
import { hasSoldOut } from '#server/orders/stock-queries.ts';
import { deleteUse } from '#server/promo/promo-queries.ts';
import { insertCharge, insertRefund } from './payment-queries.ts';
import { enqueue } from '#server/queue.ts';
import { FREEZE_MS, paidOn, type PaidPage } from './paid-page.ts';
import { settleBalancePage } from './balance-page.ts';
import { settleAddition } from './settle-addition.ts';

type Paid = PaidPage & { order: OrderRow; chargeId: string };

/**
 * Brings an order in line with the truth about one payment page, whatever came before: safe when told twice, late or in
 * the wrong order. The page must have been read from the payment company, never taken from a message.
 */
export async function settlePage(tx: Tx, deps: Deps, page: Stripe.Checkout.Session): Promise<void> {
  if (page.metadata?.additionId) return settleAddition(tx, deps, page);
  if (page.metadata?.balanceId) return settleBalancePage(tx, deps, page);
  const orderId = page.metadata?.orderId;
  const order = orderId ? await lockOrder(tx, { id: orderId }) : null;
  if (!order) return;
  const isCurrent = page.metadata?.attempt === String(order.version);
  if (page.status === 'expired') {
    if (isCurrent && order.isHeld) await releaseHold(tx, order);
    return;
  }
  const found = paidOn(page);
  if (found) await settlePayment(tx, deps, { ...found, order, isCurrent });
}

/**
 * A payment of an order that has come in, from its page or from a kept card: sells what is held, takes it again, or gives
 * the money back. A payment that is written down already changes nothing.
 */
export async function settlePayment(
  tx: Tx,
  deps: Deps,
  found: PaidPage & { order: OrderRow; isCurrent: boolean },
): Promise<void> {
  const { order, isCurrent, intentId, amountPence } = found;
  const chargeId = await insertCharge(tx, { orderId: order.id, providerId: intentId, amountPence });
  if (!chargeId) return;
  const paid = { ...found, chargeId };
  const isDue =
    order.state === 'awaiting payment' && isCurrent && amountPence === (order.depositPence ?? order.totalPence);
  if (isDue && order.isHeld) {
    await sell(tx, await listLines(tx, order.id));
    await confirm(tx, deps, paid);
  } else if (isDue && (await takeAgain(tx, deps, order))) {
    await confirm(tx, deps, paid);
  } else {
    await giveBack(tx, deps, paid);
  }
}

export async function releaseHold(tx: Tx, order: OrderRow): Promise<OrderRow> {
  await release(tx, { lines: await listLines(tx, order.id), slotId: order.slotId });
  await deleteUse(tx, order.id);
  return updateOrder(tx, order.id, { isHeld: false, sessionUrl: null });
}

/** A payment that arrives after its hold has ended takes what is free, as any buyer would; false: it is not there. */
async function takeAgain(tx: Tx, deps: Deps, order: OrderRow): Promise<boolean> {
  const day = await getDay(tx, order.cuttingDayId);
  if (deps.clock.now().getTime() >= day.cutOffAt.getTime() + FREEZE_MS) return false;
  const lines = await listLines(tx, order.id);
  try {
    // A savepoint: what was taken before the line that is short goes back, and the payment stays written down.
    await tx.transaction((inner) => take(inner, { day, lines, slotId: order.slotId }, 'sold'));
    return true;
  } catch (error) {
    if (error instanceof AppError) return false;
    throw error;
  }
}

async function confirm(tx: Tx, deps: Deps, { order, card }: Paid): Promise<void> {
  const confirmed = await updateOrder(tx, order.id, {
    state: 'confirmed',
    paymentState: order.depositPence === null ? 'paid' : 'part paid',
    ...card,
    isHeld: false,
    sessionUrl: null,
    version: order.version + 1,
  });
  const lines = await listLines(tx, order.id);
  // What has sold out may be worth making more of: the day is worked out again.
  const isSoldOut = await hasSoldOut(
    tx,
    lines.map((line) => line.offerId),
  );
  if (isSoldOut) await enqueue(tx, 'replan-day', { dayId: order.cuttingDayId });
  const facts = await readOrderFacts(deps, tx, confirmed);
  await queueMail(tx, {
    eventKey: `order confirmed ${order.id} ${order.version}`,
    kind: 'order confirmed',
    orderId: order.id,
    to: order.email,
    ...orderConfirmedMail(facts),
  });
}

async function giveBack(tx: Tx, deps: Deps, { order, intentId, amountPence, chargeId }: Paid): Promise<void> {
  const isOpen = order.state === 'awaiting payment' && !order.isHeld;
  const refundId = await insertRefund(tx, {
    orderId: order.id,
    reason: `A payment that came too late (${intentId})`,
    amountPence,
    chargeId,
  });
  if (refundId) await enqueue(tx, 'settle-refund', { paymentId: refundId });
  const current = isOpen
    ? await updateOrder(tx, order.id, { state: 'cancelled', paymentState: 'paid', version: order.version + 1 })
    : order;
  await recordAudit(tx, {
    byUserId: null,
    action: 'gave back a late payment',
    subject: 'order',
    subjectId: order.id,
    detail: { amountPence },
  });
  await queueMail(tx, {
    eventKey: `nothing left ${intentId}`,
    kind: 'nothing left',
    orderId: order.id,
    to: order.email,
    ...nothingLeftMail(await readOrderFacts(deps, tx, current), amountPence),
  });
}
