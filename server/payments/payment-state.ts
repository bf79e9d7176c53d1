import { paymentStateOf } from '#shared/domain/refunds.ts';
import type { Tx } from '#server/deps.ts';
import { lockOrder, updateOrder, type OrderRow } from '#server/orders/order-queries.ts';
import { listPayments, type PaymentRow } from './payment-queries.ts';

/** What a deposit order still has to be paid with; the row of the charge that takes it. */
export const BALANCE = 'balance';

/** True while a deposit order is not paid up: not weighed yet, or its rest has not been taken. */
export function isBalanceOpen(order: OrderRow, payments: readonly PaymentRow[]): boolean {
  if (order.depositPence === null) return false;
  if (order.balancePence === null) return true;
  return order.balancePence > 0 && !payments.some((row) => row.reason === BALANCE && row.state === 'done');
}

/** Writes what the order's money adds up to now. */
export async function refreshPaymentState(tx: Tx, orderId: string): Promise<void> {
  const order = await lockOrder(tx, { id: orderId });
  if (!order) return;
  const payments = await listPayments(tx, orderId);
  await updateOrder(tx, orderId, { paymentState: paymentStateOf(payments, isBalanceOpen(order, payments)) });
}
