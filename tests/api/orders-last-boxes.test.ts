import { eq, sql } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { offer } from '#db/schema/allocations.ts';
import { customerOrder } from '#db/schema/orders.ts';
import { proveCounters } from '#server/orders/prove-counters.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import {
  basketFor,
  countersOf,
  makeStall,
  payOn,
  place,
  takenOf,
  type Placed,
  type Stall,
} from '#tests/support/make-order.ts';

let world: World;
let stall: Stall;

beforeAll(async () => {
  world = await startWorld();
  stall = await makeStall(world, { boxes: 20, packs: 200, slots: 300 });
});
afterAll(() => world.stop());

test(
  'two hundred buyers at once, when twenty boxes are left, end with twenty boxes paid for and nothing held',
  { timeout: 240_000 },
  async () => {
    world.payments.control({ webhooks: 'duplicate' });
    // Half the baskets name the loose pack first: only one order of locking keeps them from waiting for each other.
    const baskets = Array.from({ length: 200 }, (_, at) => {
      const lines = [
        { offerId: stall.boxOffer.id, quantity: 1 },
        { offerId: stall.looseOffer.id, quantity: 1 },
      ];
      return basketFor(stall, { email: `buyer-${at}@example.com`, lines: at % 2 === 0 ? lines : lines.reverse() });
    });
    const answers = await Promise.all(baskets.map((basket) => world.request().post('/api/orders').send(basket)));
    const placed = answers.filter((answer) => answer.status === 200).map((answer) => answer.body as Placed);
    const refused = answers.filter((answer) => answer.status !== 200);
    expect(placed).toHaveLength(20);
    expect(refused).toHaveLength(180);
    for (const answer of refused) {
      expect(answer.body).toMatchObject({ code: 'OUT_OF_STOCK', figures: { [stall.boxOffer.id]: 0 } });
    }
    expect(await countersOf(world, stall.boxOffer.id)).toEqual({ offered: 20, held: 20, sold: 0 });
    expect(await countersOf(world, stall.looseOffer.id)).toEqual({ offered: 200, held: 20, sold: 0 });
    expect(await proveCounters(world.deps)).toEqual([]);

    // Everybody pays but two, who leave.
    await Promise.all(placed.slice(2).map((order) => payOn(order.paymentUrl)));
    await Promise.all(
      placed.slice(0, 2).map((order) => world.request().post(`/api/orders/${order.token}/leave-payment`)),
    );
    await world.payments.flush();
    expect(await countersOf(world, stall.boxOffer.id)).toEqual({ offered: 20, held: 0, sold: 18 });

    // The two boxes that came free go to two of those who were refused.
    const again = await Promise.all(
      baskets.slice(100).map((basket) => world.request().post('/api/orders').send(basket)),
    );
    const late = again.filter((answer) => answer.status === 200).map((answer) => answer.body as Placed);
    const lateHeld = late.filter((order) => order.state === 'awaiting payment');
    expect(lateHeld).toHaveLength(2);
    await Promise.all(lateHeld.map((order) => payOn(order.paymentUrl)));
    await world.payments.flush();

    expect(await countersOf(world, stall.boxOffer.id)).toEqual({ offered: 20, held: 0, sold: 20 });
    expect(await takenOf(world, stall.slot.id)).toBe(20);
    const confirmed = await world.db.select().from(customerOrder).where(eq(customerOrder.state, 'confirmed'));
    expect(confirmed).toHaveLength(20);
    expect(world.payments.charges().filter((charge) => charge.paid)).toHaveLength(20);
    expect(world.payments.refunds()).toEqual([]);
    expect(await proveCounters(world.deps)).toEqual([]);
  },
);

test('the proof of the counters names a counter that is off', async () => {
  await world.db
    .update(offer)
    .set({ sold: sql`${offer.sold} - 1` })
    .where(eq(offer.id, stall.boxOffer.id));
  expect(await proveCounters(world.deps)).toEqual([{ what: 'sold', id: stall.boxOffer.id, counted: 19, summed: 20 }]);
  await world.db
    .update(offer)
    .set({ sold: sql`${offer.sold} + 1` })
    .where(eq(offer.id, stall.boxOffer.id));
});

test('a basket of one more box, when none is left, says so in words', async () => {
  const answer = await world.request().post('/api/orders').send(basketFor(stall));
  expect((answer.body as { detail: string }).detail).toMatch(
    /^Hearth has sold out for .*Nothing was taken and nothing was charged\.$/,
  );
  await expect(place(world, basketFor(stall))).rejects.toThrow('409');
});
