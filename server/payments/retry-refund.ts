import type { FailedRefund } from '#shared/contracts/orders.ts';
import { refundParts } from '#shared/domain/refunds.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { lockOrder } from '#server/orders/order-queries.ts';
import { enqueue } from '#server/queue.ts';
import { findPayment, listFailedRefunds, listPayments, updatePayment } from './payment-queries.ts';

export async function readFailedRefunds(deps: Deps): Promise<{ refunds: FailedRefund[] }> {
  return { refunds: await listFailedRefunds(deps.db) };
}

/** The owner has a refused refund tried again, while its charge still has that much left to give back. */
export async function retryRefund(
  deps: Deps,
  byUserId: string,
  paymentId: string,
): Promise<{ refunds: FailedRefund[] }> {
  await deps.db.transaction(async (tx) => {
    const known = await findPayment(tx, paymentId);
    if (known?.kind !== 'refund') throw new AppError('NOT_FOUND', 'There is no such refund.');
    await lockOrder(tx, { id: known.orderId });
    const refund = await findPayment(tx, paymentId);
    if (refund?.state !== 'failed') {
      throw new AppError('STATE_CHANGED', 'This refund is on its way or done already. Nothing was sent a second time.');
    }
    const rows = await listPayments(tx, refund.orderId);
    const charge = rows.filter((row) => row.id === refund.chargeId || row.chargeId === refund.chargeId);
    const [part] = refundParts(charge, refund.amountPence);
    if (part?.amountPence !== refund.amountPence) {
      throw new AppError('STATE_CHANGED', 'Its payment has been given back in the meantime. Nothing was sent.');
    }
    await updatePayment(tx, paymentId, { state: 'asked', error: null, attempt: refund.attempt + 1 });
    await enqueue(tx, 'settle-refund', { paymentId });
    const detail = { amountPence: refund.amountPence, attempt: refund.attempt + 1 };
    await recordAudit(tx, {
      byUserId,
      action: 'refund tried again',
      subject: 'order',
      subjectId: refund.orderId,
      detail,
    });
  });
  return readFailedRefunds(deps);
}
