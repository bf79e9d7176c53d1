import { afterAll, beforeAll, beforeEach, expect, test } from 'vitest';
import { addDays } from '#shared/domain/day.ts';
import { settleRefund } from '#server/payments/payment-service.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import {
  basketFor,
  countersOf,
  getOrderRow,
  makeConfirmedOrder,
  makeStall,
  paymentsOf,
  place,
  takenOf,
  type Stall,
} from '#tests/support/make-order.ts';
import { takeConsole } from '#tests/support/quiet-console.ts';

const TEXT: unknown = expect.any(String);

let world: World;
let stall: Stall;

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world, { boxes: 60, packs: 60 });
});
afterAll(() => world.stop());
beforeEach(() => world.payments.reset());

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
    canChange: false,
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
  expect(waiting).toMatchObject({ kind: 'refund', state: 'asked', error: TEXT });
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
  expect(refund).toMatchObject({ state: 'failed', error: TEXT });
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
    fields: { reason: TEXT },
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
