import type Stripe from 'stripe';
import { newId } from '../ids.ts';

export type RefundPlan = {
  charge: Stripe.Charge;
  amount: number;
  created: number;
  reason: 'duplicate' | 'fraudulent' | 'requested_by_customer' | null;
  metadata: Record<string, string>;
  isPending: boolean;
};

export function buildRefund({ charge, amount, created, reason, metadata, isPending }: RefundPlan): Stripe.Refund {
  return {
    id: newId('re'),
    object: 'refund',
    amount,
    balance_transaction: newId('txn'),
    charge: charge.id,
    created,
    currency: charge.currency,
    customer: charge.customer,
    customer_account: null,
    destination_details: {
      card: { reference_status: isPending ? 'pending' : 'available', type: 'refund' },
      type: 'card',
    },
    metadata,
    payment_intent: charge.payment_intent,
    payment_method: charge.payment_method,
    ...(isPending ? { pending_reason: 'processing' } : {}),
    reason,
    receipt_number: null,
    source_transfer_reversal: null,
    status: isPending ? 'pending' : 'succeeded',
    transfer_reversal: null,
  };
}
