import { eq } from 'drizzle-orm';
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { orderAddition } from '#db/schema/order-additions.ts';
import { orderLine } from '#db/schema/orders.ts';
import { proveCounters } from '#server/orders/prove-counters.ts';
import { sweepHolds } from '#server/payments/payment-service.ts';
import type { Order } from '#shared/contracts/orders.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeLooseOffer, makeCut } from '#tests/support/make-farm.ts';
import {
  countersOf,
  getOrderRow,
  makeConfirmedOrder,
  makeStall,
  paymentsOf,
  payOn,
  type Stall,
} from '#tests/support/make-order.ts';

let world: World;
let stall: Stall;

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world, { boxes: 60, packs: 60 });
});
afterAll(() => world.stop());
afterEach(async () => {
  world.payments.reset();
  expect(await proveCounters(world.deps)).toEqual([]);
});

type Row = { token: string; version: number };

function add({ token, version }: Row, more: { offerId?: string; quantity?: number } = {}) {
  const lines = [{ offerId: stall.looseOffer.id, quantity: 2, ...more }];
  return world.request().post(`/api/orders/${token}/additions`).send({ version, lines });
}

function urlOf(answer: { body: unknown }): string {
  return (answer.body as Order).addition?.paymentUrl ?? '';
}

async function seen(token: string): Promise<Order> {
  return (await world.request().get(`/api/orders/${token}`)).body as Order;
}

test('adding two packs to a paid order, holds them, charges the difference once and tells the customer', async () => {
  const order = await makeConfirmedOrder(world, stall, { email: 'adder@example.com' });
  const before = await countersOf(world, stall.looseOffer.id);
  const answer = await add(order);
  expect(answer.status).toBe(200);
  expect(answer.body).toMatchObject({
    totalPence: 9_400,
    addition: { amountPence: 2_600, words: '2 × Rump steak' },
  });
  expect(await countersOf(world, stall.looseOffer.id)).toEqual({ ...before, held: (before.held ?? 0) + 2 });
  expect(await payOn(urlOf(answer))).toMatchObject({ outcome: 'paid' });
  await world.payments.flush();
  expect(await seen(order.token)).toMatchObject({
    totalPence: 12_000,
    addition: null,
    lines: [
      { name: 'Hearth', quantity: 1 },
      { name: 'Rump steak', quantity: 2, linePence: 2_600 },
    ],
  });
  expect(await countersOf(world, stall.looseOffer.id)).toEqual({ ...before, sold: (before.sold ?? 0) + 2 });
  const rows = await paymentsOf(world, order.id);
  expect(rows.map((row) => [row.kind, row.reason, row.amountPence])).toEqual([
    ['charge', 'order', 9_400],
    ['charge', 'addition', 2_600],
  ]);
  await world.runJobs();
  const mail = await world.mail.waitForMail('adder@example.com', (each) => each.subject.includes('has changed'));
  expect(mail.text).toContain('Added and paid: 2 × Rump steak, for £26.00.');
});

test('two tabs that add the same at once, come to one page and one charge', async () => {
  const order = await makeConfirmedOrder(world, stall);
  const before = await countersOf(world, stall.looseOffer.id);
  const answers = await Promise.all([add(order), add(order), add(order)]);
  expect(answers.map((answer) => answer.status)).toEqual([200, 200, 200]);
  expect(new Set(answers.map(urlOf)).size).toBe(1);
  expect(await countersOf(world, stall.looseOffer.id)).toEqual({ ...before, held: (before.held ?? 0) + 2 });
  await Promise.all(answers.map((answer) => payOn(urlOf(answer))));
  await world.payments.flush();
  expect(await paymentsOf(world, order.id)).toHaveLength(2);
  // A tab that still shows the order as it was would add the same once more.
  const late = await add(order);
  expect(late.status).toBe(409);
  expect(late.body).toMatchObject({ code: 'STATE_CHANGED' });
  expect((await seen(order.token)).totalPence).toBe(12_000);
});

test('adding something else instead, ends the first page and holds only the second', async () => {
  const order = await makeConfirmedOrder(world, stall);
  const before = await countersOf(world, stall.looseOffer.id);
  const first = urlOf(await add(order));
  const second = urlOf(await add(order, { quantity: 1 }));
  expect(second).not.toBe(first);
  expect(await countersOf(world, stall.looseOffer.id)).toEqual({ ...before, held: (before.held ?? 0) + 1 });
  expect(await payOn(first)).toMatchObject({ outcome: 'refused' });
  expect((await seen(order.token)).addition).toMatchObject({ amountPence: 1_300 });
});

test('giving an addition up, frees what it held and charges nothing', async () => {
  const order = await makeConfirmedOrder(world, stall);
  const before = await countersOf(world, stall.looseOffer.id);
  await add(order);
  const answer = await world.request().post(`/api/orders/${order.token}/leave-addition`);
  expect(answer.body).toMatchObject({ addition: null, totalPence: 9_400 });
  expect(await countersOf(world, stall.looseOffer.id)).toEqual(before);
  expect(await paymentsOf(world, order.id)).toHaveLength(1);
});

