import type { PaymentState } from './order-state.ts';

/** Money in or out of an order, oldest first. */
export type MoneyRow = {
  id: string;
  kind: 'charge' | 'refund';
  amountPence: number;
  state: 'asked' | 'done' | 'failed';
  /** The charge that a refund comes from. */
  chargeId: string | null;
};

/** What the order's money adds up to. A refund counts once the payment company has taken it. */
export function paymentStateOf(rows: readonly MoneyRow[], isBalanceOpen = false): PaymentState {
  const charged = sumOf(rows, 'charge');
  const refunded = sumOf(rows, 'refund');
  if (charged === 0) return 'unpaid';
  if (refunded === 0) return isBalanceOpen ? 'part paid' : 'paid';
  return refunded >= charged ? 'refunded' : 'refunded in part';
}

function sumOf(rows: readonly MoneyRow[], kind: MoneyRow['kind']): number {
  return rows.filter((row) => row.kind === kind && row.state === 'done').reduce((sum, row) => sum + row.amountPence, 0);
}

/** What may still be given back: refunds that are asked for count as given, so that nothing goes out twice. */
export function refundablePence(rows: readonly MoneyRow[]): number {
  return [...leftOfCharges(rows).values()].reduce((sum, pence) => sum + pence, 0);
}

/** What is left of each charge, the oldest first. */
function leftOfCharges(rows: readonly MoneyRow[]): Map<string, number> {
  const left = new Map<string, number>();
  for (const row of rows) {
    if (row.kind === 'charge' && row.state === 'done') left.set(row.id, row.amountPence);
  }
  for (const { kind, state, chargeId, amountPence } of rows) {
    if (kind !== 'refund' || state === 'failed' || chargeId === null) continue;
    left.set(chargeId, (left.get(chargeId) ?? 0) - amountPence);
  }
  return left;
}

export type RefundPart = { chargeId: string; amountPence: number };

/** Which charges a refund comes from, the newest first: the payment company takes each part from one of them. */
export function refundParts(rows: readonly MoneyRow[], amountPence: number): RefundPart[] {
  const parts: RefundPart[] = [];
  let open = amountPence;
  for (const [chargeId, left] of [...leftOfCharges(rows)].reverse()) {
    const part = Math.min(open, left);
    if (part > 0) parts.push({ chargeId, amountPence: part });
    open -= Math.max(0, part);
  }
  return parts;
}
