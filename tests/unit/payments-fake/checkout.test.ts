import type Stripe from 'stripe';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { answerBank, cards, payByCard, type PaymentResult } from '#tests/support/pay.ts';
import { type Company, errorOf, openSession, sdkFor, startCompany } from './receiver.ts';

let company: Company;
beforeEach(async () => {
  company = await startCompany();
});
afterEach(() => company.stop());

describe('a checkout session', () => {
  test('carries what it was made with, and reads the same again', async () => {
    const made = await openSession(company.stripe);
    expect(made).toMatchObject({
      object: 'checkout.session',
      status: 'open',
      payment_status: 'unpaid',
      amount_total: 2500,
      currency: 'gbp',
      client_reference_id: 'order-1',
      metadata: { orderNo: '1041' },
      payment_intent: null,
    });
    const read = await company.stripe.checkout.sessions.retrieve(made.id, { expand: ['line_items'] });
    expect(read.url).toBe(made.url);
    const item = read.line_items?.data[0];
    expect(item).toMatchObject({ description: 'Braising steak', quantity: 2, amount_total: 2500 });
    expect(item?.price?.unit_amount_decimal?.toString()).toBe('1250');
  });

  test('keeps the order of many lines', async () => {
    const names = Array.from({ length: 30 }, (_, place) => `Line ${place}`);
    const made = await openSession(company.stripe, {
      line_items: names.map((name) => ({
        quantity: 1,
        price_data: { currency: 'gbp', unit_amount: 100, product_data: { name } },
      })),
    });
    const found: (string | null)[] = [];
    for await (const item of company.stripe.checkout.sessions.listLineItems(made.id, { limit: 7 })) {
      found.push(item.description);
    }
    expect(found).toEqual(names);
  });

  test('ends no sooner than half an hour from now and no later than a day', async () => {
    const now = Math.floor(Date.now() / 1000);
    for (const expires_at of [now + 20 * 60, now + 25 * 3600]) {
      const error = await errorOf(openSession(company.stripe, { expires_at }));
      expect(error).toMatchObject({ type: 'StripeInvalidRequestError', statusCode: 400, param: 'expires_at' });
    }
  });

  test.each([
    ['an amount below the least', { line_items: [line(29)] }, { code: 'amount_too_small' }],
    ['no lines', { line_items: [] }, { param: 'line_items' }],
    ['an address that is none', { success_url: 'thanks' }, { code: 'url_invalid', param: 'success_url' }],
    ['a customer that is none', { customer: 'cus_none' }, {}],
  ])('with %s is refused', async (_what, change, expected) => {
    const error = await errorOf(openSession(company.stripe, change));
    expect(error).toMatchObject({ type: 'StripeInvalidRequestError', statusCode: 400, ...expected });
  });

  test('with a name that is not known is refused by that name', async () => {
    const change: object = { succes_url: 'http://127.0.0.1/' };
    const error = await errorOf(openSession(company.stripe, change));
    expect(error).toMatchObject({ code: 'parameter_unknown', param: 'succes_url' });
  });

  test('that no one made is missing', async () => {
    const error = await errorOf(company.stripe.checkout.sessions.retrieve('cs_test_none'));
    expect(error).toMatchObject({ statusCode: 404, code: 'resource_missing' });
  });
});

function line(unit_amount: number): Stripe.Checkout.SessionCreateParams.LineItem {
  return { quantity: 1, price_data: { currency: 'gbp', unit_amount, product_data: { name: 'Bones' } } };
}

function refusal(result: PaymentResult): string {
  return result.outcome === 'refused' ? result.message : `It is ${result.outcome}`;
}

