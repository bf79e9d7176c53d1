import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { cards, payByCard } from '#tests/support/pay.ts';
import { type Company, errorOf, openSession, startCompany } from './receiver.ts';

let company: Company;
beforeEach(async () => {
  company = await startCompany();
});
afterEach(() => company.stop());

/** Pays a session over £25 and gives the id of its payment intent. */
async function paidIntent(card = cards.good): Promise<string> {
  const made = await openSession(company.stripe);
  await payByCard(made.url, card);
  const { payment_intent: intent } = await company.stripe.checkout.sessions.retrieve(made.id);
  if (typeof intent !== 'string') throw new Error('A paid session has an intent');
  return intent;
}

describe('a refund', () => {
  test('without an amount gives all back, and a second one is refused', async () => {
    const payment_intent = await paidIntent();
    const refund = await company.stripe.refunds.create({ payment_intent, metadata: { why: 'cancelled' } });
    expect(refund).toMatchObject({ amount: 2500, status: 'succeeded', metadata: { why: 'cancelled' }, payment_intent });
    expect(company.fake.charges()[0]).toMatchObject({ refunded: true, amount_refunded: 2500 });
    const error = await errorOf(company.stripe.refunds.create({ payment_intent }));
    expect(error).toMatchObject({ type: 'StripeInvalidRequestError', code: 'charge_already_refunded' });
  });

  test('of a part leaves the rest, and more than the rest is refused', async () => {
    const payment_intent = await paidIntent();
    await company.stripe.refunds.create({ payment_intent, amount: 1000 });
    const error = await errorOf(company.stripe.refunds.create({ payment_intent, amount: 1501 }));
    expect(error).toMatchObject({ statusCode: 400, param: 'amount' });
    expect(error.message).toBe('Refund amount (£15.01) is greater than unrefunded amount on charge (£15.00)');
    await company.stripe.refunds.create({ payment_intent, amount: 1500 });
    expect(company.fake.charges()[0]).toMatchObject({ refunded: true });
    const all = await company.stripe.refunds.list({ payment_intent });
    expect(all.data.map((refund) => refund.amount)).toEqual([1500, 1000]);
  });

  test('of more than was paid is refused', async () => {
    const error = await errorOf(company.stripe.refunds.create({ payment_intent: await paidIntent(), amount: 2501 }));
    expect(error.message).toBe('Refund amount (£25.01) is greater than charge amount (£25.00)');
    expect(company.fake.refunds()).toEqual([]);
  });

  test('of nothing paid is refused', async () => {
    const intent = await company.stripe.paymentIntents.create({ amount: 500, currency: 'gbp' });
    const error = await errorOf(company.stripe.refunds.create({ payment_intent: intent.id }));
    expect(error).toMatchObject({ statusCode: 400, param: 'payment_intent' });
  });

  test('to a slow card is pending, then done', async () => {
    const refund = await company.stripe.refunds.create({ payment_intent: await paidIntent(cards.refundPending) });
    expect(refund.status).toBe('pending');
    company.fake.advance({ minutes: 1 });
    expect((await company.stripe.refunds.retrieve(refund.id)).status).toBe('succeeded');
  });

  test('to a closed card fails later, and the charge owes it again', async () => {
    const refund = await company.stripe.refunds.create({ payment_intent: await paidIntent(cards.refundFails) });
    expect(refund.status).toBe('succeeded');
    company.fake.advance({ minutes: 1 });
    expect(await company.stripe.refunds.retrieve(refund.id)).toMatchObject({
      status: 'failed',
      failure_reason: 'expired_or_canceled_card',
    });
    expect(company.fake.charges()[0]).toMatchObject({ refunded: false, amount_refunded: 0 });
    await company.fake.flush();
    expect(company.typesReceived()).toContain('refund.failed');
  });

  test('is refused while refunds are told to fail', async () => {
    const payment_intent = await paidIntent();
    company.fake.control({ declineRefunds: true });
    const error = await errorOf(company.stripe.refunds.create({ payment_intent }));
    expect(error.code).toBe('balance_insufficient');
    company.fake.reset();
    expect((await company.stripe.refunds.create({ payment_intent })).status).toBe('succeeded');
  });
});

