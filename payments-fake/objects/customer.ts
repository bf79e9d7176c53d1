import type Stripe from 'stripe';
import { newId } from '../ids.ts';

export type CustomerPlan = {
  created: number;
  email: string | null;
  name: string | null;
  phone: string | null;
  description: string | null;
  metadata: Record<string, string>;
};

export function buildCustomer({ created, email, name, phone, description, metadata }: CustomerPlan): Stripe.Customer {
  return {
    id: newId('cus'),
    object: 'customer',
    address: null,
    balance: 0,
    created,
    currency: null,
    default_source: null,
    delinquent: false,
    description,
    email,
    invoice_settings: { custom_fields: null, default_payment_method: null, footer: null, rendering_options: null },
    livemode: false,
    metadata,
    name,
    phone,
    preferred_locales: [],
    shipping: null,
    tax_exempt: 'none',
    test_clock: null,
  };
}
