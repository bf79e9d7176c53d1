import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { offer } from '#db/schema/allocations.ts';
import { orderLine } from '#db/schema/orders.ts';
import { proveCounters } from '#server/orders/prove-counters.ts';
import type { Order } from '#shared/contracts/orders.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeBoxKind, makeBoxOffer } from '#tests/support/make-farm.ts';
import {
  countersOf,
  makeConfirmedOrder,
  makePackedOrder,
  makeStall,
  paymentsOf,
  type Stall,
} from '#tests/support/make-order.ts';

let world: World;
let stall: Stall;
let variant: { id: string };
let stranger: { id: string };

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world, { boxes: 60 });
  const more = { variantOfId: stall.box.id, cutIds: [stall.cut.id], summary: 'No mince, more steak.' };
  const kind = await makeBoxKind(world.db, 'hearth-no-mince', { name: 'Hearth without mince', ...more });
  variant = await makeBoxOffer(world.db, stall.day.id, kind, 3);
  const other = await makeBoxKind(world.db, 'ember', { name: 'Ember', cutIds: [stall.cut.id] });
  stranger = await makeBoxOffer(world.db, stall.day.id, other, 5);
});
afterAll(() => world.stop());

async function seen(token: string): Promise<Order> {
  return (await world.request().get(`/api/orders/${token}`)).body as Order;
}

async function swap(token: string, more: { offerId?: string; quantity?: number } = {}) {
  const lineId = (await seen(token)).lines[0]?.id;
  return world
    .request()
    .post(`/api/orders/${token}/swap`)
    .send({ lineId, offerId: variant.id, quantity: 1, ...more });
}

function setFree(offerId: string, free: number) {
  return world.db.update(offer).set({ offered: free, sold: 0, held: 0 }).where(eq(offer.id, offerId));
}

test('the box page and the first page, with a swap on sale, show it with its box and not as a box of its own', async () => {
  const box = (await world.request().get('/api/boxes/hearth')).body as object;
  expect(box).toMatchObject({
    swaps: [{ slug: 'hearth-no-mince', name: 'Hearth without mince', offers: [{ offerId: variant.id, free: 3 }] }],
  });
  const home = (await world.request().get('/api/shop')).body as { boxes: { slug: string }[] };
  expect(home.boxes.map((each) => each.slug)).toEqual(expect.arrayContaining(['hearth', 'ember']));
  expect(home.boxes.map((each) => each.slug)).not.toContain('hearth-no-mince');
  expect((await world.request().get('/api/boxes/hearth-no-mince')).status).toBe(404);
});

test('swapping one of two boxes, frees one offer, takes the other and leaves what was paid as it is', async () => {
  const lines = [{ offerId: stall.boxOffer.id, quantity: 2 }];
  const order = await makeConfirmedOrder(world, stall, { email: 'swapper@example.com', lines });
  const [before, other] = [await countersOf(world, stall.boxOffer.id), await countersOf(world, variant.id)];
  expect((await seen(order.token)).lines[0]?.swaps).toEqual([
    { offerId: variant.id, name: 'Hearth without mince', summary: 'No mince, more steak.', free: 3 },
  ]);
  const answer = await swap(order.token);
  expect(answer.status).toBe(200);
  expect(answer.body).toMatchObject({ totalPence: 18_800 });
  const names = (answer.body as Order).lines.map((line) => [line.name, line.quantity, line.unitPricePence]);
  expect(names).toEqual([
    ['Hearth', 1, 9_400],
    ['Hearth without mince', 1, 9_400],
  ]);
  expect(await countersOf(world, stall.boxOffer.id)).toEqual({ ...before, sold: (before.sold ?? 0) - 1 });
  expect(await countersOf(world, variant.id)).toEqual({ ...other, sold: (other.sold ?? 0) + 1 });
  expect((await swap(order.token)).status).toBe(200);
  const rows = await world.db.select().from(orderLine).where(eq(orderLine.orderId, order.id));
  expect(rows.map((row) => [row.name, row.quantity])).toEqual([['Hearth without mince', 2]]);
  expect(await paymentsOf(world, order.id)).toHaveLength(1);
  expect(await proveCounters(world.deps)).toEqual([]);
  await world.runJobs();
  const mail = await world.mail.waitForMail('swapper@example.com', (each) => each.subject.includes('has changed'));
  expect(mail.text).toContain('1 × Hearth is now 1 × Hearth without mince, at the same price.');
});

test('two orders that swap for the last one at once, get one swap and one OUT_OF_STOCK', async () => {
  await setFree(variant.id, 1);
  const orders = [await makeConfirmedOrder(world, stall), await makeConfirmedOrder(world, stall)];
  const answers = await Promise.all(orders.map((order) => swap(order.token)));
  expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
  const refused = answers.findIndex((answer) => answer.status === 409);
  expect(answers[refused]?.body).toMatchObject({ code: 'OUT_OF_STOCK' });
  expect((await seen(orders[refused]?.token ?? '')).lines[0]).toMatchObject({ name: 'Hearth', swaps: [] });
  expect(await countersOf(world, variant.id)).toEqual({ offered: 1, held: 0, sold: 1 });
});

test('a double tap on a swap of one box, swaps once', async () => {
  await setFree(variant.id, 5);
  const order = await makeConfirmedOrder(world, stall);
  const answers = await Promise.all([swap(order.token), swap(order.token)]);
  expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
  expect(await countersOf(world, variant.id)).toMatchObject({ sold: 1 });
});

test('swapping for another box or for more than were ordered, is refused and changes nothing', async () => {
  await setFree(variant.id, 5);
  const order = await makeConfirmedOrder(world, stall);
  const other = await swap(order.token, { offerId: stranger.id });
  expect(other.status).toBe(400);
  expect(other.body).toMatchObject({ fields: { offerId: expect.any(String) as unknown } });
  expect((await swap(order.token, { quantity: 2 })).body).toMatchObject({ code: 'STATE_CHANGED' });
  expect((await swap(order.token, { offerId: stall.boxOffer.id })).status).toBe(400);
  expect((await seen(order.token)).lines.map((line) => line.name)).toEqual(['Hearth']);
});

test('swapping in a packed order or after the cut-off, is refused', async () => {
  const { order: packed } = await makePackedOrder(world, stall);
  expect((await swap(packed.token)).body).toMatchObject({ code: 'STATE_CHANGED' });
  const order = await makeConfirmedOrder(world, stall);
  world.clock.advance({ days: 8 });
  expect((await swap(order.token)).body).toMatchObject({ code: 'CUTOFF_PASSED' });
  expect((await seen(order.token)).lines[0]?.swaps).toEqual([]);
});
