import Stripe from 'stripe';
import { AppError } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';

/** What a payment page is made from: an order as it stood when it went to payment. */
export type PageOrder = {
  id: string;
  orderNo: number;
  token: string;
  email: string;
  /** Raised with every hold: one attempt to pay, one page. */
  version: number;
  reachedPaymentAt: Date;
  lines: { name: string; quantity: number; unitPricePence: number }[];
};

/** The company takes 30 minutes at least; one more is for the way there. */
const PAGE_MINUTES = 31;

/**
 * Makes the page where an order is paid. Everything in it comes from the order, so that the same attempt asked for twice
 * gives the same page under the company's idempotency key.
 */
export function createPaymentPage(deps: Deps, order: PageOrder): Promise<Stripe.Checkout.Session> {
  const metadata = { orderId: order.id, attempt: String(order.version) };
  const back = `${deps.origin}/orders/${order.token}`;
  return deps.payments.stripe.checkout.sessions.create(
    {
      mode: 'payment',
      line_items: order.lines.map((line) => ({
        quantity: line.quantity,
        price_data: { currency: 'gbp', unit_amount: line.unitPricePence, product_data: { name: line.name } },
      })),
      customer_email: order.email,
      client_reference_id: order.id,
      metadata,
      payment_intent_data: { metadata, description: `Order ${order.orderNo}` },
      success_url: `${back}?from=paid`,
      cancel_url: `${back}?from=left`,
      expires_at: Math.floor(order.reachedPaymentAt.getTime() / 1000) + PAGE_MINUTES * 60,
    },
    { idempotencyKey: `order ${order.id} attempt ${order.version}` },
  );
}

/** Ends a page. The answer says how it really stands: one that was paid meanwhile is complete. */
export async function endPaymentPage(deps: Deps, sessionId: string): Promise<Stripe.Checkout.Session> {
  const { sessions } = deps.payments.stripe.checkout;
  try {
    return await sessions.expire(sessionId);
  } catch (error) {
    if (!(error instanceof Stripe.errors.StripeInvalidRequestError)) throw error;
    return sessions.retrieve(sessionId);
  }
}

export function getPaymentPage(deps: Deps, sessionId: string): Promise<Stripe.Checkout.Session> {
  return deps.payments.stripe.checkout.sessions.retrieve(sessionId);
}

/** True when the company could not be reached or had a fault of its own: worth another try, and nobody's mistake. */
export function isOutage(error: unknown): boolean {
  return (
    error instanceof Stripe.errors.StripeConnectionError ||
    error instanceof Stripe.errors.StripeAPIError ||
    error instanceof Stripe.errors.StripeRateLimitError
  );
}

export function isRefusedEmail(error: unknown): boolean {
  return error instanceof Stripe.errors.StripeInvalidRequestError && error.param === 'customer_email';
}

/** The sentence for a person, when the company cannot be reached; any other error as it came. */
export function asPaymentsDown(error: unknown, kept: string): unknown {
  if (!isOutage(error)) return error;
  return new AppError('PAYMENTS_DOWN', `The payment company cannot be reached at the moment. ${kept}`);
}
