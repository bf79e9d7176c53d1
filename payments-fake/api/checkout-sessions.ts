import type Stripe from 'stripe';
import { buildSession, type SessionPlan } from '../objects/checkout-session.ts';
import { buildLineItem } from '../objects/line-item.ts';
import { expireCheckout } from '../payments/checkout.ts';
import type { Fake } from '../fake.ts';
import type { CheckoutRecord, IntentDetails, WireLineItem } from '../store.ts';
import { invalidRequest, noSuchObject, noSuchReference } from './faults.ts';
import type { Handler } from './endpoint.ts';
import { listPage, readCreated, readFilter } from './lists.ts';
import type { Params } from './params.ts';

/** Bounds of expires_at, and what a session lasts without it. */
const soonestSeconds = 30 * 60;
const latestSeconds = 24 * 60 * 60;
/** The clocks of two machines may differ a little. */
const graceSeconds = 60;
/** The smallest amounts that can be charged, in the currency's smallest unit. */
const smallestAmounts: Record<string, number> = { gbp: 30, eur: 50, usd: 50 };
const largestAmount = 99_999_999;

function readUrl(params: Params, name: string): string | null {
  const value = params.text(name);
  if (value === null) return null;
  if (URL.canParse(value) && /^https?:/i.test(value)) return value;
  throw invalidRequest('Not a valid URL', { code: 'url_invalid', param: params.path(name) });
}

export function readCurrency(params: Params): string {
  const currency = params.requiredText('currency').toLowerCase();
  if (currency in smallestAmounts) return currency;
  throw invalidRequest(`Invalid currency: ${currency}`, { param: params.path('currency') });
}

export function checkAmount(amount: number, currency: string, message: string): void {
  if (amount >= (smallestAmounts[currency] ?? 0)) return;
  throw invalidRequest(message, { code: 'amount_too_small' });
}

export function smallestIn(currency: string): string {
  return `${((smallestAmounts[currency] ?? 0) / 100).toFixed(2)} ${currency}`;
}

function readItem(params: Params, created: number): WireLineItem {
  const price = params.requiredPart('price_data');
  const product = price.requiredPart('product_data');
  product.text('description');
  product.texts('images');
  price.text('tax_behavior');
  product.metadata();
  return buildLineItem({
    name: product.requiredText('name'),
    quantity: params.requiredInteger('quantity', { min: 1, max: 999_999 }),
    unitAmount: price.requiredInteger('unit_amount', { min: 0, max: largestAmount }),
    currency: readCurrency(price),
    created,
    metadata: params.metadata(),
  });
}

function readItems(params: Params, created: number): WireLineItem[] {
  const items = params.parts('line_items').map((part) => readItem(part, created));
  if (items.length === 0) throw invalidRequest('You must provide line_items in payment mode.', { param: 'line_items' });
  if (items.some((item) => item.currency !== items[0]?.currency)) {
    throw invalidRequest('All prices on a Checkout Session must have the same currency.', { param: 'line_items' });
  }
  return items;
}

/** payment_intent_data. */
function readDetails(params: Params): IntentDetails {
  const data = params.part('payment_intent_data');
  return {
    description: data?.text('description') ?? null,
    metadata: data?.metadata() ?? {},
    receiptEmail: data?.text('receipt_email') ?? null,
    setupFutureUsage: data?.oneOf('setup_future_usage', ['off_session', 'on_session'] as const) ?? null,
  };
}

function readExpiry(params: Params, created: number): number {
  const expiresAt = params.integer('expires_at', { min: 0, max: 1e11 });
  if (expiresAt === null) return created + latestSeconds;
  const param = 'expires_at';
  if (expiresAt < created + soonestSeconds - graceSeconds) {
    throw invalidRequest('The `expires_at` timestamp must be at least 30 minutes in the future.', { param });
  }
  if (expiresAt > created + latestSeconds + graceSeconds) {
    throw invalidRequest('The `expires_at` timestamp must be less than 24 hours in the future.', { param });
  }
  return expiresAt;
}

/** Only cards on the hosted page in payment mode are played here. */
function refuseOtherModes(params: Params): void {
  if (params.requiredText('mode') !== 'payment') {
    throw invalidRequest('This stand-in knows payment mode alone.', { param: 'mode' });
  }
  if ((params.text('ui_mode') ?? 'hosted_page') !== 'hosted_page') {
    throw invalidRequest('This stand-in knows hosted_page alone.', { param: 'ui_mode' });
  }
  if (params.texts('payment_method_types').some((type) => type !== 'card')) {
    throw invalidRequest('This stand-in knows cards alone.', { param: 'payment_method_types' });
  }
}

