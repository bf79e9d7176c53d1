import type Stripe from 'stripe';
import { buildCharge } from '../objects/charge.ts';
import type { Fake } from '../fake.ts';
import { type CardRecord, idOf, type IntentRecord } from '../store.ts';
import { authenticationRequired, type Decline, findCardByToken, genericDecline, otherCard } from '../test-cards.ts';
import { emit } from '../webhooks/emit.ts';

export type Attempt = {
  record: IntentRecord;
  card: CardRecord;
  /** The cardholder is not there to answer their bank. */
  isOffSession: boolean;
};

/** What a card without a decline of its own is refused for when the cardholder fails to prove who they are. */
const failedAuthentication: Decline = {
  code: 'payment_intent_authentication_failure',
  declineCode: '',
  message: 'We are unable to authenticate your payment method. Please choose a different payment method and try again.',
};

function errorOf(
  decline: Decline,
  method: Stripe.PaymentMethod,
  charge: Stripe.Charge | null,
): Stripe.PaymentIntent.LastPaymentError {
  const isAuthentication = decline === failedAuthentication;
  return {
    ...(charge ? { charge: charge.id } : {}),
    code: decline.code,
    ...(isAuthentication ? {} : { decline_code: decline.declineCode }),
    message: decline.message,
    payment_method: structuredClone(method),
    type: isAuthentication ? 'invalid_request_error' : 'card_error',
  };
}

function refuse(fake: Fake, { record, card }: Attempt, decline: Decline): void {
  const { intent } = record;
  const isCharged = decline !== failedAuthentication;
  const created = fake.now();
  const charge = isCharged
    ? buildCharge({ intent, method: card.method, created, decline, isAuthenticated: false })
    : null;
  intent.status = 'requires_payment_method';
  intent.payment_method = null;
  intent.next_action = null;
  intent.last_payment_error = errorOf(decline, card.method, charge);
  if (charge) {
    fake.store.charges.set(charge.id, charge);
    intent.latest_charge = charge.id;
    emit(fake, { type: 'charge.failed', object: charge });
  }
  emit(fake, { type: 'payment_intent.payment_failed', object: intent });
}

function succeed(fake: Fake, { record, card }: Attempt, isAuthenticated: boolean): void {
  const { intent } = record;
  const charge = buildCharge({ intent, method: card.method, created: fake.now(), decline: null, isAuthenticated });
  fake.store.charges.set(charge.id, charge);
  intent.status = 'succeeded';
  intent.amount_received = intent.amount;
  intent.latest_charge = charge.id;
  intent.next_action = null;
  intent.last_payment_error = null;
  if (intent.setup_future_usage !== null && typeof intent.customer === 'string') {
    card.isSetUp = true;
    card.method.customer = intent.customer;
  }
  emit(fake, { type: 'charge.succeeded', object: charge });
  emit(fake, { type: 'payment_intent.succeeded', object: intent });
}

function askForAuthentication(fake: Fake, { intent, returnUrl }: IntentRecord): void {
  intent.status = 'requires_action';
  intent.next_action = {
    redirect_to_url: { return_url: returnUrl, url: `${fake.url}/authenticate/${intent.id}` },
    type: 'redirect_to_url',
  };
}

function declineOf(fake: Fake, card: CardRecord): Decline | undefined {
  if (fake.settings.declineNext > 0) {
    fake.settings.declineNext -= 1;
    return genericDecline;
  }
  return (findCardByToken(card.token) ?? otherCard).decline;
}

/** Tries to take the money. The intent then says what came of it: succeeded, declined or waiting for the cardholder. */
export function attemptPayment(fake: Fake, attempt: Attempt): void {
  const { record, card, isOffSession } = attempt;
  record.intent.payment_method = card.method.id;
  const decline = declineOf(fake, card);
  const asks = findCardByToken(card.token)?.authentication;
  const mustAuthenticate = asks === 'always' || (asks === 'until-set-up' && !card.isSetUp);
  if (decline) refuse(fake, attempt, decline);
  else if (mustAuthenticate && isOffSession) refuse(fake, attempt, authenticationRequired);
  else if (mustAuthenticate) askForAuthentication(fake, record);
  else succeed(fake, attempt, false);
  fake.store.changed();
}

/** The cardholder answered their bank. Nothing happens when the intent no longer waits for that. */
export function answerAuthentication(fake: Fake, record: IntentRecord, isProven: boolean): void {
  const card = fake.store.cards.get(idOf(record.intent.payment_method));
  if (record.intent.status !== 'requires_action' || !card) return;
  const attempt = { record, card, isOffSession: false };
  if (isProven) succeed(fake, attempt, true);
  else refuse(fake, attempt, failedAuthentication);
  fake.store.changed();
}

export function cancelIntent(
  fake: Fake,
  { intent }: IntentRecord,
  reason: Stripe.PaymentIntent.CancellationReason,
): void {
  intent.status = 'canceled';
  intent.canceled_at = fake.now();
  intent.cancellation_reason = reason;
  intent.next_action = null;
  emit(fake, { type: 'payment_intent.canceled', object: intent });
  fake.store.changed();
}
