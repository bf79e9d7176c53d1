import type Stripe from 'stripe';
import type { Fake } from '../fake.ts';
import { newId } from '../ids.ts';

/** What happened, with the object as it is just after. */
export type Happening =
  | { type: 'checkout.session.completed' | 'checkout.session.expired'; object: Stripe.Checkout.Session }
  | {
      type: 'payment_intent.succeeded' | 'payment_intent.payment_failed' | 'payment_intent.canceled';
      object: Stripe.PaymentIntent;
    }
  | { type: 'charge.succeeded' | 'charge.failed' | 'charge.refunded'; object: Stripe.Charge }
  | { type: 'refund.created' | 'refund.updated' | 'refund.failed'; object: Stripe.Refund };

/** The API version that the SDK of this project is pinned to; an endpoint is registered with one. */
const apiVersion = '2026-10-28.endive';

/** Records the event with a copy of the object, and hands it to the sender. */
export function emit(fake: Fake, { type, object }: Happening): void {
  const event: Stripe.EventBase = {
    id: newId('evt'),
    object: 'event',
    api_version: apiVersion,
    created: fake.now(),
    data: { object: structuredClone(object) },
    livemode: false,
    pending_webhooks: 1,
    request: null,
    type,
  };
  fake.store.events.set(event.id, event);
  fake.sender.enqueue(event.id);
}
