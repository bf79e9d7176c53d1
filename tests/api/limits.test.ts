import supertest from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { createApp } from '#server/app.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { basketFor, makeConfirmedOrder, makeStall, paymentsOf, type Stall } from '#tests/support/make-order.ts';

let world: World;
let stall: Stall;

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world);
});
afterAll(() => world.stop());

test('the fourth order in a minute from one address, where three are taken, is told to wait and holds nothing', async () => {
  const { express } = createApp({ ...world.deps, costlyPostsPerMinute: 3 }, null);
  const caller = supertest(express);
  const statuses: number[] = [];
  for (let press = 0; press < 3; press += 1) {
    statuses.push((await caller.post('/api/orders').send(basketFor(stall))).status);
  }
  expect(statuses).toEqual([200, 200, 200]);
  const last = await caller.post('/api/orders').send(basketFor(stall));
  expect(last.status).toBe(429);
  expect(last.headers['content-type']).toContain('application/problem+json');
  expect(last.headers['retry-after']).toBeDefined();
  expect(last.body).toMatchObject({
    code: 'TOO_MANY_REQUESTS',
    detail: expect.stringContaining('wait a minute') as unknown,
  });
  // Trying codes counts into the same; looking does not.
  expect((await caller.post('/api/promo-checks').send({})).status).toBe(429);
  expect((await caller.get('/api/shop')).status).toBe(200);
});

test('a refund that failed, tried again by the owner, goes out once under a key of its own', async () => {
  const owner = await world.signIn('owner');
  const packer = await world.signIn('packer');
  const order = await makeConfirmedOrder(world, stall);
  world.payments.control({ declineRefunds: true });
  await world.request().post(`/api/orders/${order.token}/cancel`);
  await world.runJobs();
  const list = await world.request(owner.cookie).get('/api/office/failed-refunds');
  expect(list.body).toMatchObject({ refunds: [{ orderNo: order.orderNo, amountPence: 9_400 }] });
  const [failed] = (list.body as { refunds: { paymentId: string }[] }).refunds;
  const path = `/api/office/failed-refunds/${failed?.paymentId}/retry`;
  expect((await world.request().post(path)).status).toBe(401);
  expect((await world.request(packer.cookie).post(path)).status).toBe(403);
  world.payments.control({ declineRefunds: false });
  const presses = await Promise.all([1, 2].map(() => world.request(owner.cookie).post(path)));
  expect(presses.map((answer) => answer.status).sort()).toEqual([200, 409]);
  await world.runJobs();
  expect(await paymentsOf(world, order.id)).toMatchObject([
    { kind: 'charge' },
    { kind: 'refund', state: 'done', attempt: 2, error: null },
  ]);
  const charge = (await paymentsOf(world, order.id))[0];
  expect(world.payments.refunds().filter((refund) => refund.payment_intent === charge?.providerId)).toHaveLength(1);
  expect((await world.request(owner.cookie).get('/api/office/failed-refunds')).body).toEqual({ refunds: [] });
});
