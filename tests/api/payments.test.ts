import { createHmac } from 'node:crypto';
import { eq, sql } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, expect, test } from 'vitest';
import { offer } from '#db/schema/allocations.ts';
import { collectionSlot, customerOrder, webhookEvent } from '#db/schema/orders.ts';
import { sweepHolds } from '#server/payments/payment-service.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import {
  basketFor,
  countersOf,
  getOrderRow,
  makeConfirmedOrder,
  makeStall,
  payFor,
  paymentsOf,
  payOn,
  place,
  takenOf,
  type Placed,
  type Stall,
} from '#tests/support/make-order.ts';
import { cards } from '#tests/support/pay.ts';

let world: World;
let stall: Stall;

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world, { boxes: 200, packs: 200 });
});
afterAll(() => world.stop());
beforeEach(() => world.payments.reset());

const SECRET = 'whsec_of_the_tests_only';

function send(body: string, { secret = SECRET, stamp = Math.floor(Date.now() / 1000) } = {}) {
  const digest = createHmac('sha256', secret).update(`${stamp}.${body}`).digest('hex');
  return world
    .request()
    .post('/api/payments/webhook')
    .set('Content-Type', 'application/json')
    .set('Stripe-Signature', `t=${stamp},v1=${digest}`)
    .send(body);
}

async function sessionOf(placed: Placed): Promise<string> {
  return (await getOrderRow(world, placed.token)).sessionId ?? '';
}

function mailsAbout(orderNo: number) {
  return world.mail
    .messages()
    .filter((mail) => mail.subject.includes(`${orderNo}`))
    .map((mail) => mail.subject.split(' · ')[0]);
}

test('a message with a wrong signature, an old stamp or no signature is refused and has no effect', async () => {
  world.payments.control({ webhooks: 'hold' });
  const placed = await place(world, basketFor(stall));
  await payOn(placed.paymentUrl);
  const event = world.payments.events().findLast((each) => each.type === 'checkout.session.completed');
  const body = JSON.stringify(event);
  const wrong = [
    await send(body, { secret: 'whsec_of_somebody_else' }),
    await send(body, { stamp: Math.floor(Date.now() / 1000) - 3_600 }),
    await world.request().post('/api/payments/webhook').set('Content-Type', 'application/json').send(body),
  ];
  for (const answer of wrong) {
    expect(answer.status).toBe(400);
    expect(answer.body).toMatchObject({ code: 'BAD_SIGNATURE' });
  }
  expect((await getOrderRow(world, placed.token)).state).toBe('awaiting payment');
  expect((await send(body)).status).toBe(200);
  expect((await getOrderRow(world, placed.token)).state).toBe('confirmed');
});

test('every message twice confirms once, charges once and mails once', async () => {
  const before = await countersOf(world, stall.boxOffer.id);
  world.payments.control({ webhooks: 'duplicate' });
  const placed = await place(world, basketFor(stall));
  await payFor(world, placed);
  const order = await getOrderRow(world, placed.token);
  expect(order.state).toBe('confirmed');
  expect(await paymentsOf(world, order.id)).toHaveLength(1);
  expect(await countersOf(world, stall.boxOffer.id)).toEqual({ ...before, sold: (before.sold ?? 0) + 1 });
  await world.runJobs();
  expect(mailsAbout(order.orderNo)).toEqual([`Order ${order.orderNo} is confirmed`]);
});

test('the same event at the same moment, ten times, has one effect', async () => {
  world.payments.control({ webhooks: 'hold' });
  const placed = await place(world, basketFor(stall));
  await payOn(placed.paymentUrl);
  const event = world.payments.events().findLast((each) => each.type === 'checkout.session.completed');
  const answers = await Promise.all(Array.from({ length: 10 }, () => send(JSON.stringify(event))));
  expect(answers.map((answer) => answer.status)).toEqual(Array(10).fill(200));
  const order = await getOrderRow(world, placed.token);
  expect(order).toMatchObject({ state: 'confirmed', version: 2 });
  const kept = await world.db
    .select()
    .from(webhookEvent)
    .where(eq(webhookEvent.eventId, event?.id ?? ''));
  expect(kept).toHaveLength(1);
});

