import { refundablePence } from '#shared/domain/refunds.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { queueMail } from '#server/mail/outbox.ts';
import { weightsSettledMail } from '#server/mail/weights-settled.ts';
import { lockOrder, type OrderRow } from '#server/orders/order-queries.ts';
import { readOrderFacts } from '#server/orders/read-order.ts';
import { WEIGHTS_SETTLED } from '#server/payments/refund-reasons.ts';
import { askRefund } from '#server/payments/ask-refund.ts';
import { askBalance } from '#server/payments/balance.ts';
import { listPayments, type PaymentRow } from '#server/payments/payment-queries.ts';
import { BALANCE } from '#server/payments/payment-state.ts';
import type { Job } from './fill-work.ts';
import { owedPence, settleJob } from './settlement.ts';

/**
 * Gives back what a packed order weighs less than was paid for: one refund and one mail, in the caller's transaction; the
 * money moves after it. Packed again after a loss, only what is owed beyond the first settlement follows.
 */
export async function settleWeights(deps: Deps, tx: Tx, { orderId, jobs }: { orderId: string; jobs: readonly Job[] }) {
  const order = await lockOrder(tx, { id: orderId });
  if (!order) return;
  const ofOrder = jobs.filter((job) => job.orderId === orderId);
  const items = ofOrder.map(settleJob);
  const payments = await listPayments(tx, orderId);
  const settled = payments.filter((row) => row.kind === 'refund' && row.reason.startsWith(WEIGHTS_SETTLED));
  const given = settled.reduce((sum, row) => sum + row.amountPence, 0);
  if (order.depositPence !== null && order.balancePence === null) {
    const duePence = order.totalPence - owedPence(items) - refundablePence(payments);
    await askBalance(tx, { order, duePence });
    if (duePence >= 0) return;
  }
  const netPence = order.depositPence === null ? given : creditedPence(order, payments);
  const amountPence = Math.min(owedPence(items) - netPence, refundablePence(payments));
  if (amountPence <= 0) return;
  const reason = settled.length === 0 ? WEIGHTS_SETTLED : `${WEIGHTS_SETTLED} again, ${settled.length + 1}`;
  const paymentId = await askRefund(tx, { orderId, reason, amountPence });
  if (!paymentId) return;
  const packs = ofOrder.flatMap((job) => job.packs.map(({ code, cut, grams }) => ({ code, cut, grams })));
  const facts = await readOrderFacts(deps, tx, order);
  await queueMail(tx, {
    eventKey: `weights settled ${paymentId}`,
    kind: 'weights settled',
    orderId,
    to: order.email,
    ...weightsSettledMail(facts, { amountPence, items, packs, traceUrl: (code) => `${deps.origin}/trace/${code}` }),
  });
}

/** What a deposit order has had off already: in its rest, which came to less than was open, and in what was given back. */
function creditedPence(order: OrderRow, payments: readonly PaymentRow[]): number {
  const charges = payments.filter((row) => row.kind === 'charge' && row.reason !== BALANCE && row.state === 'done');
  const charged = charges.reduce((sum, row) => sum + row.amountPence, 0);
  const given = payments.filter((row) => row.kind === 'refund' && row.state !== 'failed');
  return order.totalPence - charged - (order.balancePence ?? 0) + given.reduce((sum, row) => sum + row.amountPence, 0);
}