describe('a card saved at checkout', () => {
  async function savedCard(number: string) {
    const made = await openSession(company.stripe, {
      payment_intent_data: { setup_future_usage: 'off_session' },
    });
    await payByCard(made.url, number, { bank: 'complete' });
    const session = await company.stripe.checkout.sessions.retrieve(made.id, { expand: ['payment_intent'] });
    const intent = session.payment_intent;
    if (intent === null || typeof intent === 'string') throw new Error('It was to be expanded');
    const { customer, payment_method } = intent;
    if (typeof customer !== 'string' || typeof payment_method !== 'string') throw new Error('Both are ids');
    return { customer, payment_method };
  }

  test.each([cards.good, cards.asksUntilSaved])('%s pays again while its owner is away', async (number) => {
    const saved = await savedCard(number);
    const order = { amount: 4000, currency: 'gbp', off_session: true, confirm: true };
    const intent = await company.stripe.paymentIntents.create({ ...saved, ...order });
    expect(intent).toMatchObject({ status: 'succeeded', amount_received: 4000 });
    const list = await company.stripe.paymentMethods.list({ customer: saved.customer, type: 'card' });
    expect(list.data.map((method) => method.id)).toEqual([saved.payment_method]);
  });

  test('whose bank always asks is refused while its owner is away', async () => {
    const saved = await savedCard(cards.asksAlways);
    const order = { amount: 4000, currency: 'gbp', off_session: true, confirm: true };
    const error = await errorOf(company.stripe.paymentIntents.create({ ...saved, ...order }));
    expect(error).toMatchObject({
      type: 'StripeCardError',
      statusCode: 402,
      code: 'authentication_required',
      payment_intent: { status: 'requires_payment_method' },
    });
  });

  test('is refused with another customer, or with none', async () => {
    const { payment_method } = await savedCard(cards.good);
    const order = { amount: 4000, currency: 'gbp', payment_method };
    expect(await errorOf(company.stripe.paymentIntents.create(order))).toMatchObject({ param: 'payment_method' });
  });

  test('declines when told so, once', async () => {
    const saved = await savedCard(cards.good);
    company.fake.control({ declineNext: 1 });
    const order = { ...saved, amount: 4000, currency: 'gbp', off_session: true, confirm: true };
    expect(await errorOf(company.stripe.paymentIntents.create(order))).toMatchObject({ code: 'card_declined' });
    expect((await company.stripe.paymentIntents.create(order)).status).toBe('succeeded');
  });
});

test('an intent whose bank asks sends the payer there, and is paid on their return', async () => {
  const intent = await company.stripe.paymentIntents.create({
    amount: 900,
    currency: 'gbp',
    payment_method: 'pm_card_authenticationRequired',
    return_url: 'http://127.0.0.1:8080/back',
    confirm: true,
  });
  const url = intent.next_action?.redirect_to_url?.url ?? '';
  const answer = await fetch(url, {
    method: 'POST',
    body: new URLSearchParams({ answer: 'complete' }),
    redirect: 'manual',
  });
  expect(answer.headers.get('location')).toContain(`payment_intent=${intent.id}`);
  expect((await company.stripe.paymentIntents.retrieve(intent.id)).status).toBe('succeeded');
  const again = await errorOf(company.stripe.paymentIntents.confirm(intent.id));
  expect(again.code).toBe('payment_intent_unexpected_state');
});

test('an intent that is cancelled cannot be paid', async () => {
  const intent = await company.stripe.paymentIntents.create({ amount: 900, currency: 'gbp' });
  expect((await company.stripe.paymentIntents.cancel(intent.id)).status).toBe('canceled');
  const error = await errorOf(company.stripe.paymentIntents.confirm(intent.id, { payment_method: 'pm_card_visa' }));
  expect(error.statusCode).toBe(400);
});
