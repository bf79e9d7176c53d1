import { refundParts } from '#shared/domain/refunds.ts';
import type { Tx } from '#server/deps.ts';
import { enqueue } from '#server/queue.ts';
import { insertRefund, listPayments } from './payment-queries.ts';

/**
 * Asks for money back in the caller's transaction, under the order's lock; the money itself moves after the commit.
 * Answers the first refund's id, or null where this reason has had its refund or nothing is left to give back.
 */
export async function askRefund(
  tx: Tx,
  { orderId, reason, amountPence }: { orderId: string; reason: string; amountPence: number },
): Promise<string | null> {
  let first: string | null = null;
  for (const part of refundParts(await listPayments(tx, orderId), amountPence)) {
    const paymentId = await insertRefund(tx, { orderId, reason, ...part });
    if (!paymentId) continue;
    await enqueue(tx, 'settle-refund', { paymentId });
    first ??= paymentId;
  }
  return first;
}
