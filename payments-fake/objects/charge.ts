import type Stripe from 'stripe';
import { newId } from '../ids.ts';
import type { Decline } from '../test-cards.ts';

export type ChargePlan = {
  intent: Stripe.PaymentIntent;
  method: Stripe.PaymentMethod;
  created: number;
  decline: Decline | null;
  isAuthenticated: boolean;
};

function outcomeOf(decline: Decline | null): Stripe.Charge.Outcome {
  return {
    advice_code: null,
    network_advice_code: null,
    network_decline_code: null,
    network_status: decline ? 'declined_by_network' : 'approved_by_network',
    reason: decline?.declineCode ?? null,
    risk_level: 'normal',
    seller_message: decline ? 'The bank did not approve this payment.' : 'Payment complete.',
    type: decline ? 'issuer_declined' : 'authorized',
  };
}

function methodDetails({ intent, method, isAuthenticated }: ChargePlan): Stripe.Charge.PaymentMethodDetails {
  const card = method.card;
  if (!card) return { type: method.type };
  return {
    card: {
      amount_authorized: intent.amount,
      authorization_code: null,
      brand: card.brand,
      checks: card.checks,
      country: card.country,
      electronic_commerce_indicator: null,
      exp_month: card.exp_month,
      exp_year: card.exp_year,
      funding: card.funding,
      installments: null,
      last4: card.last4,
      mandate: null,
      network: card.brand,
      network_transaction_id: null,
      regulated_status: 'unregulated',
      three_d_secure: isAuthenticated
        ? {
            authentication_flow: 'challenge',
            electronic_commerce_indicator: '05',
            exemption_indicator: null,
            result: 'authenticated',
            result_reason: null,
            transaction_id: null,
            version: '2.2.0',
          }
        : null,
      transaction_link_id: null,
      wallet: null,
    },
    type: 'card',
  };
}

export function buildCharge(plan: ChargePlan): Stripe.Charge {
  const { intent, method, decline } = plan;
  return {
    id: newId('ch'),
    object: 'charge',
    amount: intent.amount,
    amount_captured: decline ? 0 : intent.amount,
    amount_refunded: 0,
    application: null,
    application_fee: null,
    application_fee_amount: null,
    balance_transaction: decline ? null : newId('txn'),
    billing_details: method.billing_details,
    calculated_statement_descriptor: null,
    captured: decline === null,
    created: plan.created,
    currency: intent.currency,
    customer: intent.customer,
    description: intent.description,
    disputed: false,
    failure_balance_transaction: null,
    failure_code: decline?.code ?? null,
    failure_message: decline?.message ?? null,
    fraud_details: {},
    livemode: false,
    metadata: { ...intent.metadata },
    on_behalf_of: null,
    outcome: outcomeOf(decline),
    paid: decline === null,
    payment_intent: intent.id,
    payment_method: method.id,
    payment_method_details: methodDetails(plan),
    receipt_email: intent.receipt_email,
    receipt_number: null,
    receipt_url: null,
    refunded: false,
    review: null,
    shipping: null,
    source: null,
    source_transfer: null,
    statement_descriptor: null,
    statement_descriptor_suffix: null,
    status: decline ? 'failed' : 'succeeded',
    transfer_data: null,
    transfer_group: null,
  };
}
