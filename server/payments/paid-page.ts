import type Stripe from 'stripe';

/** After the cut-off no page opens; the last one that could be open has ended by then, and the cutting list stands. */
export const FREEZE_MS = 35 * 60_000;

export type PaidPage = {
  intentId: string;
  amountPence: number;
  /** The card that was kept, where the page asked for it. */
  card: { providerCustomerId: string; providerMethodId: string } | null;
};

/** What was paid on a page; null while nothing was. */
export function paidOn(page: Stripe.Checkout.Session): PaidPage | null {
  if (page.status !== 'complete' || page.payment_status !== 'paid') return null;
  const intent = page.payment_intent;
  const intentId = idOf(intent);
  const amountPence = page.amount_total ?? 0;
  if (!intentId || amountPence === 0) return null;
  const providerCustomerId = idOf(page.customer);
  const providerMethodId = typeof intent === 'object' ? idOf(intent?.payment_method ?? null) : null;
  const card = providerCustomerId && providerMethodId ? { providerCustomerId, providerMethodId } : null;
  return { intentId, amountPence, card };
}

function idOf(value: string | { id: string } | null): string | null {
  return typeof value === 'string' ? value : (value?.id ?? null);
}
