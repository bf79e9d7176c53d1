/**
 * The way of a place on the waiting list: `offered` holds one box for a limited time; `taken` went to payment with it,
 * `lapsed` let the time run out, `left` gave the place up.
 */
export const WAITING_STATES = ['unconfirmed', 'waiting', 'offered', 'taken', 'lapsed', 'left'] as const;
