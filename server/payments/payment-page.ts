import Stripe from 'stripe';
import { AppError } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';

/** What a payment page is made from. The same request gives the same page under the company's idempotency key. */
type PageRequest = {
  key: string;
  token: string;
  email: string;
  description: string;
  metadata: Record<string, string>;
  items: PageItem[];
  /** When the buyer went to payment: the page lives from then on. */
  from: Date;
  /** What the order's page is told when the buyer comes back: paid, or not. */
  back: { paid: string; left: string };
  /** The card is kept for what is still to be paid. */
  keepsCard: boolean;
};

type PageItem = { name: string; quantity: number; unitPricePence: number };

/** An order as it stood when it went to payment. */
export type PageOrder = {
  id: string;
  orderNo: number;
  token: string;
  email: string;
  /** Raised with every hold: one attempt to pay, one page. */
  version: number;
  reachedPaymentAt: Date;
  deliveryPence: number;
  depositPence: number | null;
  keepsCard: boolean;
  lines: (PageItem & { discountPence: number })[];
};

/** The company takes 30 minutes at least; one more is for the way there. */
const PAGE_MINUTES = 31;

/** Makes the page where an order is paid. Everything in it comes from the order. */
export function createPaymentPage(deps: Deps, order: PageOrder): Promise<Stripe.Checkout.Session> {
  return createPage(deps, {
    key: `order ${order.id} attempt ${order.version}`,
    token: order.token,
    email: order.email,
    description: `Order ${order.orderNo}`,
    metadata: { orderId: order.id, attempt: String(order.version) },
    items: itemsOf(order),
    from: order.reachedPaymentAt,
    back: { paid: 'paid', left: 'left' },
    keepsCard: order.depositPence !== null || order.keepsCard,
  });
}

/** The company knows no negative amounts: a line with a discount stands there as one item at what is left of it. */
function itemsOf({ orderNo, lines, deliveryPence, depositPence }: PageOrder): PageItem[] {
  if (depositPence !== null) {
    return [{ name: `Deposit for order ${orderNo}`, quantity: 1, unitPricePence: depositPence }];
  }
  const goods = lines.map(({ name, quantity, unitPricePence, discountPence }) =>
    discountPence === 0
      ? { name, quantity, unitPricePence }
      : {
          name: `${quantity} × ${name}, with your code`,
          quantity: 1,
          unitPricePence: quantity * unitPricePence - discountPence,
        },
  );
  const items = [...goods, { name: 'Delivery', quantity: 1, unitPricePence: deliveryPence }];
  return items.filter((item) => item.unitPricePence > 0);
}

export type PageAddition = {
  id: string;
  reachedPaymentAt: Date;
  order: Pick<PageOrder, 'id' | 'orderNo' | 'token' | 'email'>;
  lines: PageItem[];
};

/** Makes the page where more for a paid order is paid. */
export function createAdditionPage(deps: Deps, addition: PageAddition): Promise<Stripe.Checkout.Session> {
  const { order } = addition;
  return createPage(deps, {
    key: `addition ${addition.id}`,
    token: order.token,
    email: order.email,
    description: `Added to order ${order.orderNo}`,
    metadata: { orderId: order.id, additionId: addition.id },
    items: addition.lines,
    from: addition.reachedPaymentAt,
    back: { paid: 'added', left: 'left-addition' },
    keepsCard: false,
  });
}

/** Makes the page where the rest of a packed order is paid with another card than the one that was kept. */
export function createBalancePage(
  deps: Deps,
  { order, balance, from }: { order: PageAddition['order']; balance: { id: string; amountPence: number }; from: Date },
): Promise<Stripe.Checkout.Session> {
  return createPage(deps, {
    key: `balance ${balance.id} page ${from.getTime()}`,
    token: order.token,
    email: order.email,
    description: `The rest of order ${order.orderNo}`,
    metadata: { orderId: order.id, balanceId: balance.id },
    items: [{ name: `The rest of order ${order.orderNo}`, quantity: 1, unitPricePence: balance.amountPence }],
    from,
    back: { paid: 'paid', left: 'left-balance' },
    keepsCard: false,
  });
}

function createPage(deps: Deps, page: PageRequest): Promise<Stripe.Checkout.Session> {
  const { metadata, description, back, keepsCard } = page;
  const address = `${deps.origin}/orders/${page.token}`;
  return deps.payments.stripe.checkout.sessions.create(
    {
      mode: 'payment',
      line_items: page.items.map((item) => ({
        quantity: item.quantity,
        price_data: { currency: 'gbp', unit_amount: item.unitPricePence, product_data: { name: item.name } },
      })),
      customer_email: page.email,
      client_reference_id: metadata.orderId ?? '',
      metadata,
      payment_intent_data: { metadata, description, ...(keepsCard ? { setup_future_usage: 'off_session' } : {}) },
      ...(keepsCard ? { customer_creation: 'always' } : {}),
      success_url: `${address}?from=${back.paid}`,
      cancel_url: `${address}?from=${back.left}`,
      expires_at: Math.floor(page.from.getTime() / 1000) + PAGE_MINUTES * 60,
    },
    { idempotencyKey: page.key },
  );
}

/** Ends a page. The answer says how it really stands: one that was paid meanwhile is complete. */
export async function endPaymentPage(deps: Deps, sessionId: string): Promise<Stripe.Checkout.Session> {
  const { sessions } = deps.payments.stripe.checkout;
  try {
    return await sessions.expire(sessionId);
  } catch (error) {
    if (!(error instanceof Stripe.errors.StripeInvalidRequestError)) throw error;
    return getPaymentPage(deps, sessionId);
  }
}

/** With its payment, which names the card. */
export function getPaymentPage(deps: Deps, sessionId: string): Promise<Stripe.Checkout.Session> {
  return deps.payments.stripe.checkout.sessions.retrieve(sessionId, { expand: ['payment_intent'] });
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
