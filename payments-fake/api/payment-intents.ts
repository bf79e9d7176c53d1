import type Stripe from 'stripe';
import { buildIntent } from '../objects/payment-intent.ts';
import { buildPaymentMethod } from '../objects/payment-method.ts';
import { attemptPayment, cancelIntent } from '../payments/attempt.ts';
import type { Fake } from '../fake.ts';
import type { CardRecord, IntentRecord } from '../store.ts';
import { type Decline, findCardByToken } from '../test-cards.ts';
import { checkAmount, readCurrency, smallestIn } from './checkout-sessions.ts';
import type { Handler } from './endpoint.ts';
import { declined, invalidRequest, noSuchObject, noSuchReference } from './faults.ts';
import { listPage, readCreated, readFilter } from './lists.ts';
import type { Params } from './params.ts';

const largestAmount = 99_999_999;
const cancellable = ['requires_payment_method', 'requires_confirmation', 'requires_action'];
const confirmable = ['requires_payment_method', 'requires_confirmation', 'requires_action'];

/** A saved card by its id, or one of the published test cards by its name: pm_card_visa. */
function findCard(fake: Fake, id: string): CardRecord {
  const known = fake.store.cards.get(id);
  if (known) return known;
  const card = findCardByToken(id);
  if (!card) throw noSuchReference('PaymentMethod', id, 'payment_method');
  const year = new Date(fake.now() * 1000).getUTCFullYear() + 1;
  const payer = { email: null, name: null };
  const expiry = { month: 12, year };
  const method = buildPaymentMethod({ card, created: fake.now(), payer, customer: null, expiry });
  const record = { method, token: card.token, isSetUp: false };
  fake.store.cards.set(method.id, record);
  return record;
}

function checkOwner(intent: Stripe.PaymentIntent, { method }: CardRecord): void {
  if (method.customer === null || method.customer === intent.customer) return;
  const message =
    'The provided PaymentMethod belongs to a Customer. Give that Customer together with the PaymentMethod.';
  throw invalidRequest(message, { param: 'payment_method' });
}

type Confirmation = { cardId: string | null; isOffSession: boolean; returnUrl: string | null };

function readConfirmation(params: Params): Confirmation {
  params.flag('use_stripe_sdk');
  params.flag('error_on_requires_action');
  params.texts('payment_method_types');
  return {
    cardId: params.text('payment_method'),
    isOffSession: params.flag('off_session'),
    returnUrl: params.text('return_url'),
  };
}

/** Throws the card error that the API gives where a payment was declined. */
function confirm(fake: Fake, record: IntentRecord, { cardId, isOffSession, returnUrl }: Confirmation): void {
  const { intent } = record;
  if (!confirmable.includes(intent.status)) {
    const message = `This PaymentIntent's status is ${intent.status}, so it cannot be confirmed.`;
    throw invalidRequest(message, { code: 'payment_intent_unexpected_state' });
  }
  const id = cardId ?? intent.payment_method;
  if (typeof id !== 'string') {
    const message = 'You cannot confirm this PaymentIntent because it is missing a payment method.';
    throw invalidRequest(message, { code: 'payment_intent_unexpected_state', param: 'payment_method' });
  }
  const card = findCard(fake, id);
  checkOwner(intent, card);
  record.returnUrl = returnUrl ?? record.returnUrl;
  attemptPayment(fake, { record, card, isOffSession });
  const error = intent.last_payment_error;
  if (intent.status !== 'requires_payment_method' || !error) return;
  const decline: Decline = {
    code: error.code ?? 'card_declined',
    declineCode: error.decline_code ?? '',
    message: error.message ?? 'Your card was declined.',
  };
  throw declined(decline, intent);
}

function readCustomer(fake: Fake, params: Params): string | null {
  const customer = params.text('customer');
  if (customer !== null && !fake.store.customers.has(customer)) throw noSuchReference('customer', customer, 'customer');
  return customer;
}

function readMethods(params: Params): void {
  const automatic = params.part('automatic_payment_methods');
  automatic?.flag('enabled');
  automatic?.text('allow_redirects');
}

export function createIntent(fake: Fake): Handler {
  return ({ params }) => {
    const amount = params.requiredInteger('amount', { min: 1, max: largestAmount });
    const currency = readCurrency(params);
    checkAmount(amount, currency, `Amount must be at least ${smallestIn(currency)}`);
    const confirmation = readConfirmation(params);
    readMethods(params);
    const isConfirmed = params.flag('confirm');
    const details = {
      description: params.text('description'),
      metadata: params.metadata(),
      receiptEmail: params.text('receipt_email'),
      setupFutureUsage: params.oneOf('setup_future_usage', ['off_session', 'on_session'] as const),
    };
    const customer = readCustomer(fake, params);
    params.refuseUnknown();
    if (confirmation.isOffSession && !isConfirmed) {
      throw invalidRequest('The parameter `off_session` needs `confirm` to be true.', { param: 'off_session' });
    }
    const card = confirmation.cardId === null ? null : findCard(fake, confirmation.cardId);
    const paymentMethod = card?.method.id ?? null;
    const intent = buildIntent({ amount, currency, created: fake.now(), customer, paymentMethod, details });
    if (card) checkOwner(intent, card);
    const record = { intent, sessionId: null, returnUrl: confirmation.returnUrl };
    fake.store.intents.set(intent.id, record);
    fake.store.changed();
    if (isConfirmed) confirm(fake, record, { ...confirmation, cardId: paymentMethod });
    return intent;
  };
}

function findIntent(fake: Fake, id: string): IntentRecord {
  const record = fake.store.intents.get(id);
  if (record) return record;
  throw noSuchObject('payment_intent', id);
}

export function retrieveIntent(fake: Fake): Handler {
  return ({ params, id }) => {
    params.text('client_secret');
    params.refuseUnknown();
    return findIntent(fake, id).intent;
  };
}

export function confirmIntent(fake: Fake): Handler {
  return ({ params, id }) => {
    const record = findIntent(fake, id);
    const confirmation = readConfirmation(params);
    params.refuseUnknown();
    if (record.sessionId !== null) {
      throw invalidRequest('You cannot confirm a PaymentIntent that a Checkout Session made.');
    }
    confirm(fake, record, confirmation);
    return record.intent;
  };
}

export function cancelOneIntent(fake: Fake): Handler {
  return ({ params, id }) => {
    const record = findIntent(fake, id);
    const reason = params.oneOf('cancellation_reason', [
      'abandoned',
      'duplicate',
      'fraudulent',
      'requested_by_customer',
    ]);
    params.refuseUnknown();
    if (record.sessionId !== null) {
      throw invalidRequest('This PaymentIntent belongs to a Checkout Session. Expire the session instead.');
    }
    if (!cancellable.includes(record.intent.status)) {
      const message = `You cannot cancel this PaymentIntent because it has a status of ${record.intent.status}.`;
      throw invalidRequest(message, { code: 'payment_intent_unexpected_state' });
    }
    cancelIntent(fake, record, reason ?? 'requested_by_customer');
    return record.intent;
  };
}

export function listIntents(fake: Fake): Handler {
  return ({ params }) => {
    const filters = [readCreated(params), readFilter(params, 'customer')];
    const newestFirst = [...fake.store.intents.values()].map((record) => record.intent).reverse();
    const found = newestFirst.filter((intent) => filters.every((filter) => filter(intent)));
    const page = listPage(found, params, '/v1/payment_intents');
    params.refuseUnknown();
    return page;
  };
}
