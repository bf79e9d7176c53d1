import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, expect, test } from 'vitest';
import { eq } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { customerOrder } from '#db/schema/orders.ts';
import { addDays } from '#shared/domain/day.ts';
import { settleRefund } from '#server/payments/payment-service.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeSlot } from '#tests/support/make-farm.ts';
import {
  basketFor,
  CARDS,
  countersOf,
  getOrderRow,
  makeConfirmedOrder,
  makeStall,
  payFor,
  paymentsOf,
  payOn,
  place,
  takenOf,
  type Stall,
} from '#tests/support/make-order.ts';
import { takeConsole } from '#tests/support/quiet-console.ts';

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
  expect(answer.body).toMatchObject({ code: 'BASKET_EXPIRED', fields: { 'lines.0.offerId': expect.any(String) } });
});

test('placing an order holds its stock and its slot, and paying makes it sold', async () => {
  const boxes = await countersOf(world, stall.boxOffer.id);
  const taken = (await takenOf(world, stall.slot.id)) ?? 0;
  const placed = await place(world, basketFor(stall));
  expect(placed).toMatchObject({ state: 'awaiting payment', paymentUrl: expect.stringContaining('/pay/') });
  expect(await countersOf(world, stall.boxOffer.id)).toEqual({ ...boxes, held: (boxes.held ?? 0) + 1 });
  expect(await takenOf(world, stall.slot.id)).toBe(taken + 1);

  expect(await payOn(placed.paymentUrl)).toBe(303);
  await world.payments.flush();
  const order = await getOrderRow(world, placed.token);
  expect(order).toMatchObject({ state: 'confirmed', paymentState: 'paid', isHeld: false });
  expect(await countersOf(world, stall.boxOffer.id)).toEqual({ ...boxes, sold: (boxes.sold ?? 0) + 1 });
  expect(await takenOf(world, stall.slot.id)).toBe(taken + 1);
  expect(await paymentsOf(world, order.id)).toMatchObject([{ kind: 'charge', amountPence: 9_400, state: 'done' }]);

  const seen = await world.request().get(`/api/orders/${placed.token}`);
  expect(seen.body).toMatchObject({ state: 'confirmed', canCancel: true, paymentUrl: null, refundedPence: 0 });
});

