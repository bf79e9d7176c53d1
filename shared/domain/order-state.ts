export const ORDER_STATES = [
  'awaiting payment',
  'confirmed',
  'packed',
  'ready',
  'collected',
  'delivered',
  'cancelled',
  'missed',
] as const;
export type OrderState = (typeof ORDER_STATES)[number];

export const PAYMENT_STATES = ['unpaid', 'paid', 'part paid', 'refunded in part', 'refunded'] as const;
export type PaymentState = (typeof PAYMENT_STATES)[number];

const NEXT: Record<OrderState, readonly OrderState[]> = {
  'awaiting payment': ['confirmed', 'cancelled'],
  confirmed: ['packed', 'cancelled'],
  packed: ['confirmed', 'ready', 'cancelled'],
  ready: ['collected', 'delivered', 'missed', 'cancelled'],
  collected: ['ready'],
  delivered: ['ready'],
  missed: ['collected', 'cancelled'],
  cancelled: [],
};

/** A tick on the run sheet can be taken back (collected to ready); money never flows backwards this way. */
export function canMoveOrder(from: OrderState, to: OrderState): boolean {
  return NEXT[from].includes(to);
}
