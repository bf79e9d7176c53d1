import Stripe from 'stripe';
import { SMALLEST_CHARGE_PENCE } from '#shared/domain/money.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { balanceFailedMail } from '#server/mail/balance-failed.ts';
import { balanceTakenMail } from '#server/mail/balance-taken.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { findOrder, listOrderPacks, lockOrder, updateOrder, type OrderRow } from '#server/orders/order-queries.ts';
import { readOrderFacts } from '#server/orders/read-order.ts';
import { enqueue } from '#server/queue.ts';
import { askRefund } from './ask-refund.ts';
import { isOutage } from './payment-page.ts';
import {
  findBalance,
  findPayment,
  insertBalance,
  insertCharge,
  insertRefund,
  updatePayment,
} from './payment-queries.ts';
import { refreshPaymentState } from './payment-state.ts';

type Weighed = { order: OrderRow; duePence: number };

/**
 * Works out what a deposit order still has to be paid with, once it is weighed, and has it taken. Less than a card can
 * be charged is let go and written down. What is owed the other way the caller gives back.
 */
export async function askBalance(tx: Tx, { order, duePence }: Weighed): Promise<void> {
  const balancePence = duePence < SMALLEST_CHARGE_PENCE ? 0 : duePence;
  await updateOrder(tx, order.id, { balancePence });
  if (balancePence > 0) {
    const paymentId = await insertBalance(tx, { orderId: order.id, amountPence: balancePence });
    if (paymentId) await enqueue(tx, 'take-balance', { paymentId });
  } else if (duePence > 0) {
    await recordAudit(tx, {
      byUserId: null,
      action: 'waived the rest',
      subject: 'order',
      subjectId: order.id,
      detail: { duePence },
    });
  }
  await refreshPaymentState(tx, order.id);
}

/** The worker's task: takes the rest from the saved card, nobody being there to answer the bank. Once, however often it runs. */
export async function takeBalance(deps: Deps, paymentId: string): Promise<void> {
  const balance = await findPayment(deps.db, paymentId);
  const order = balance && (await findOrder(deps.db, { id: balance.orderId }));
  if (balance?.state !== 'asked' || !order) return;
  const { providerCustomerId, providerMethodId } = order;
  if (!providerCustomerId || !providerMethodId) {
    await failBalance(deps, paymentId, { error: 'No card was kept.', intentId: null });
    return;
  }
  try {
    const intent = await deps.payments.stripe.paymentIntents.create(
      {
        ...{ amount: balance.amountPence, currency: 'gbp', off_session: true, confirm: true },
        ...{ customer: providerCustomerId, payment_method: providerMethodId },
        description: `The rest of order ${order.orderNo}`,
        metadata: { orderId: order.id, balanceId: balance.id },
      },
      { idempotencyKey: `balance ${balance.id}` },
    );
    await deps.db.transaction((tx) => settleIntent(tx, deps, intent));
  } catch (error) {
    if (!(error instanceof Stripe.errors.StripeError) || isOutage(error)) throw error;
    await failBalance(deps, paymentId, { error: error.message, intentId: error.payment_intent?.id ?? null });
  }
}

/**
 * Brings the rest of an order in line with the truth about a payment of it, from whichever way it came: the job, the
 * payer's own page, or a message. Safe when told twice; a second payment goes back in full.
 */
export async function settleIntent(tx: Tx, deps: Deps, intent: Stripe.PaymentIntent): Promise<void> {
  const { orderId, balanceId } = intent.metadata;
  if (intent.status !== 'succeeded' || !orderId || !balanceId) return;
  await settleBalance(tx, deps, { orderId, balanceId, intentId: intent.id, amountPence: intent.amount });
}

type PaidBalance = { orderId: string; balanceId: string; intentId: string; amountPence: number };

export async function settleBalance(tx: Tx, deps: Deps, paid: PaidBalance): Promise<void> {
  const order = await lockOrder(tx, { id: paid.orderId });
  const balance = await findPayment(tx, paid.balanceId);
  if (!order || balance?.orderId !== order.id) return;
  if (balance.state === 'done') {
    if (balance.providerId !== paid.intentId) await sendBackTwice(tx, paid);
    return;
  }
  await updatePayment(tx, balance.id, { state: 'done', providerId: paid.intentId, error: null });
  await updateOrder(tx, order.id, { sessionUrl: null });
  await refreshPaymentState(tx, order.id);
  if (order.state === 'cancelled') {
    await askRefund(tx, {
      orderId: order.id,
      reason: 'Cancelled before the rest was taken',
      amountPence: paid.amountPence,
    });
    return;
  }
  const packs = await listOrderPacks(tx, order.id);
  await queueMail(tx, {
    eventKey: `balance taken ${balance.id}`,
    kind: 'balance taken',
    orderId: order.id,
    to: order.email,
    ...balanceTakenMail(await readOrderFacts(deps, tx, order), {
      amountPence: paid.amountPence,
      depositPence: order.depositPence ?? 0,
      packs,
      traceUrl: (code) => `${deps.origin}/trace/${code}`,
    }),
  });
}

/** Paid on two pages at once: the second is written down and given back whole. */
async function sendBackTwice(tx: Tx, { orderId, intentId, amountPence }: PaidBalance): Promise<void> {
  const chargeId = await insertCharge(tx, { orderId, providerId: intentId, amountPence, reason: 'addition' });
  if (!chargeId) return;
  const reason = `The rest, paid a second time (${intentId})`;
  const paymentId = await insertRefund(tx, { orderId, reason, amountPence, chargeId });
  if (paymentId) await enqueue(tx, 'settle-refund', { paymentId });
}

/** The card refused, or its bank wants to be answered: the customer gets a link to pay. */
async function failBalance(
  deps: Deps,
  paymentId: string,
  { error, intentId }: { error: string; intentId: string | null },
): Promise<void> {
  const known = await findPayment(deps.db, paymentId);
  if (!known) return;
  await deps.db.transaction(async (tx) => {
    const order = await lockOrder(tx, { id: known.orderId });
    const balance = await findPayment(tx, paymentId);
    if (!order || balance?.state !== 'asked') return;
    await updatePayment(tx, paymentId, { state: 'failed', error, ...(intentId ? { providerId: intentId } : {}) });
    await refreshPaymentState(tx, order.id);
    await queueMail(tx, {
      eventKey: `balance failed ${paymentId}`,
      kind: 'balance failed',
      orderId: order.id,
      to: order.email,
      ...balanceFailedMail(await readOrderFacts(deps, tx, order), {
        amountPence: balance.amountPence,
        payUrl: `${deps.origin}/orders/${order.token}/pay`,
      }),
    });
  });
}

/** A cancelled order's rest is not taken any more; one that is being taken at this moment goes back. */
export async function stopBalance(tx: Tx, orderId: string): Promise<void> {
  const balance = await findBalance(tx, orderId);
  if (balance?.state !== 'asked') return;
  await updatePayment(tx, balance.id, { state: 'failed', error: 'The order was cancelled.' });
}