test('messages in the wrong order end where the right order would', async () => {
  world.payments.control({ webhooks: 'out-of-order' });
  const before = await countersOf(world, stall.boxOffer.id);
  const basket = basketFor(stall);
  await place(world, basket);
  const second = await place(world, { ...basket, note: 'Gate code 12' });
  await payFor(world, second);
  const order = await getOrderRow(world, second.token);
  expect(order).toMatchObject({ state: 'confirmed', note: 'Gate code 12' });
  expect(await countersOf(world, stall.boxOffer.id)).toEqual({ ...before, sold: (before.sold ?? 0) + 1 });
});

test('a message that says paid for a page that is not paid is not believed', async () => {
  const placed = await place(world, basketFor(stall));
  const session = {
    id: await sessionOf(placed),
    object: 'checkout.session',
    status: 'complete',
    payment_status: 'paid',
  };
  const body = JSON.stringify({
    ...{ id: 'evt_forged_by_mistake', object: 'event', type: 'checkout.session.completed' },
    data: { object: session },
  });
  expect((await send(body)).status).toBe(200);
  expect(await getOrderRow(world, placed.token)).toMatchObject({ state: 'awaiting payment', isHeld: true });
});

test('a type that nobody asked for is kept and answered', async () => {
  const body = JSON.stringify({
    id: 'evt_of_a_new_kind',
    object: 'event',
    type: 'customer.created',
    data: { object: {} },
  });
  expect((await send(body)).status).toBe(200);
});

test('a page that ran out gives back its hold and its slot', async () => {
  const before = await countersOf(world, stall.boxOffer.id);
  const taken = await takenOf(world, stall.slot.id);
  const placed = await place(world, basketFor(stall));
  world.payments.expire(await sessionOf(placed));
  await world.payments.flush();
  expect(await getOrderRow(world, placed.token)).toMatchObject({ state: 'awaiting payment', isHeld: false });
  expect(await countersOf(world, stall.boxOffer.id)).toEqual(before);
  expect(await takenOf(world, stall.slot.id)).toBe(taken);
});

test('our own clock alone releases nothing, and the sweep asks the company', async () => {
  const before = await countersOf(world, stall.boxOffer.id);
  world.payments.control({ webhooks: 'hold' });
  const placed = await place(world, basketFor(stall));
  await world.db
    .update(customerOrder)
    .set({ reachedPaymentAt: new Date(Date.now() - 3_600_000), sessionExpiresAt: new Date(Date.now() - 1_000) })
    .where(eq(customerOrder.token, placed.token));
  await sweepHolds(world.deps);
  expect(await getOrderRow(world, placed.token)).toMatchObject({ isHeld: true });
  world.payments.expire(await sessionOf(placed));
  await sweepHolds(world.deps);
  expect(await getOrderRow(world, placed.token)).toMatchObject({ isHeld: false });
  expect(await countersOf(world, stall.boxOffer.id)).toEqual(before);
  await world.payments.flush();
  expect(await countersOf(world, stall.boxOffer.id)).toEqual(before);
});

test('a paid order whose message never came is confirmed by the sweep', async () => {
  world.payments.control({ webhooks: 'hold' });
  const placed = await place(world, basketFor(stall));
  await payOn(placed.paymentUrl);
  await world.db
    .update(customerOrder)
    .set({ reachedPaymentAt: new Date(Date.now() - 600_000) })
    .where(eq(customerOrder.token, placed.token));
  world.payments.control({ down: true });
  await sweepHolds(world.deps);
  expect((await getOrderRow(world, placed.token)).state).toBe('awaiting payment');
  world.payments.control({ down: false });
  await sweepHolds(world.deps);
  expect((await getOrderRow(world, placed.token)).state).toBe('confirmed');
});