test('an addition whose message is lost, is found by the sweep', async () => {
  const order = await makeConfirmedOrder(world, stall);
  world.payments.control({ webhooks: 'hold' });
  await payOn(urlOf(await add(order)));
  expect((await seen(order.token)).totalPence).toBe(9_400);
  world.clock.advance({ minutes: 6 });
  await sweepHolds(world.deps);
  expect((await seen(order.token)).totalPence).toBe(12_000);
  world.payments.control({ webhooks: 'deliver' });
  await world.payments.flush();
  expect(await paymentsOf(world, order.id)).toHaveLength(2);
});

test('cancelling an order that had more added, pays both charges back in full', async () => {
  const order = await makeConfirmedOrder(world, stall);
  await payOn(urlOf(await add(order)));
  await world.payments.flush();
  expect((await world.request().post(`/api/orders/${order.token}/cancel`)).status).toBe(200);
  await world.runJobs();
  expect(await seen(order.token)).toMatchObject({
    state: 'cancelled',
    paymentState: 'refunded',
    refundedPence: 12_000,
  });
  const refunds = (await paymentsOf(world, order.id)).filter((row) => row.kind === 'refund');
  expect(refunds.map((row) => row.amountPence).sort((a, b) => a - b)).toEqual([2_600, 9_400]);
});

test('cancelling an order while more is on its way to payment, ends that page too', async () => {
  const order = await makeConfirmedOrder(world, stall);
  const before = await countersOf(world, stall.looseOffer.id);
  const url = urlOf(await add(order));
  expect((await world.request().post(`/api/orders/${order.token}/cancel`)).status).toBe(200);
  expect(await countersOf(world, stall.looseOffer.id)).toEqual(before);
  expect(await payOn(url)).toMatchObject({ outcome: 'refused' });
});

test('adding more than is left, is refused and holds nothing', async () => {
  const order = await makeConfirmedOrder(world, stall);
  const answer = await add(order, { quantity: 99 });
  expect(answer.status).toBe(409);
  expect(answer.body).toMatchObject({ code: 'OUT_OF_STOCK' });
  expect((await seen(order.token)).addition).toBeNull();
});

test('a payment company that cannot be reached, keeps the order and holds nothing', async () => {
  const order = await makeConfirmedOrder(world, stall);
  const before = await countersOf(world, stall.looseOffer.id);
  world.payments.control({ down: true });
  const answer = await add(order);
  expect(answer.status).toBe(503);
  expect(await countersOf(world, stall.looseOffer.id)).toEqual(before);
});

test('a difference of less than thirty pence, is waived and written down', async () => {
  const cut = await makeCut(world.db, 'marrow', { name: 'A marrow bone' });
  const bone = await makeLooseOffer(world.db, stall.day.id, cut.id, { offered: 5, pricePence: 20, upperGrams: 200 });
  const order = await makeConfirmedOrder(world, stall);
  const answer = await add(order, { offerId: bone.id, quantity: 1 });
  expect(answer.body).toMatchObject({ addition: null, totalPence: 9_400, discountPence: 20 });
  const lines = await world.db.select().from(orderLine).where(eq(orderLine.orderId, order.id));
  expect(lines.map((line) => line.name).sort()).toEqual(['A marrow bone', 'Hearth']);
  expect(await world.db.$count(orderAddition, eq(orderAddition.orderId, order.id))).toBe(0);
  const audits = await world.db.query.auditEntry.findMany({ where: (row) => eq(row.subjectId, order.id) });
  expect(audits.map((row) => row.action)).toContain('added to the order, and waived what it costs');
});

test('a payment that does not come to what the addition costs, goes back in full and the customer is told', async () => {
  const order = await makeConfirmedOrder(world, stall, { email: 'late@example.com' });
  world.payments.control({ webhooks: 'hold' });
  const answer = await add(order);
  await payOn(urlOf(answer));
  const [open] = await world.db.select().from(orderAddition).where(eq(orderAddition.orderId, order.id));
  await world.db
    .update(orderAddition)
    .set({ amountPence: 99 })
    .where(eq(orderAddition.id, open?.id ?? ''));
  world.payments.control({ webhooks: 'deliver' });
  await world.payments.flush();
  await world.runJobs();
  expect(await getOrderRow(world, order.token)).toMatchObject({ totalPence: 9_400, state: 'confirmed' });
  const refunds = (await paymentsOf(world, order.id)).filter((row) => row.kind === 'refund');
  expect(refunds).toMatchObject([{ amountPence: 2_600, state: 'done' }]);
  const mail = await world.mail.waitForMail('late@example.com', (each) => each.subject.includes('came too late'));
  expect(mail.text).toContain('£26.00 is on its way');
  await world.request().post(`/api/orders/${order.token}/leave-addition`);
});

test('adding after the cut-off, is refused', async () => {
  const order = await makeConfirmedOrder(world, stall);
  world.clock.advance({ days: 8 });
  expect((await add(order)).body).toMatchObject({ code: 'CUTOFF_PASSED' });
});
