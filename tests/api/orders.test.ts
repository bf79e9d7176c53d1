import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, expect, test } from 'vitest';
import { eq } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { customerOrder } from '#db/schema/orders.ts';
import { addDays } from '#shared/domain/day.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeSlot } from '#tests/support/make-farm.ts';
import {
  basketFor,
  countersOf,
  getOrderRow,
  makeStall,
  payFor,
  paymentsOf,
  payOn,
  place,
  takenOf,
  type Stall,
} from '#tests/support/make-order.ts';
import { cards } from '#tests/support/pay.ts';

const TEXT: unknown = expect.any(String);

let world: World;
let stall: Stall;

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world, { boxes: 60, packs: 60 });
});
afterAll(() => world.stop());
beforeEach(() => world.payments.reset());

test('pricing a basket, with two loose packs, gives each line its price and what is left', async () => {
  const lines = [
    { offerId: stall.boxOffer.id, quantity: 1 },
    { offerId: stall.looseOffer.id, quantity: 2 },
  ];
  const answer = await world.request().post('/api/basket').send({ dayId: stall.day.id, lines });
  expect(answer.status).toBe(200);
  expect(answer.body).toMatchObject({ isInTime: true, totalPence: 9_400 + 2 * 1_300, day: stall.day.day });
  const [first, second] = (answer.body as { lines: Record<string, unknown>[] }).lines;
  expect(first).toMatchObject({ name: 'Hearth', kind: 'box', unitGrams: 5_000 });
  expect(second).toMatchObject({ name: 'Rump steak', kind: 'loose', linePence: 2_600, unitGrams: 650 });
});

test('pricing a basket, when something in it has gone, says that it has expired', async () => {
  const lines = [{ offerId: randomUUID(), quantity: 1 }];
  const answer = await world.request().post('/api/basket').send({ dayId: stall.day.id, lines });
  expect(answer.status).toBe(410);
  expect(answer.headers['content-type']).toContain('application/problem+json');
  expect(answer.body).toMatchObject({ code: 'BASKET_EXPIRED', fields: { 'lines.0.offerId': TEXT } });
});

test('placing an order holds its stock and its slot, and paying makes it sold', async () => {
  const boxes = await countersOf(world, stall.boxOffer.id);
  const taken = (await takenOf(world, stall.slot.id)) ?? 0;
  const placed = await place(world, basketFor(stall));
  expect(placed).toMatchObject({ state: 'awaiting payment', paymentUrl: expect.stringContaining('/pay/') as unknown });
  expect(await countersOf(world, stall.boxOffer.id)).toEqual({ ...boxes, held: (boxes.held ?? 0) + 1 });
  expect(await takenOf(world, stall.slot.id)).toBe(taken + 1);

  expect(await payOn(placed.paymentUrl)).toEqual({
    outcome: 'paid',
    returnedTo: `${world.origin}/orders/${placed.token}?from=paid`,
  });
  await world.payments.flush();
  const order = await getOrderRow(world, placed.token);
  expect(order).toMatchObject({ state: 'confirmed', paymentState: 'paid', isHeld: false });
  expect(await countersOf(world, stall.boxOffer.id)).toEqual({ ...boxes, sold: (boxes.sold ?? 0) + 1 });
  expect(await takenOf(world, stall.slot.id)).toBe(taken + 1);
  expect(await paymentsOf(world, order.id)).toMatchObject([{ kind: 'charge', amountPence: 9_400, state: 'done' }]);

  const seen = await world.request().get(`/api/orders/${placed.token}`);
  expect(seen.body).toMatchObject({ state: 'confirmed', canChange: true, paymentUrl: null, refundedPence: 0 });
});

test('a declined card leaves the order waiting and its page open', async () => {
  const placed = await place(world, basketFor(stall));
  await payFor(world, placed, cards.declined);
  expect(await getOrderRow(world, placed.token)).toMatchObject({ state: 'awaiting payment', isHeld: true });
  const seen = await world.request().get(`/api/orders/${placed.token}`);
  expect(seen.body).toMatchObject({ paymentUrl: placed.paymentUrl });
  await payFor(world, placed);
  expect((await getOrderRow(world, placed.token)).state).toBe('confirmed');
});

