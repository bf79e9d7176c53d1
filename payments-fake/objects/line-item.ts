import { newId } from '../ids.ts';
import type { WireLineItem } from '../store.ts';

export type ItemPlan = {
  name: string;
  quantity: number;
  unitAmount: number;
  currency: string;
  created: number;
  metadata: Record<string, string>;
};

export function buildLineItem(plan: ItemPlan): WireLineItem {
  const total = plan.unitAmount * plan.quantity;
  return {
    id: newId('li'),
    object: 'item',
    adjustable_quantity: null,
    amount_discount: 0,
    amount_subtotal: total,
    amount_tax: 0,
    amount_total: total,
    currency: plan.currency,
    description: plan.name,
    metadata: plan.metadata,
    price: {
      id: newId('price'),
      object: 'price',
      active: false,
      billing_scheme: 'per_unit',
      created: plan.created,
      currency: plan.currency,
      custom_unit_amount: null,
      livemode: false,
      lookup_key: null,
      metadata: {},
      nickname: null,
      product: newId('prod'),
      recurring: null,
      tax_behavior: 'unspecified',
      tiers_mode: null,
      transform_quantity: null,
      type: 'one_time',
      unit_amount: plan.unitAmount,
      unit_amount_decimal: String(plan.unitAmount),
    },
    quantity: plan.quantity,
  };
}
