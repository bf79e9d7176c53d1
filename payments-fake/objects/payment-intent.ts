import type Stripe from 'stripe';
import { newId, randomText } from '../ids.ts';
import type { IntentDetails } from '../store.ts';

export type IntentPlan = {
  amount: number;
  currency: string;
  created: number;
  customer: string | null;
  paymentMethod: string | null;
  details: IntentDetails;
};

export function buildIntent(plan: IntentPlan): Stripe.PaymentIntent {
  const id = newId('pi');
  return {
    id,
    object: 'payment_intent',
    allowed_payment_method_types: null,
    amount: plan.amount,
    amount_capturable: 0,
    amount_details: { tip: {} },
    amount_received: 0,
    application: null,
    application_fee_amount: null,
    automatic_payment_methods: null,
    canceled_at: null,
    cancellation_reason: null,
    capture_method: 'automatic_async',
    client_secret: `${id}_secret_${randomText(25)}`,
    confirmation_method: 'automatic',
    created: plan.created,
    currency: plan.currency,
    customer: plan.customer,
    customer_account: null,
    description: plan.details.description,
    excluded_payment_method_types: null,
    last_payment_error: null,
    latest_charge: null,
    livemode: false,
    managed_payments: null,
    metadata: plan.details.metadata,
    next_action: null,
    on_behalf_of: null,
    payment_method: plan.paymentMethod,
    payment_method_configuration_details: null,
    payment_method_options: {},
    payment_method_types: ['card'],
    payment_record: null,
    processing: null,
    receipt_email: plan.details.receiptEmail,
    review: null,
    setup_future_usage: plan.details.setupFutureUsage,
    shipping: null,
    source: null,
    statement_descriptor: null,
    statement_descriptor_suffix: null,
    status: plan.paymentMethod === null ? 'requires_payment_method' : 'requires_confirmation',
    transfer_data: null,
    transfer_group: null,
  };
}
