import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { cards, payByCard } from '#tests/support/pay.ts';
import { type Company, errorOf, openSession, SECRET_KEY, startCompany } from './receiver.ts';

let company: Company;
beforeEach(async () => {
  company = await startCompany();
});
afterEach(() => company.stop());

describe('an idempotency key', () => {
  test('with the same request gets the first answer again', async () => {
    const params = { amount: 700, currency: 'gbp', metadata: { orderNo: '7' } };
    const first = await company.stripe.paymentIntents.create(params, { idempotencyKey: 'order-7' });
    const again = await company.stripe.paymentIntents.create(params, { idempotencyKey: 'order-7' });
    expect(again.id).toBe(first.id);
    expect(again.lastResponse.headers['idempotent-replayed']).toBe('true');
    expect(first.lastResponse.headers['idempotent-replayed']).toBeUndefined();
    expect((await company.stripe.paymentIntents.list()).data).toHaveLength(1);
  });

  test('with another request is refused', async () => {
    await company.stripe.paymentIntents.create({ amount: 700, currency: 'gbp' }, { idempotencyKey: 'order-7' });
    const call = company.stripe.paymentIntents.create({ amount: 701, currency: 'gbp' }, { idempotencyKey: 'order-7' });
    expect(await errorOf(call)).toMatchObject({ type: 'StripeIdempotencyError', statusCode: 400 });
    const other = company.stripe.customers.create({}, { idempotencyKey: 'order-7' });
    expect(await errorOf(other)).toMatchObject({ type: 'StripeIdempotencyError' });
  });

  test('repeats a decline too', async () => {
    const params = { amount: 700, currency: 'gbp', payment_method: 'pm_card_chargeDeclined', confirm: true };
    const first = await errorOf(company.stripe.paymentIntents.create(params, { idempotencyKey: 'k' }));
    const again = await errorOf(company.stripe.paymentIntents.create(params, { idempotencyKey: 'k' }));
    expect([first.statusCode, again.statusCode]).toEqual([402, 402]);
    expect(company.fake.charges()).toHaveLength(1);
  });
});

describe('a connection', () => {
  test('that breaks after the work is done makes one session all the same', async () => {
    company.fake.control({ dropAnswers: 1 });
    const made = await openSession(company.stripe);
    const all = await company.stripe.checkout.sessions.list();
    expect(all.data.map((session) => session.id)).toEqual([made.id]);
  });

  test('that is down ends in a connection error', async () => {
    company.fake.control({ down: 'drop' });
    const error = await errorOf(company.stripe.customers.create({}, { maxNetworkRetries: 0 }));
    expect(error.type).toBe('StripeConnectionError');
    company.fake.control({ down: true });
    const refused = await errorOf(company.stripe.customers.create({}, { maxNetworkRetries: 0 }));
    expect(refused).toMatchObject({ type: 'StripeAPIError', statusCode: 503 });
  });

  test('that fails once is repeated by the SDK', async () => {
    company.fake.control({ failNext: 1 });
    expect((await company.stripe.customers.create({ email: 'a@example.com' })).email).toBe('a@example.com');
    expect((await company.stripe.customers.list()).data).toHaveLength(1);
  });
});

describe('a list', () => {
  test('comes in pages, newest first', async () => {
    const made: string[] = [];
    for (let place = 0; place < 5; place += 1) made.unshift((await company.stripe.customers.create({})).id);
    const first = await company.stripe.customers.list({ limit: 2 });
    expect(first).toMatchObject({ has_more: true });
    const second = await company.stripe.customers.list({ limit: 3, starting_after: first.data[1]?.id ?? '' });
    expect(second).toMatchObject({ has_more: false });
    expect([...first.data, ...second.data].map((customer) => customer.id)).toEqual(made);
    const walked: string[] = [];
    for await (const customer of company.stripe.customers.list({ limit: 2 })) walked.push(customer.id);
    expect(walked).toEqual(made);
  });

  test.each([{ limit: 0 }, { limit: 101 }, { starting_after: 'cus_none' }])(
    'asked with %o is refused',
    async (page) => {
      expect(await errorOf(company.stripe.customers.list(page))).toMatchObject({ statusCode: 400 });
    },
  );

  test('of sessions is narrowed by status', async () => {
    const [open, over] = [await openSession(company.stripe), await openSession(company.stripe)];
    await company.stripe.checkout.sessions.expire(over.id);
    const found = await company.stripe.checkout.sessions.list({ status: 'open' });
    expect(found.data.map((session) => session.id)).toEqual([open.id]);
  });
});

