import type { Deps } from '#server/deps.ts';
import { log } from '#server/http/log.ts';
import { listOpenAdditions } from '#server/orders/addition-queries.ts';
import { sweepAddition } from '#server/orders/addition-page.ts';
import { listLines, lockOrder, storeSession, type OrderRow } from '#server/orders/order-queries.ts';
import { createPaymentPage, endPaymentPage, getPaymentPage, isOutage } from './payment-page.ts';
import { listHeldOrders } from './payment-queries.ts';
import { releaseHold, settlePage } from './settle-page.ts';
import { sendRefund } from './settle-refund.ts';

/** The worker's task: gives back what was asked for. */
export function settleRefund(deps: Deps, paymentId: string): Promise<void> {
  return sendRefund(deps, paymentId);
}

/** Younger holds are left to the payment company's own messages. */
const SWEEP_AFTER_MS = 5 * 60_000;

/**
 * Asks the payment company about every hold that has been open for a while, since a message may have been lost. Our own
 * clock never releases anything: a payment may be in flight.
 */
export async function sweepHolds(deps: Deps): Promise<void> {
  const since = new Date(deps.clock.now().getTime() - SWEEP_AFTER_MS);
  for (const order of await listHeldOrders(deps.db, since)) {
    try {
      await sweepHold(deps, order);
    } catch (error) {
      // One order's trouble must not keep the others waiting; the next sweep asks again.
      log.warn({ err: error, orderId: order.id }, 'hold not swept');
      if (isOutage(error)) return;
    }
  }
  for (const addition of await listOpenAdditions(deps.db, since)) {
    try {
      await sweepAddition(deps, addition);
    } catch (error) {
      log.warn({ err: error, additionId: addition.id }, 'addition not swept');
      if (isOutage(error)) return;
    }
  }
}

async function sweepHold(deps: Deps, order: OrderRow): Promise<void> {
  if (!order.sessionId) {
    await endUnknownPage(deps, order);
    return;
  }
  const page = await getPaymentPage(deps, order.sessionId);
  await deps.db.transaction((tx) => settlePage(tx, deps, page));
}

/** The process died between the hold and the page: the idempotency key finds the page if there is one, and it is ended. */
export async function endUnknownPage(deps: Deps, order: OrderRow): Promise<void> {
  try {
    const page = await createPaymentPage(deps, { ...order, lines: await listLines(deps.db, order.id) });
    const attempt = { orderId: order.id, version: order.version };
    await storeSession(deps.db, attempt, { id: page.id, url: null, expiresAt: new Date(page.expires_at * 1000) });
    const ended = await endPaymentPage(deps, page.id);
    await deps.db.transaction((tx) => settlePage(tx, deps, ended));
  } catch (error) {
    if (isOutage(error)) throw error;
    // Refused: with so little time left no page can be made any more, and none was made before.
    await releaseUnpaged(deps, order);
  }
}

/** Gives back a hold for which no payment page exists; one that got its page meanwhile stays. */
export async function releaseUnpaged(deps: Deps, attempt: { id: string; version: number }): Promise<void> {
  await deps.db.transaction(async (tx) => {
    const order = await lockOrder(tx, { id: attempt.id });
    if (order?.isHeld && order.version === attempt.version && !order.sessionId) await releaseHold(tx, order);
  });
}