test('a declined card leaves the order waiting and its page open', async () => {
  const placed = await place(world, basketFor(stall));
  await payFor(world, placed, CARDS.declined);
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
  expect(answer.body).toMatchObject({ code: 'SLOT_FULL', fields: { slotId: expect.any(String) } });
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
  expect(answer.body).toMatchObject({ code: 'INVALID_INPUT', fields: { slotId: expect.any(String) } });
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
  expect(await payOn(first.paymentUrl)).toBe(303);
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

test('cancelling frees stock and slot at once and refunds the card once, however often it is pressed', async () => {
  const before = await countersOf(world, stall.boxOffer.id);
  const taken = await takenOf(world, stall.slot.id);
  const order = await makeConfirmedOrder(world, stall);
  const presses = await Promise.all([1, 2, 3].map(() => world.request().post(`/api/orders/${order.token}/cancel`)));
  expect(presses.map((press) => press.status)).toEqual([200, 200, 200]);
  expect(await countersOf(world, stall.boxOffer.id)).toEqual(before);
  expect(await takenOf(world, stall.slot.id)).toBe(taken);
  await world.runJobs();
  expect(await paymentsOf(world, order.id)).toMatchObject([
    { kind: 'charge', amountPence: 9_400 },
    { kind: 'refund', amountPence: 9_400, state: 'done' },
  ]);
  const seen = await world.request().get(`/api/orders/${order.token}`);
  expect(seen.body).toMatchObject({
    state: 'cancelled',
    paymentState: 'refunded',
    refundedPence: 9_400,
    canCancel: false,
  });
  const charge = (await paymentsOf(world, order.id))[0];
  expect(world.payments.refunds().filter((refund) => refund.payment_intent === charge?.providerId)).toHaveLength(1);
  const kinds = world.mail.messages().filter((mail) => mail.subject.includes(String(order.orderNo)));
  expect(kinds.map((mail) => mail.subject.split(' · ')[0])).toEqual(
    expect.arrayContaining([`Order ${order.orderNo} is cancelled`, `£94.00 refunded for order ${order.orderNo}`]),
  );
});

test('a refund, while the payment company is down, is tried again until it is done', async () => {
  const order = await makeConfirmedOrder(world, stall);
  await world.request().post(`/api/orders/${order.token}/cancel`);
  world.payments.control({ down: true });
  await world.runJobs();
  expect(takeConsole()).toEqual([expect.stringContaining('settle-refund')]);
  const [, waiting] = await paymentsOf(world, order.id);
  expect(waiting).toMatchObject({ kind: 'refund', state: 'asked', error: expect.any(String) });
  world.payments.control({ down: false });
  await settleRefund(world.deps, waiting?.id ?? '');
  await settleRefund(world.deps, waiting?.id ?? '');
  expect(await getOrderRow(world, order.token)).toMatchObject({ paymentState: 'refunded' });
});

test('a refund that the company refuses is kept as failed', async () => {
  const order = await makeConfirmedOrder(world, stall);
  world.payments.control({ declineRefunds: true });
  await world.request().post(`/api/orders/${order.token}/cancel`);
  await world.runJobs();
  const [, refund] = await paymentsOf(world, order.id);
  expect(refund).toMatchObject({ state: 'failed', error: expect.any(String) });
  expect(await getOrderRow(world, order.token)).toMatchObject({ state: 'cancelled', paymentState: 'paid' });
});

test('the calendar file gives the collection on the clock of the farm', async () => {
  const order = await makeConfirmedOrder(world, stall);
  const file = await world.request().get(`/api/orders/${order.token}/calendar.ics`);
  expect(file.headers['content-type']).toContain('text/calendar');
  expect(file.headers['content-disposition']).toContain(`collect-order-${order.orderNo}.ics`);
  const day = addDays(world.clock.today(), 10).replaceAll('-', '');
  expect(file.text).toContain(`DTSTART;TZID=Europe/London:${day}T100000\r\n`);
  expect(file.text).toContain('STATUS:CONFIRMED');
});

test('a token that opens no order answers 404 to everything', async () => {
  const token = 'x'.repeat(32);
  for (const path of ['', '/calendar.ics']) {
    expect((await world.request().get(`/api/orders/${token}${path}`)).status).toBe(404);
  }
  for (const path of ['/cancel', '/leave-payment']) {
    expect((await world.request().post(`/api/orders/${token}${path}`)).status).toBe(404);
  }
  expect((await world.request().get('/api/orders/short')).status).toBe(404);
});

test('a customer sees the own orders and no other ones', async () => {
  const ada = await world.signIn('customer');
  const ben = await world.signIn('customer');
  const placed = await place(world, basketFor(stall), ada.cookie);
  const mine = await world.request(ada.cookie).get('/api/my/orders');
  expect(mine.body).toMatchObject({ orders: [{ token: placed.token, lines: ['1 × Hearth'] }] });
  expect((await world.request(ben.cookie).get('/api/my/orders')).body).toEqual({ orders: [] });
  expect((await world.request().get('/api/my/orders')).status).toBe(401);
});

test('the owner lists orders of a day and cancels one with a reason, and others may not', async () => {
  const owner = await world.signIn('owner');
  const packer = await world.signIn('packer');
  const order = await makeConfirmedOrder(world, stall);
  const list = await world
    .request(owner.cookie)
    .get('/api/office/orders')
    .query({ dayId: stall.day.id, state: 'confirmed' });
  expect(list.status).toBe(200);
  const rows = (list.body as { orders: { id: string; state: string }[] }).orders;
  expect(rows.some((row) => row.id === order.id)).toBe(true);
  expect(rows.every((row) => row.state === 'confirmed')).toBe(true);

  const path = `/api/office/orders/${order.id}/cancel`;
  expect((await world.request().post(path).send({ reason: 'x' })).status).toBe(401);
  expect((await world.request(packer.cookie).post(path).send({ reason: 'x' })).status).toBe(403);
  expect((await world.request(packer.cookie).get('/api/office/orders')).status).toBe(403);
  expect((await world.request(owner.cookie).post(path).send({ reason: '' })).body).toMatchObject({
    fields: { reason: expect.any(String) },
  });
  const done = await world.request(owner.cookie).post(path).send({ reason: 'The cold room broke down.' });
  expect(done.body).toMatchObject({ id: order.id, state: 'cancelled' });
  await world.runJobs();
  const mail = await world.mail.waitForMail(order.email, (each) =>
    each.subject.includes(`Order ${order.orderNo} is cancelled`),
  );
  expect(mail.text).toContain('The cold room broke down.');
  expect((await world.request(owner.cookie).post(path).send({ reason: 'again' })).body).toMatchObject({
    code: 'STATE_CHANGED',
  });
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
  expect((answer.body as { fields: Record<string, string> }).fields[field]).toEqual(expect.any(String));
});