test('ordering more than is left names the line and how many are left, and takes nothing', async () => {
  const before = [await countersOf(world, stall.boxOffer.id), await countersOf(world, stall.looseOffer.id)];
  const lines = [
    { offerId: stall.boxOffer.id, quantity: 1 },
    { offerId: stall.looseOffer.id, quantity: 99 },
  ];
  const answer = await world.request().post('/api/orders').send(basketFor(stall, { lines }));
  const left = (before[1]?.offered ?? 0) - (before[1]?.held ?? 0) - (before[1]?.sold ?? 0);
  expect(answer.status).toBe(409);
  expect(answer.body).toMatchObject({
    code: 'OUT_OF_STOCK',
    fields: { 'lines.1.quantity': `Only ${left} left.` },
    figures: { left, asked: 99, [stall.looseOffer.id]: left },
  });
  expect([await countersOf(world, stall.boxOffer.id), await countersOf(world, stall.looseOffer.id)]).toEqual(before);
});

test('an offer that is closed to new buyers counts as sold out', async () => {
  await world.db.update(offer).set({ isClosed: true }).where(eq(offer.id, stall.looseOffer.id));
  const lines = [{ offerId: stall.looseOffer.id, quantity: 1 }];
  const answer = await world.request().post('/api/orders').send(basketFor(stall, { lines }));
  expect(answer.body).toMatchObject({ code: 'OUT_OF_STOCK', figures: { left: 0 } });
  await world.db.update(offer).set({ isClosed: false }).where(eq(offer.id, stall.looseOffer.id));
});

test('a slot that is full refuses the order and takes no stock', async () => {
  const slot = await makeSlot(world.db, stall.day.id, addDays(world.clock.today(), 3), { capacity: 1 });
  const first = await place(world, basketFor(stall, { slotId: slot.id }));
  const before = await countersOf(world, stall.boxOffer.id);
  const answer = await world
    .request()
    .post('/api/orders')
    .send(basketFor(stall, { slotId: slot.id }));
  expect(answer.status).toBe(409);
  expect(answer.body).toMatchObject({ code: 'SLOT_FULL', fields: { slotId: TEXT } });
  expect(await countersOf(world, stall.boxOffer.id)).toEqual(before);
  await world.request().post(`/api/orders/${first.token}/leave-payment`);
  expect(await takenOf(world, slot.id)).toBe(0);
});

test('a slot of another day is refused beside its field', async () => {
  const answer = await world
    .request()
    .post('/api/orders')
    .send(basketFor(stall, { slotId: randomUUID() }));
  expect(answer.status).toBe(400);
  expect(answer.body).toMatchObject({ code: 'INVALID_INPUT', fields: { slotId: TEXT } });
});

test('two presses at once, with one basket key, make one order, one page and one hold', async () => {
  const before = await countersOf(world, stall.boxOffer.id);
  const basket = basketFor(stall);
  const [one, other] = await Promise.all([place(world, basket), place(world, basket)]);
  expect(other).toEqual(one);
  expect(await place(world, basket)).toEqual(one);
  expect(await countersOf(world, stall.boxOffer.id)).toEqual({ ...before, held: (before.held ?? 0) + 1 });
  const rows = await world.db.select().from(customerOrder).where(eq(customerOrder.basketKey, basket.basketKey));
  expect(rows).toHaveLength(1);
  await payFor(world, one);
  expect(await place(world, basket)).toMatchObject({ token: one.token, state: 'confirmed', paymentUrl: null });
});

test('a basket changed on the way back ends its first page and holds the new lines only', async () => {
  const before = await countersOf(world, stall.boxOffer.id);
  const basket = basketFor(stall);
  const first = await place(world, basket);
  const second = await place(world, { ...basket, lines: [{ offerId: stall.boxOffer.id, quantity: 3 }] });
  expect(second.token).toBe(first.token);
  expect(second.paymentUrl).not.toBe(first.paymentUrl);
  expect(await payOn(first.paymentUrl)).toMatchObject({ outcome: 'refused', status: 410 });
  await world.payments.flush();
  expect(await getOrderRow(world, first.token)).toMatchObject({ state: 'awaiting payment', isHeld: true });
  expect(await countersOf(world, stall.boxOffer.id)).toEqual({ ...before, held: (before.held ?? 0) + 3 });
  await payFor(world, second);
  const order = await getOrderRow(world, first.token);
  expect(order).toMatchObject({ state: 'confirmed', totalPence: 3 * 9_400 });
  expect(await paymentsOf(world, order.id)).toHaveLength(1);
});

