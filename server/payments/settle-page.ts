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
import { insertCharge, insertRefund } from './payment-queries.ts';
import { enqueue } from '#server/queue.ts';

/** After the cut-off no page opens; the last one that could be open has ended by then, and the cutting list stands. */
const FREEZE_MS = 35 * 60_000;

type Paid = { order: OrderRow; intentId: string; amountPence: number; chargeId: string };

/**
 * Brings an order in line with the truth about one payment page, whatever came before: safe when told twice, late or in
 * the wrong order. The page must have been read from the payment company, never taken from a message.
 */
export async function settlePage(tx: Tx, deps: Deps, page: Stripe.Checkout.Session): Promise<void> {
  const orderId = page.metadata?.orderId;
  const order = orderId ? await lockOrder(tx, { id: orderId }) : null;
  if (!order) return;
  const isCurrent = page.metadata?.attempt === String(order.version);
  if (page.status === 'expired') {
    if (isCurrent && order.isHeld) await releaseHold(tx, order);
    return;
  }
  if (page.status !== 'complete' || page.payment_status !== 'paid') return;
  const intentId = typeof page.payment_intent === 'string' ? page.payment_intent : page.payment_intent?.id;
  const amountPence = page.amount_total ?? 0;
  if (!intentId || amountPence === 0) return;
  const chargeId = await insertCharge(tx, { orderId: order.id, providerId: intentId, amountPence });
  if (!chargeId) return;
  const paid = { order, intentId, amountPence, chargeId };
  const isDue = order.state === 'awaiting payment' && isCurrent && amountPence === order.totalPence;
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

async function confirm(tx: Tx, deps: Deps, { order }: Paid): Promise<void> {
  const confirmed = await updateOrder(tx, order.id, {
    state: 'confirmed',
    paymentState: 'paid',
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
