import type { PaymentState } from './order-state.ts';

/** Money in or out of an order, oldest first. */
export type MoneyRow = {
  id: string;
  kind: 'charge' | 'refund';
  amountPence: number;
  state: 'asked' | 'done' | 'failed';
};

/** What the order's money adds up to. A refund counts once the payment company has taken it. */
export function paymentStateOf(rows: readonly MoneyRow[]): PaymentState {
  const charged = sumOf(rows, 'charge');
  const refunded = sumOf(rows, 'refund');
  if (charged === 0) return 'unpaid';
  if (refunded === 0) return 'paid';
  return refunded >= charged ? 'refunded' : 'refunded in part';
}

function sumOf(rows: readonly MoneyRow[], kind: MoneyRow['kind']): number {
  return rows.filter((row) => row.kind === kind && row.state === 'done').reduce((sum, row) => sum + row.amountPence, 0);
}

/** What may still be given back: refunds that are asked for count as given, so that nothing goes out twice. */
export function refundablePence(rows: readonly MoneyRow[]): number {
  const given = rows
    .filter((row) => row.kind === 'refund' && row.state !== 'failed')
    .reduce((sum, row) => sum + row.amountPence, 0);
  return sumOf(rows, 'charge') - given;
}

/** The charge that a refund is taken from: the newest before it that still covers it. Null when none does. */
export function chargeForRefund<Row extends MoneyRow>(rows: readonly Row[], refundId: string): Row | null {
  const left = new Map<Row, number>();
  for (const row of rows) {
    if (row.kind === 'charge') {
      if (row.state === 'done') left.set(row, row.amountPence);
      continue;
    }
    if (row.state === 'failed' && row.id !== refundId) continue;
    const charge = [...left.keys()].reverse().find((each) => (left.get(each) ?? 0) >= row.amountPence) ?? null;
    if (row.id === refundId) return charge;
    if (charge) left.set(charge, (left.get(charge) ?? 0) - row.amountPence);
  }
  return null;
}