test('leaving the payment page gives back what was held, and starting again reuses the order', async () => {
  const before = await countersOf(world, stall.boxOffer.id);
  const basket = basketFor(stall);
  const placed = await place(world, basket);
  const left = await world.request().post(`/api/orders/${placed.token}/leave-payment`);
  expect(left.body).toMatchObject({ state: 'awaiting payment', paymentUrl: null });
  expect(await countersOf(world, stall.boxOffer.id)).toEqual(before);
  await world.payments.flush();
  expect(await countersOf(world, stall.boxOffer.id)).toEqual(before);
  const again = await place(world, basket);
  expect(again.token).toBe(placed.token);
  await payFor(world, again);
  expect(await getOrderRow(world, placed.token)).toMatchObject({ state: 'confirmed' });
});

test('leaving the payment page, when it was paid in another tab, confirms the order', async () => {
  world.payments.control({ webhooks: 'hold' });
  const placed = await place(world, basketFor(stall));
  await payOn(placed.paymentUrl);
  const left = await world.request().post(`/api/orders/${placed.token}/leave-payment`);
  expect(left.body).toMatchObject({ state: 'confirmed', paymentState: 'paid' });
  await world.payments.flush();
  expect(await paymentsOf(world, (await getOrderRow(world, placed.token)).id)).toHaveLength(1);
});

test('going to payment, when the payment company is down, keeps nothing held and says so', async () => {
  const before = await countersOf(world, stall.boxOffer.id);
  world.payments.control({ down: true });
  const basket = basketFor(stall);
  const answer = await world.request().post('/api/orders').send(basket);
  expect(answer.status).toBe(503);
  expect(answer.body).toMatchObject({ code: 'PAYMENTS_DOWN' });
  expect(await countersOf(world, stall.boxOffer.id)).toEqual(before);
  world.payments.control({ down: false });
  const again = await place(world, basket);
  expect(again.paymentUrl).toContain('/pay/');
});

test('an order after the cut-off is refused, and one that reached payment before it still confirms', async () => {
  const placed = await place(world, basketFor(stall));
  const [day] = await world.db.select().from(cuttingDay).where(eq(cuttingDay.id, stall.day.id));
  const past = new Date(world.clock.now().getTime() - 60_000);
  await world.db.update(cuttingDay).set({ cutOffAt: past }).where(eq(cuttingDay.id, stall.day.id));
  const answer = await world.request().post('/api/orders').send(basketFor(stall));
  expect(answer.status).toBe(409);
  expect(answer.body).toMatchObject({ code: 'CUTOFF_PASSED' });
  await payFor(world, placed);
  expect((await getOrderRow(world, placed.token)).state).toBe('confirmed');
  const late = await world.request().post(`/api/orders/${placed.token}/cancel`);
  expect(late.body).toMatchObject({ code: 'CUTOFF_PASSED' });
  expect((await getOrderRow(world, placed.token)).state).toBe('confirmed');
  await world.db
    .update(cuttingDay)
    .set({ cutOffAt: day?.cutOffAt ?? past })
    .where(eq(cuttingDay.id, stall.day.id));
});

test.each([
  ['a name with a line break', { name: 'Ada\r\nBcc: all@example.com' }, 'name'],
  ['an e-mail with a line break', { email: 'ada@example.com\nBcc: x@example.com' }, 'email'],
  ['a telephone number of letters', { phone: 'call me' }, 'phone'],
  ['a note of a thousand characters', { note: 'x'.repeat(1000) }, 'note'],
  ['an empty basket', { lines: [] }, 'lines'],
  ['a hundred boxes', { lines: [{ offerId: randomUUID(), quantity: 100 }] }, 'lines.0.quantity'],
  ['a field that nobody knows', { totalPence: 1 }, 'totalPence'],
])('placing with %s is refused beside the field', async (_name, more, field) => {
  const answer = await world.request().post('/api/orders').send(basketFor(stall, more));
  expect(answer.status).toBe(400);
  expect((answer.body as { fields: Record<string, string> }).fields[field]).toEqual(TEXT);
});

test('JSON that cannot be read, and more of it than anyone orders, are refused as problems', async () => {
  const broken = await world.request().post('/api/orders').set('Content-Type', 'application/json').send('{"lines": [');
  expect(broken.status).toBe(400);
  expect(broken.headers['content-type']).toContain('application/problem+json');
  expect(broken.body).toMatchObject({ code: 'INVALID_INPUT' });
  const huge = await world
    .request()
    .post('/api/orders')
    .send(basketFor(stall, { note: 'x'.repeat(300_000) }));
  expect(huge.status).toBe(413);
  expect(huge.body).toMatchObject({ code: 'TOO_LARGE' });
});