test('a hold whose page was never kept, after a crash, is ended by the sweep', async () => {
  const before = await countersOf(world, stall.boxOffer.id);
  const placed = await place(world, basketFor(stall));
  const lost = await sessionOf(placed);
  await world.db
    .update(customerOrder)
    .set({ sessionId: null, sessionUrl: null, sessionExpiresAt: null })
    .where(eq(customerOrder.token, placed.token));
  world.clock.advance({ minutes: 10 });
  await sweepHolds(world.deps);
  world.clock.advance({ minutes: -10 });
  expect(await getOrderRow(world, placed.token)).toMatchObject({ isHeld: false, sessionId: lost });
  expect(await countersOf(world, stall.boxOffer.id)).toEqual(before);
  expect(await payOn(placed.paymentUrl)).toMatchObject({ outcome: 'refused' });
  await world.payments.flush();
  expect(await paymentsOf(world, (await getOrderRow(world, placed.token)).id)).toEqual([]);
});

/** A payment in flight while its hold ended: the company says paid, and our side had given the stock back. */
async function payLate() {
  world.payments.control({ webhooks: 'hold' });
  const placed = await place(world, basketFor(stall));
  await payOn(placed.paymentUrl);
  const order = await getOrderRow(world, placed.token);
  await world.db.update(customerOrder).set({ isHeld: false }).where(eq(customerOrder.id, order.id));
  await world.db
    .update(offer)
    .set({ held: sql`${offer.held} - 1` })
    .where(eq(offer.id, stall.boxOffer.id));
  await world.db
    .update(collectionSlot)
    .set({ taken: sql`${collectionSlot.taken} - 1` })
    .where(eq(collectionSlot.id, stall.slot.id));
  return placed;
}

test('a payment that arrives for a released hold takes the box again while it is free', async () => {
  const before = await countersOf(world, stall.boxOffer.id);
  const placed = await payLate();
  expect(await countersOf(world, stall.boxOffer.id)).toEqual(before);
  await world.payments.flush();
  expect(await getOrderRow(world, placed.token)).toMatchObject({ state: 'confirmed', paymentState: 'paid' });
  expect(await countersOf(world, stall.boxOffer.id)).toEqual({ ...before, sold: (before.sold ?? 0) + 1 });
});

test('a payment that arrives when the box has gone to others is refunded in full, and the customer is told', async () => {
  const before = await countersOf(world, stall.boxOffer.id);
  const placed = await payLate();
  await world.db.update(offer).set({ isClosed: true }).where(eq(offer.id, stall.boxOffer.id));
  await world.payments.flush();
  await world.runJobs();
  await world.db.update(offer).set({ isClosed: false }).where(eq(offer.id, stall.boxOffer.id));
  const order = await getOrderRow(world, placed.token);
  expect(order).toMatchObject({ state: 'cancelled', paymentState: 'refunded' });
  expect(await countersOf(world, stall.boxOffer.id)).toEqual(before);
  expect(await paymentsOf(world, order.id)).toMatchObject([
    { kind: 'charge', amountPence: 9_400 },
    { kind: 'refund', amountPence: 9_400, state: 'done' },
  ]);
  const mail = await world.mail.waitForMail(order.email, (each) =>
    each.subject.includes(`Sorry: order ${order.orderNo}`),
  );
  expect(mail.text).toContain('£94.00');
  expect(mail.text).not.toContain('pi_');
});

test('a refund that the bank sends back later stands as failed', async () => {
  const placed = await place(world, basketFor(stall));
  await payFor(world, placed, cards.refundFails);
  await world.request().post(`/api/orders/${placed.token}/cancel`);
  await world.runJobs();
  const order = await getOrderRow(world, placed.token);
  expect(order.paymentState).toBe('refunded');
  world.payments.advance({ minutes: 60 });
  await world.payments.flush();
  const [, refund] = await paymentsOf(world, order.id);
  expect(refund).toMatchObject({ state: 'failed', error: expect.any(String) as unknown });
  expect((await getOrderRow(world, placed.token)).paymentState).toBe('paid');
});

test('a call that loses its answer makes one page and one charge', async () => {
  world.payments.control({ dropAnswers: 1 });
  const order = await makeConfirmedOrder(world, stall);
  expect(order.state).toBe('confirmed');
  expect(await paymentsOf(world, order.id)).toHaveLength(1);
});
