import type Stripe from 'stripe';
import { newId } from '../ids.ts';

export type SessionPlan = {
  url: string;
  created: number;
  expiresAt: number;
  currency: string;
  amount: number;
  clientReferenceId: string | null;
  customer: string | null;
  customerEmail: string | null;
  customerCreation: 'always' | 'if_required' | null;
  metadata: Record<string, string>;
  locale: string | null;
  submitType: 'pay' | 'auto' | 'book' | 'donate' | null;
  submitText: string | null;
  successUrl: string;
  cancelUrl: string | null;
};

type Part = Pick<
  Stripe.Checkout.Session,
  | 'adaptive_pricing'
  | 'after_expiration'
  | 'allow_promotion_codes'
  | 'allowed_payment_method_types'
  | 'automatic_tax'
  | 'billing_address_collection'
  | 'client_secret'
  | 'collected_information'
  | 'consent'
  | 'consent_collection'
  | 'currency_conversion'
  | 'custom_fields'
  | 'customer_account'
  | 'discounts'
  | 'integration_identifier'
  | 'invoice'
  | 'invoice_creation'
  | 'managed_payments'
  | 'origin_context'
  | 'payment_link'
  | 'payment_method_collection'
  | 'payment_method_configuration_details'
  | 'permissions'
  | 'phone_number_collection'
  | 'recovered_from'
  | 'saved_payment_method_options'
  | 'setup_intent'
  | 'shipping_address_collection'
  | 'shipping_cost'
  | 'shipping_options'
  | 'subscription'
  | 'wallet_options'
>;

/** What stays as it is in every session that this stand-in makes. */
function unusedParts(): Part {
  return {
    adaptive_pricing: { enabled: false },
    after_expiration: null,
    allow_promotion_codes: null,
    allowed_payment_method_types: null,
    automatic_tax: { enabled: false, liability: null, provider: null, status: null },
    billing_address_collection: null,
    client_secret: null,
    collected_information: null,
    consent: null,
    consent_collection: null,
    currency_conversion: null,
    custom_fields: [],
    customer_account: null,
    discounts: [],
    integration_identifier: null,
    invoice: null,
    invoice_creation: {
      enabled: false,
      invoice_data: {
        account_tax_ids: null,
        custom_fields: null,
        description: null,
        footer: null,
        issuer: null,
        metadata: {},
        rendering_options: null,
      },
    },
    managed_payments: null,
    origin_context: null,
    payment_link: null,
    payment_method_collection: 'if_required',
    payment_method_configuration_details: null,
    permissions: null,
    phone_number_collection: { enabled: false },
    recovered_from: null,
    saved_payment_method_options: null,
    setup_intent: null,
    shipping_address_collection: null,
    shipping_cost: null,
    shipping_options: [],
    subscription: null,
    wallet_options: null,
  };
}

export function customerDetails(email: string | null, name: string | null): Stripe.Checkout.Session.CustomerDetails {
  return {
    address: null,
    business_name: null,
    email,
    individual_name: null,
    name,
    phone: null,
    tax_exempt: 'none',
    tax_ids: null,
  };
}

export function buildSession(plan: SessionPlan): Stripe.Checkout.Session {
  const id = newId('cs_test');
  return {
    ...unusedParts(),
    id,
    object: 'checkout.session',
    amount_subtotal: plan.amount,
    amount_total: plan.amount,
    cancel_url: plan.cancelUrl,
    client_reference_id: plan.clientReferenceId,
    created: plan.created,
    currency: plan.currency,
    custom_text: {
      after_submit: null,
      shipping_address: null,
      submit: plan.submitText === null ? null : { message: plan.submitText },
      terms_of_service_acceptance: null,
    },
    customer: plan.customer,
    customer_creation: plan.customerCreation,
    customer_details: plan.customerEmail === null ? null : customerDetails(plan.customerEmail, null),
    customer_email: plan.customer === null ? plan.customerEmail : null,
    expires_at: plan.expiresAt,
    livemode: false,
    locale: plan.locale,
    metadata: plan.metadata,
    mode: 'payment',
    payment_intent: null,
    payment_method_options: {},
    payment_method_types: ['card'],
    payment_status: 'unpaid',
    status: 'open',
    submit_type: plan.submitType,
    success_url: plan.successUrl,
    total_details: { amount_discount: 0, amount_shipping: 0, amount_tax: 0 },
    ui_mode: 'hosted_page',
    url: `${plan.url}/pay/${id}`,
  };
}