function readCustomer(
  fake: Fake,
  params: Params,
): Pick<SessionPlan, 'customer' | 'customerEmail' | 'customerCreation'> {
  const customer = params.text('customer');
  const email = params.text('customer_email');
  const creation = params.oneOf('customer_creation', ['always', 'if_required'] as const);
  if (customer === null) return { customer, customerEmail: email, customerCreation: creation ?? 'if_required' };
  if (email !== null) {
    throw invalidRequest('You may only specify one of these parameters: customer, customer_email.');
  }
  const known = fake.store.customers.get(customer);
  if (!known) throw noSuchReference('customer', customer, 'customer');
  return { customer, customerEmail: known.email, customerCreation: null };
}

export function createSession(fake: Fake): Handler {
  return ({ params }) => {
    refuseOtherModes(params);
    const created = fake.now();
    const lineItems = readItems(params, created);
    const successUrl = readUrl(params, 'success_url');
    if (successUrl === null) throw invalidRequest('Missing required param: success_url.', { param: 'success_url' });
    const plan: SessionPlan = {
      ...readCustomer(fake, params),
      url: fake.url,
      created,
      expiresAt: readExpiry(params, created),
      currency: lineItems[0]?.currency ?? 'gbp',
      amount: lineItems.reduce((sum, item) => sum + item.amount_total, 0),
      clientReferenceId: params.text('client_reference_id'),
      metadata: params.metadata(),
      locale: params.text('locale'),
      submitType: params.oneOf('submit_type', ['auto', 'pay', 'book', 'donate'] as const),
      submitText: params.part('custom_text')?.part('submit')?.text('message') ?? null,
      successUrl,
      cancelUrl: readUrl(params, 'cancel_url'),
    };
    const details = readDetails(params);
    params.refuseUnknown();
    const tooSmall = `The Checkout Session's total amount due must add up to at least ${smallestIn(plan.currency)}`;
    checkAmount(plan.amount, plan.currency, tooSmall);
    const session = buildSession(plan);
    const payer = { email: plan.customerEmail, name: null };
    fake.store.checkouts.set(session.id, { session, lineItems, details, payer, lastForm: null, problem: null });
    fake.store.changed();
    return session;
  };
}

function findCheckout(fake: Fake, id: string): CheckoutRecord {
  const record = fake.store.checkouts.get(id);
  if (record) return record;
  throw noSuchObject('checkout.session', id);
}

export function retrieveSession(fake: Fake): Handler {
  return ({ params, id }) => {
    params.refuseUnknown();
    return findCheckout(fake, id).session;
  };
}

export function listLineItems(fake: Fake): Handler {
  return ({ params, id }) => {
    const { lineItems } = findCheckout(fake, id);
    const page = listPage(lineItems, params, `/v1/checkout/sessions/${id}/line_items`);
    params.refuseUnknown();
    return page;
  };
}

export function expireSession(fake: Fake): Handler {
  return ({ params, id }) => {
    params.refuseUnknown();
    const record = findCheckout(fake, id);
    const { status } = record.session;
    if (status !== 'open') {
      throw invalidRequest(
        `Only Checkout Sessions with a status in ["open"] can be expired. This Checkout Session has a status of \`${status}\`.`,
      );
    }
    expireCheckout(fake, record);
    return record.session;
  };
}

function readEmailFilter(params: Params): (session: Stripe.Checkout.Session) => boolean {
  const email = params.part('customer_details')?.text('email') ?? null;
  return (session) => email === null || session.customer_details?.email === email;
}

export function listSessions(fake: Fake): Handler {
  return ({ params }) => {
    const filters = [
      readCreated(params),
      readFilter(params, 'payment_intent'),
      readFilter(params, 'customer'),
      readFilter(params, 'status'),
      readEmailFilter(params),
    ];
    const newestFirst = [...fake.store.checkouts.values()].map((record) => record.session).reverse();
    const found = newestFirst.filter((session) => filters.every((filter) => filter(session)));
    const page = listPage(found, params, '/v1/checkout/sessions');
    params.refuseUnknown();
    return page;
  };
}