describe('paying on the page', () => {
  test('with a good card goes back to the shop, and the webhook is signed', async () => {
    const made = await openSession(company.stripe);
    const result = await payByCard(made.url, cards.good);
    expect(result).toEqual({ outcome: 'paid', returnedTo: `http://127.0.0.1:8080/orders/thanks?session=${made.id}` });
    await company.receiver.waitFor(3);
    expect(company.typesReceived()).toEqual([
      'charge.succeeded',
      'payment_intent.succeeded',
      'checkout.session.completed',
    ]);
    const last = company.receiver.received[2];
    if (!last) throw new Error('There are three');
    const event = company.verify(last);
    expect(event.data.object).toMatchObject({ id: made.id, payment_status: 'paid', status: 'complete', url: null });
    expect(() => company.verify({ ...last, body: last.body.replace('paid', 'owed') })).toThrow(/signature/i);

    const read = await company.stripe.checkout.sessions.retrieve(made.id, { expand: ['payment_intent.latest_charge'] });
    const intent = read.payment_intent;
    if (intent === null || typeof intent === 'string') throw new Error('It was to be expanded');
    expect(intent).toMatchObject({ status: 'succeeded', amount_received: 2500, metadata: { orderNo: '1041' } });
    expect(intent.latest_charge).toMatchObject({ paid: true, amount: 2500, payment_method_details: { type: 'card' } });
  });

  test.each([
    [cards.declined, 'generic_decline', 'Your card was declined.'],
    [cards.withoutFunds, 'insufficient_funds', 'Your card has insufficient funds.'],
  ])('with card %s is declined, and another card pays after it', async (number, declineCode, message) => {
    const made = await openSession(company.stripe);
    const result = await payByCard(made.url, number);
    expect(result).toEqual({ outcome: 'refused', status: 422, message: `${message} Nothing was charged.` });
    const read = await company.stripe.checkout.sessions.retrieve(made.id, { expand: ['payment_intent'] });
    expect(read).toMatchObject({
      status: 'open',
      payment_status: 'unpaid',
      payment_intent: { status: 'requires_payment_method', last_payment_error: { decline_code: declineCode } },
    });
    expect((await payByCard(made.url, cards.good)).outcome).toBe('paid');
    const charges = await company.stripe.charges.list();
    expect(charges.data.map((charge) => charge.status)).toEqual(['succeeded', 'failed']);
  });

  test('with a number that is no card number charges nothing', async () => {
    const made = await openSession(company.stripe);
    const result = await payByCard(made.url, '4242 4242 4242 4241');
    expect(result).toMatchObject({ outcome: 'refused', status: 422 });
    expect(company.fake.charges()).toEqual([]);
  });

  test('with a real card number is declined, and the number is kept nowhere', async () => {
    const made = await openSession(company.stripe);
    const result = await payByCard(made.url, '4539 5787 6362 1486');
    expect(refusal(result)).toMatch(/only the published test cards/);
    expect(JSON.stringify([company.fake.events(), company.fake.charges()])).not.toContain('1486');
  });

  test('twice with the same form charges once', async () => {
    const made = await openSession(company.stripe);
    const page = await (await fetch(made.url)).text();
    const formId = /name="formId" value="([^"]+)"/.exec(page)?.[1] ?? '';
    const fields = { formId, name: 'A Payer', card: '4000000000000002', expiry: '12/40', cvc: '123' };
    const send = () => fetch(made.url, { method: 'POST', body: new URLSearchParams(fields), redirect: 'manual' });
    expect((await Promise.all([send(), send()])).map((answer) => answer.status)).toEqual([303, 303]);
    expect(company.fake.charges()).toHaveLength(1);
  });

  test('with a card whose bank asks waits for the answer, and pays on Complete', async () => {
    const made = await openSession(company.stripe);
    const asked = await payByCard(made.url, cards.asksAlways);
    if (asked.outcome !== 'asked') throw new Error(`The bank asks, but: ${asked.outcome}`);
    expect((await company.stripe.checkout.sessions.retrieve(made.id)).payment_status).toBe('unpaid');
    expect((await answerBank(asked.url, 'complete')).outcome).toBe('paid');
    expect((await company.stripe.checkout.sessions.retrieve(made.id)).payment_status).toBe('paid');
  });

  test('with a card whose bank is answered wrongly is refused, and stays open', async () => {
    const made = await openSession(company.stripe);
    const result = await payByCard(made.url, cards.asksUntilSaved, { bank: 'fail' });
    expect(refusal(result)).toMatch(/unable to authenticate/);
    const read = await company.stripe.checkout.sessions.retrieve(made.id, { expand: ['payment_intent'] });
    expect(read).toMatchObject({
      status: 'open',
      payment_intent: { last_payment_error: { code: 'payment_intent_authentication_failure' } },
    });
  });
});

describe('a session that is over', () => {
  test('by expiry refuses to be paid', async () => {
    const made = await openSession(company.stripe);
    const expired = await company.stripe.checkout.sessions.expire(made.id);
    expect(expired).toMatchObject({ status: 'expired', url: null });
    expect(await payByCard(made.url, cards.good)).toMatchObject({ outcome: 'refused', status: 410 });
    expect(company.fake.charges()).toEqual([]);
    await company.receiver.waitFor(1);
    expect(company.typesReceived()).toEqual(['checkout.session.expired']);
  });

  test('by time says so by webhook, and its intent is cancelled', async () => {
    const made = await openSession(company.stripe);
    await payByCard(made.url, cards.declined);
    company.fake.advance({ minutes: 32 });
    const read = await company.stripe.checkout.sessions.retrieve(made.id, { expand: ['payment_intent'] });
    expect(read).toMatchObject({ status: 'expired', payment_intent: { status: 'canceled' } });
    await company.fake.flush();
    expect(company.typesReceived().slice(-2)).toEqual(['payment_intent.canceled', 'checkout.session.expired']);
  });

  test('while the bank asks takes no money on Complete', async () => {
    const made = await openSession(company.stripe);
    const asked = await payByCard(made.url, cards.asksAlways);
    await company.stripe.checkout.sessions.expire(made.id);
    const result = await answerBank(asked.outcome === 'asked' ? asked.url : '', 'complete');
    expect(result).toMatchObject({ outcome: 'refused', status: 410 });
    expect(company.fake.charges()).toEqual([]);
  });

  test('by payment cannot be expired', async () => {
    const made = await openSession(company.stripe);
    await payByCard(made.url, cards.good);
    const error = await errorOf(company.stripe.checkout.sessions.expire(made.id));
    expect(error).toMatchObject({ type: 'StripeInvalidRequestError', statusCode: 400 });
    expect(error.message).toMatch(/status of `complete`/);
    expect(await payByCard(made.url, cards.good)).toMatchObject({ outcome: 'paid' });
    expect(company.fake.charges()).toHaveLength(1);
  });
});

test('a wrong key is refused, and no key too', async () => {
  const error = await errorOf(openSession(sdkFor(company.fake.port, 'sk_test_of_someone_else')));
  expect(error).toMatchObject({ type: 'StripeAuthenticationError', statusCode: 401 });
  const bare = await fetch(`${company.fake.url}/v1/charges`);
  expect(bare.status).toBe(401);
});
