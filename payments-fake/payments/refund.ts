import type Stripe from 'stripe';
import { Fault, invalidRequest } from '../api/faults.ts';
import { buildRefund, type RefundPlan } from '../objects/refund.ts';
import type { Fake } from '../fake.ts';
import { newId } from '../ids.ts';
import { idOf, type RefundRecord } from '../store.ts';
import { findCardByToken } from '../test-cards.ts';
import { emit } from '../webhooks/emit.ts';

/** How long a refund that does not settle at once takes. */
const settlingSeconds = 5;

function words(pence: number, currency: string): string {
  return new Intl.NumberFormat('en-GB', { style: 'currency', currency }).format(pence / 100);
}

/** Refuses what cannot be given back. */
function check(fake: Fake, charge: Stripe.Charge, amount: number): void {
  if (charge.status !== 'succeeded') {
    throw invalidRequest(`Charge ${charge.id} has not succeeded, so it cannot be refunded.`);
  }
  if (charge.refunded) {
    throw invalidRequest(`Charge ${charge.id} has already been refunded.`, { code: 'charge_already_refunded' });
  }
  const left = charge.amount - charge.amount_refunded;
  if (amount > left) {
    const [asked, open] = [words(amount, charge.currency), words(left, charge.currency)];
    const what = charge.amount_refunded > 0 ? 'unrefunded amount on charge' : 'charge amount';
    throw invalidRequest(`Refund amount (${asked}) is greater than ${what} (${open})`, { param: 'amount' });
  }
  if (fake.settings.declineRefunds) {
    const message = 'Insufficient funds in your account to refund this payment.';
    throw new Fault(400, { type: 'invalid_request_error', code: 'balance_insufficient', message });
  }
}

function move(charge: Stripe.Charge, pence: number): void {
  charge.amount_refunded += pence;
  charge.refunded = charge.amount_refunded === charge.amount;
}

export type RefundOrder = Pick<RefundPlan, 'reason' | 'metadata'> & { amount: number | null };

/** Gives money back. Without an amount: all that is left. */
export function makeRefund(fake: Fake, charge: Stripe.Charge, order: RefundOrder): Stripe.Refund {
  const amount = order.amount ?? charge.amount - charge.amount_refunded;
  check(fake, charge, amount);
  const card = fake.store.cards.get(String(charge.payment_method));
  const effect = findCardByToken(card?.token ?? '')?.refund;
  const refund = buildRefund({ ...order, charge, amount, created: fake.now(), isPending: effect === 'pending' });
  fake.store.refunds.set(refund.id, {
    refund,
    settlesAt: effect ? fake.now() + settlingSeconds : null,
    settlesTo: effect === 'failing' ? 'failed' : 'succeeded',
  });
  move(charge, amount);
  emit(fake, { type: 'refund.created', object: refund });
  emit(fake, { type: 'charge.refunded', object: charge });
  fake.store.changed();
  return refund;
}

function settle(fake: Fake, record: RefundRecord): void {
  const { refund, settlesTo } = record;
  record.settlesAt = null;
  refund.status = settlesTo;
  delete refund.pending_reason;
  if (settlesTo === 'failed') {
    refund.failure_reason = 'expired_or_canceled_card';
    refund.failure_balance_transaction = newId('txn');
    const charge = fake.store.charges.get(idOf(refund.charge));
    if (charge) move(charge, -refund.amount);
    emit(fake, { type: 'refund.failed', object: refund });
  }
  emit(fake, { type: 'refund.updated', object: refund });
  fake.store.changed();
}

export function settleDueRefunds(fake: Fake): void {
  for (const record of fake.store.refunds.values()) {
    if (record.settlesAt !== null && record.settlesAt <= fake.now()) settle(fake, record);
  }
}
