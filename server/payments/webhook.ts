import type { RequestHandler } from 'express';
import type Stripe from 'stripe';
import { AppError } from '#shared/errors.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { settleIntent } from './balance.ts';
import { getPaymentPage } from './payment-page.ts';
import { hasEvent, insertEvent } from './payment-queries.ts';
import { settlePage } from './settle-page.ts';
import { recordRefund } from './settle-refund.ts';

type Effect = (tx: Tx) => Promise<void>;

/** POST /api/payments/webhook, with the raw body that the signature covers. An answer other than 200 brings it again. */
export function paymentWebhook(deps: Deps): RequestHandler {
  return async (request, response) => {
    const event = readEvent(deps, request.body, request.headers['stripe-signature']);
    if (!(await hasEvent(deps.db, event.id))) await process(deps, event);
    response.json({ received: true });
  };
}

function readEvent(deps: Deps, body: unknown, signature: string | string[] | undefined): Stripe.Event {
  const { stripe, webhookSecret } = deps.payments;
  try {
    if (!Buffer.isBuffer(body) || typeof signature !== 'string') throw new Error('no body or no signature');
    return stripe.webhooks.constructEvent(body, signature, webhookSecret);
  } catch {
    throw new AppError('BAD_SIGNATURE', 'The signature of this message does not fit. Nothing was done.');
  }
}

/** The event's number is kept in the transaction of its effect: a repeat finds it and does nothing. */
async function process(deps: Deps, event: Stripe.Event): Promise<void> {
  const effect = await prepare(deps, event);
  await deps.db.transaction(async (tx) => {
    const isNew = await insertEvent(tx, { eventId: event.id, type: event.type, payload: event });
    if (isNew && effect) await effect(tx);
  });
}

/** A message is trusted for ids only; how things stand is asked. Types that we do not use are kept and have no effect. */
async function prepare(deps: Deps, event: Stripe.Event): Promise<Effect | null> {
  switch (event.type) {
    case 'checkout.session.completed':
    case 'checkout.session.async_payment_succeeded':
    case 'checkout.session.expired': {
      const page = await getPaymentPage(deps, event.data.object.id);
      return (tx) => settlePage(tx, deps, page);
    }
    case 'payment_intent.succeeded': {
      const intent = await deps.payments.stripe.paymentIntents.retrieve(event.data.object.id);
      return (tx) => settleIntent(tx, deps, intent);
    }
    case 'refund.updated':
    case 'refund.failed': {
      const refund = await deps.payments.stripe.refunds.retrieve(event.data.object.id);
      return (tx) => recordRefund(tx, refund);
    }
    default:
      return null;
  }
}