describe('a webhook', () => {
  test('is sent again until the receiver takes it, with the same event id', async () => {
    company.receiver.answerWith(500, 500);
    const made = await openSession(company.stripe);
    await company.stripe.checkout.sessions.expire(made.id);
    await company.receiver.waitFor(3);
    const ids = company.receiver.received.map((one) => company.verify(one).id);
    expect(new Set(ids).size).toBe(1);
    await company.fake.flush();
    expect((await company.stripe.events.retrieve(ids[0] ?? '')).pending_webhooks).toBe(0);
    expect(company.receiver.received).toHaveLength(3);
  });

  test('is held until it is let go', async () => {
    company.fake.control({ webhooks: 'hold' });
    await payByCard((await openSession(company.stripe)).url, cards.good);
    const waiting = await company.stripe.events.list({ type: 'checkout.session.completed' });
    expect(waiting.data).toMatchObject([{ pending_webhooks: 1 }]);
    expect(company.receiver.received).toEqual([]);
    expect(await company.fake.flush()).toEqual({ delivered: 3, failed: 0 });
  });

  test('comes twice when told so', async () => {
    company.fake.control({ webhooks: 'duplicate' });
    await company.stripe.checkout.sessions.expire((await openSession(company.stripe)).id);
    await company.receiver.waitFor(2);
    const [one, other] = company.receiver.received.map((received) => company.verify(received).id);
    expect(one).toBe(other);
  });

  test('comes newest first when told so', async () => {
    company.fake.control({ webhooks: 'out-of-order' });
    await payByCard((await openSession(company.stripe)).url, cards.good);
    await company.receiver.waitFor(3);
    expect(company.typesReceived()).toEqual([
      'checkout.session.completed',
      'payment_intent.succeeded',
      'charge.succeeded',
    ]);
  });
});

test('a restart keeps sessions, and sends what was not delivered', async () => {
  const dir = await mkdtemp(path.join(tmpdir(), 'payments-'));
  try {
    const before = await startCompany({ dir });
    before.fake.control({ webhooks: 'hold' });
    const made = await openSession(before.stripe);
    await payByCard(made.url, cards.good);
    await before.stop();
    const after = await startCompany({ dir });
    expect((await after.stripe.checkout.sessions.retrieve(made.id)).status).toBe('complete');
    await after.receiver.waitFor(3);
    expect(after.typesReceived()).toContain('checkout.session.completed');
    await after.stop();
  } finally {
    await rm(dir, { recursive: true });
  }
});

describe('the control path', () => {
  const send = (address: string, body: unknown) =>
    fetch(`${company.fake.url}/control${address}`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(body),
    });

  test('switches settings, and refuses those that it does not know', async () => {
    expect((await send('', { webhooks: 'hold', declineNext: 2 })).status).toBe(200);
    const read = (await (await fetch(`${company.fake.url}/control`)).json()) as object;
    expect(read).toMatchObject({ settings: { webhooks: 'hold', declineNext: 2 } });
    expect((await send('', { webhooks: 'never' })).status).toBe(400);
    expect((await send('', { speed: 1 })).status).toBe(400);
    await send('/reset', {});
    expect(await (await fetch(`${company.fake.url}/control`)).json()).toMatchObject({ settings: { declineNext: 0 } });
  });

  test('ends an open session, once', async () => {
    const made = await openSession(company.stripe);
    expect((await send(`/expire/${made.id}`, {})).status).toBe(200);
    expect((await send(`/expire/${made.id}`, {})).status).toBe(404);
  });

  test('never shows the secret key', async () => {
    expect(await (await fetch(`${company.fake.url}/control`)).text()).not.toContain(SECRET_KEY);
  });
});
