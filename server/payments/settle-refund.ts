import Stripe from 'stripe';
import type { Deps, Tx } from '#server/deps.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { refundSentMail } from '#server/mail/refund-sent.ts';
import { lockOrder } from '#server/orders/order-queries.ts';
import { readOrderFacts } from '#server/orders/read-order.ts';
import { isOutage } from './payment-page.ts';
import { refreshPaymentState } from './payment-state.ts';
import { WEIGHTS_SETTLED } from './refund-reasons.ts';
import { findPayment, findPaymentByProviderId, updatePayment, type PaymentRow } from './payment-queries.ts';

/** Beyond this an outage counts as a failure, and the refund stands on Today for a person. */
const PATIENCE_MS = 12 * 3_600_000;

/** Gives the money back once, however often the job runs: the refund's own id is the company's idempotency key. */
export async function sendRefund(deps: Deps, paymentId: string): Promise<void> {
  const refund = await findPayment(deps.db, paymentId);
  if (refund?.kind !== 'refund' || refund.state !== 'asked') return;
  const charge = refund.chargeId ? await findPayment(deps.db, refund.chargeId) : null;
  if (!charge?.providerId) {
    await fail(deps, refund, 'There is no payment left to give this back from.');
    return;
  }
  try {
    const sent = await deps.payments.stripe.refunds.create(
      {
        payment_intent: charge.providerId,
        amount: refund.amountPence,
        metadata: { paymentId, orderId: refund.orderId },
      },
      // A person's second try is another request: under the same key the company would repeat its refusal.
      { idempotencyKey: refund.attempt === 1 ? `refund ${paymentId}` : `refund ${paymentId} try ${refund.attempt}` },
    );
    if (sent.status === 'failed' || sent.status === 'canceled') {
      await fail(deps, refund, sent.failure_reason ?? 'The bank refused it.');
    } else {
      await finish(deps, refund, sent.id);
    }
  } catch (error) {
    const message = error instanceof Error ? error.message : String(error);
    const isTooOld = deps.clock.now().getTime() - refund.createdAt.getTime() > PATIENCE_MS;
    if (isOutage(error) && !isTooOld) {
      await updatePayment(deps.db, paymentId, { error: message });
      throw error;
    }
    if (!(error instanceof Stripe.errors.StripeError)) throw error;
    await fail(deps, refund, message);
  }
}

async function finish(deps: Deps, refund: PaymentRow, providerId: string): Promise<void> {
  await deps.db.transaction(async (tx) => {
    const order = await lockOrder(tx, { id: refund.orderId });
    const current = await findPayment(tx, refund.id);
    if (!order || current?.state !== 'asked') return;
    await updatePayment(tx, refund.id, { state: 'done', providerId, error: null });
    await refreshPaymentState(tx, order.id);
    // One mail a settlement: it went out with the weights and the trace codes.
    if (refund.reason.startsWith(WEIGHTS_SETTLED)) return;
    await queueMail(tx, {
      eventKey: `refund sent ${refund.id}`,
      kind: 'refund sent',
      orderId: order.id,
      to: order.email,
      ...refundSentMail(await readOrderFacts(deps, tx, order), {
        amountPence: refund.amountPence,
        reason: plainReason(refund.reason),
      }),
    });
  });
}

/** Without the payment company's own number at the end. */
function plainReason(reason: string): string {
  return reason.replace(/ \(pi_[^)]*\)$/, '');
}

async function fail(deps: Deps, refund: PaymentRow, error: string): Promise<void> {
  await deps.db.transaction(async (tx) => {
    await lockOrder(tx, { id: refund.orderId });
    await updatePayment(tx, refund.id, { state: 'failed', error });
    await refreshPaymentState(tx, refund.orderId);
  });
}

/** A refund that the bank sent back days later: it stands on Today, and the order says that it is owed. */
export async function recordRefund(tx: Tx, refund: Stripe.Refund): Promise<void> {
  if (refund.status !== 'failed' && refund.status !== 'canceled') return;
  const known = await findPaymentByProviderId(tx, refund.id);
  if (!known) return;
  await lockOrder(tx, { id: known.orderId });
  await updatePayment(tx, known.id, { state: 'failed', error: refund.failure_reason ?? 'The bank sent it back.' });
  await refreshPaymentState(tx, known.orderId);
}
