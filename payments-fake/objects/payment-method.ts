import type Stripe from 'stripe';
import { newId } from '../ids.ts';
import type { Payer } from '../store.ts';
import type { TestCard } from '../test-cards.ts';

export type CardPlan = {
  card: TestCard;
  created: number;
  payer: Payer;
  customer: string | null;
  expiry: { month: number; year: number };
};

/** Only the last four figures of a number are ever kept. */
export function buildPaymentMethod({ card, created, payer, customer, expiry }: CardPlan): Stripe.PaymentMethod {
  return {
    id: newId('pm'),
    object: 'payment_method',
    allow_redisplay: 'limited',
    billing_details: { address: null, email: payer.email, name: payer.name, phone: null, tax_id: null },
    card: {
      brand: card.brand,
      checks: { address_line1_check: null, address_postal_code_check: null, cvc_check: 'pass' },
      country: 'GB',
      display_brand: card.brand,
      exp_month: expiry.month,
      exp_year: expiry.year,
      funding: 'credit',
      generated_from: null,
      last4: card.number.slice(-4),
      networks: { available: [card.brand], preferred: null },
      regulated_status: 'unregulated',
      three_d_secure_usage: { supported: true },
      wallet: null,
    },
    created,
    customer,
    customer_account: null,
    livemode: false,
    metadata: {},
    type: 'card',
  };
}
