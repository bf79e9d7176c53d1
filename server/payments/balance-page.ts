import type Stripe from 'stripe';
import { formatMoney } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { findOrder, updateOrder, type OrderRow } from '#server/orders/order-queries.ts';
import { noSuchOrder } from '#server/orders/read-order.ts';
import { settleBalance, settleIntent } from './balance.ts';
import { paidOn } from './paid-page.ts';
import { asPaymentsDown, createBalancePage, endPaymentPage } from './payment-page.ts';
import { findBalance, updatePayment, type PaymentRow } from './payment-queries.ts';

type Open = { order: OrderRow; balance: PaymentRow };

/** What is still to be paid of a packed order, and with what the payer's browser can pay it. */
export async function readBalance(deps: Deps, token: string) {
  const { order, balance } = await getOpenBalance(deps, token);
  const { publishableKey, scriptUrl } = deps.payments;
  return {
    ...{ orderNo: order.orderNo, amountPence: balance.amountPence, publishableKey, scriptUrl },
    hasCard: order.providerMethodId !== null,
  };
}

async function getOpenBalance(deps: Deps, token: string): Promise<Open> {
  const order = await findOrder(deps.db, { token });
  if (!order) throw noSuchOrder();
  const balance = await findBalance(deps.db, order.id);
  if (balance?.state === 'failed' && order.state !== 'cancelled') return { order, balance };
  throw new AppError('STATE_CHANGED', `Nothing is open to pay for order ${order.orderNo}. Nothing was charged.`);
}

/**
 * The payment that the payer confirms in the browser with the card that was kept. An open page for another card is ended
 * first, so that the same rest cannot be paid on both.
 */
export async function startBalance(deps: Deps, token: string): Promise<{ clientSecret: string; methodId: string }> {
  const open = await getOpenBalance(deps, token);
  try {
    await endOpenPage(deps, open);
    const { order, balance } = await getOpenBalance(deps, token);
    if (!order.providerMethodId || !order.providerCustomerId) {
      throw new AppError('NOT_FOUND', 'No card was kept for this order. Please pay with another one.');
    }
    const known = balance.providerId ? await deps.payments.stripe.paymentIntents.retrieve(balance.providerId) : null;
    if (known?.status === 'succeeded') await deps.db.transaction((tx) => settleIntent(tx, deps, known));
    const intent = known && known.status !== 'canceled' ? known : await makeIntent(deps, { order, balance });
    return { clientSecret: intent.client_secret ?? '', methodId: order.providerMethodId };
  } catch (error) {
    throw asPaymentsDown(error, 'Nothing was charged; please try again in a minute.');
  }
}

async function makeIntent(deps: Deps, { order, balance }: Open): Promise<Stripe.PaymentIntent> {
  const intent = await deps.payments.stripe.paymentIntents.create(
    {
      ...{ amount: balance.amountPence, currency: 'gbp' },
      ...{ customer: order.providerCustomerId ?? '', payment_method: order.providerMethodId ?? '' },
      description: `The rest of order ${order.orderNo}`,
      metadata: { orderId: order.id, balanceId: balance.id },
    },
    { idempotencyKey: `balance ${balance.id} try ${balance.attempt}` },
  );
  await updatePayment(deps.db, balance.id, { providerId: intent.id });
  return intent;
}

async function endOpenPage(deps: Deps, { order }: Open): Promise<void> {
  if (!order.sessionId || !order.sessionUrl) return;
  const page = await endPaymentPage(deps, order.sessionId);
  await deps.db.transaction(async (tx) => {
    await settleBalancePage(tx, deps, page);
    await updateOrder(tx, order.id, { sessionUrl: null });
  });
}

/** A page of the payment company where the rest is paid with another card; the first payment is given up. */
export async function openBalancePage(deps: Deps, token: string): Promise<{ paymentUrl: string }> {
  const { order, balance } = await getOpenBalance(deps, token);
  const now = deps.clock.now();
  if (order.sessionUrl && order.sessionExpiresAt && now < order.sessionExpiresAt) {
    return { paymentUrl: order.sessionUrl };
  }
  try {
    await giveUpIntent(deps, balance);
    const page = await createBalancePage(deps, { order, balance, from: now });
    await updateOrder(deps.db, order.id, {
      ...{ sessionId: page.id, sessionUrl: page.url },
      sessionExpiresAt: new Date(page.expires_at * 1000),
    });
    return { paymentUrl: page.url ?? '' };
  } catch (error) {
    throw asPaymentsDown(error, `${formatMoney(balance.amountPence)} is still open; please try again in a minute.`);
  }
}

async function giveUpIntent(deps: Deps, balance: PaymentRow): Promise<void> {
  if (!balance.providerId) return;
  const { paymentIntents } = deps.payments.stripe;
  const intent = await paymentIntents.retrieve(balance.providerId);
  if (intent.status === 'succeeded') {
    await deps.db.transaction((tx) => settleIntent(tx, deps, intent));
    throw new AppError('STATE_CHANGED', 'The rest has just been paid. Nothing more was charged.');
  }
  if (intent.status !== 'canceled') await paymentIntents.cancel(intent.id);
  await updatePayment(deps.db, balance.id, { providerId: null, attempt: balance.attempt + 1 });
}

/** What came of the page where a rest is paid. An expired one leaves it open. */
export async function settleBalancePage(tx: Tx, deps: Deps, page: Stripe.Checkout.Session): Promise<void> {
  const { orderId, balanceId } = page.metadata ?? {};
  const paid = paidOn(page);
  if (!paid || !orderId || !balanceId) return;
  const { intentId, amountPence } = paid;
  await settleBalance(tx, deps, { orderId, balanceId, intentId, amountPence });
}
