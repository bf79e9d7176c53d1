import { customerDetails } from '../objects/checkout-session.ts';
import { buildCustomer } from '../objects/customer.ts';
import { buildIntent } from '../objects/payment-intent.ts';
import { buildPaymentMethod } from '../objects/payment-method.ts';
import type { Fake } from '../fake.ts';
import { type CheckoutRecord, idOf, type IntentRecord, type Payer } from '../store.ts';
import type { TestCard } from '../test-cards.ts';
import { emit } from '../webhooks/emit.ts';
import { answerAuthentication, attemptPayment, cancelIntent } from './attempt.ts';

export type CardForm = { formId: string; payer: Payer; card: TestCard; expiry: { month: number; year: number } };

function customerOf(fake: Fake, { session, details, payer }: CheckoutRecord): string | null {
  if (typeof session.customer === 'string') return session.customer;
  if (session.customer_creation !== 'always' && details.setupFutureUsage === null) return null;
  const { email, name } = payer;
  const customer = buildCustomer({ created: fake.now(), email, name, phone: null, description: null, metadata: {} });
  fake.store.customers.set(customer.id, customer);
  session.customer = customer.id;
  return customer.id;
}

/** One payment intent per session, made by the first try to pay. */
function intentOf(fake: Fake, checkout: CheckoutRecord): IntentRecord {
  const { session, details } = checkout;
  const known = fake.store.intents.get(idOf(session.payment_intent));
  if (known) return known;
  const intent = buildIntent({
    amount: session.amount_total ?? 0,
    currency: session.currency ?? 'gbp',
    created: fake.now(),
    customer: customerOf(fake, checkout),
    paymentMethod: null,
    details,
  });
  const record: IntentRecord = { intent, sessionId: session.id, returnUrl: `${fake.url}/pay/${session.id}` };
  fake.store.intents.set(intent.id, record);
  session.payment_intent = intent.id;
  return record;
}

/** Takes over into the session what came of its payment intent. */
function follow(fake: Fake, checkout: CheckoutRecord, { intent }: IntentRecord): void {
  const { session, payer } = checkout;
  if (intent.status === 'succeeded' && session.status === 'open') {
    session.status = 'complete';
    session.payment_status = 'paid';
    session.url = null;
    session.customer_details = customerDetails(payer.email, payer.name);
    session.collected_information = { business_name: null, individual_name: null, shipping_details: null };
    checkout.problem = null;
    emit(fake, { type: 'checkout.session.completed', object: session });
  } else if (intent.status === 'requires_payment_method') {
    const error = intent.last_payment_error;
    const field = error?.code === 'expired_card' ? 'expiry' : error?.code === 'incorrect_cvc' ? 'cvc' : 'card';
    checkout.problem = { field, message: error?.message ?? 'Your card was declined.' };
  }
  fake.store.changed();
}

/** The payer sent the card form. The same form again, as a second tap on Pay sends it, does nothing more. */
export function payCheckout(fake: Fake, checkout: CheckoutRecord, form: CardForm): void {
  if (checkout.session.status !== 'open' || checkout.lastForm === form.formId) return;
  checkout.lastForm = form.formId;
  checkout.payer = form.payer;
  checkout.problem = null;
  const record = intentOf(fake, checkout);
  const { customer } = record.intent;
  const method = buildPaymentMethod({
    card: form.card,
    created: fake.now(),
    payer: form.payer,
    customer: typeof customer === 'string' && checkout.details.setupFutureUsage !== null ? customer : null,
    expiry: form.expiry,
  });
  const card = { method, token: form.card.token, isSetUp: false };
  fake.store.cards.set(method.id, card);
  attemptPayment(fake, { record, card, isOffSession: false });
  follow(fake, checkout, record);
}

/** The payer answered their bank. */
export function authenticate(fake: Fake, record: IntentRecord, isProven: boolean): void {
  const checkout = fake.store.checkouts.get(record.sessionId ?? '');
  if (checkout && checkout.session.status !== 'open') return;
  answerAuthentication(fake, record, isProven);
  if (checkout) follow(fake, checkout, record);
}

export function expireCheckout(fake: Fake, { session }: CheckoutRecord): void {
  session.status = 'expired';
  session.url = null;
  const record = fake.store.intents.get(idOf(session.payment_intent));
  if (record && record.intent.status !== 'canceled') cancelIntent(fake, record, 'automatic');
  emit(fake, { type: 'checkout.session.expired', object: session });
  fake.store.changed();
}

export function expireDueCheckouts(fake: Fake): void {
  for (const checkout of fake.store.checkouts.values()) {
    const { status, expires_at: expiresAt } = checkout.session;
    if (status === 'open' && expiresAt <= fake.now()) expireCheckout(fake, checkout);
  }
}
