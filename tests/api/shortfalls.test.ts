import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { allocation, offer } from '#db/schema/allocations.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { customerOrder, orderLine, payment } from '#db/schema/orders.ts';
import { boxKind } from '#db/schema/products.ts';
import type { HitOrder, ShortProduct } from '#shared/contracts/shortfalls.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeConfirmedOrder } from '#tests/support/make-order.ts';
import { makePublishedDay } from '#tests/support/make-published-day.ts';

let world: World;
let farm: Awaited<ReturnType<typeof makePublishedDay>>;
let owner: ReturnType<World['request']>;

beforeAll(async () => {
  world = await startWorld();
  farm = await makePublishedDay(world);
  owner = world.request((await world.signIn('owner')).cookie);
  await world.db.update(cuttingDay).set({ state: 'open' }).where(eq(cuttingDay.id, farm.day.id));
  // The two boxes of the tests count as one family, so that one can be had instead of the other.
  await world.db.update(boxKind).set({ variantOfId: farm.grillId }).where(eq(boxKind.id, farm.everydayId));
});
afterAll(() => world.stop());

const grill = (quantity = 1) => ({ offerId: farm.grillOffer.id, quantity });
const everyday = (quantity = 1) => ({ offerId: farm.everydayOffer.id, quantity });
const order = (lines: object[], name: string) => {
  const counter = { day: farm.day, boxOffer: farm.grillOffer, slot: farm.slot };
  return makeConfirmedOrder(world, counter, { lines, name, email: `${name.toLowerCase()}@example.com` });
};

async function list(): Promise<ShortProduct[]> {
  return ((await owner.get('/api/shortfalls').expect(200)).body as { products: ShortProduct[] }).products;
}

/** A newer plan of the same weights that makes so many grill boxes. */
async function planWith(boxes: number): Promise<void> {
  const [newest] = await world.db.select().from(allocation).where(eq(allocation.cuttingDayId, farm.day.id));
  if (!newest) throw new Error('there is no plan');
  const { id: _id, createdAt: _at, publishedAt: _published, ...row } = newest;
  const planned = row.plan.plan.boxes.map((box) => (box.kindId === farm.grillId ? { ...box, boxes } : box));
  const plan = { ...row.plan, plan: { ...row.plan.plan, boxes: planned } };
  await world.db.insert(allocation).values({ ...row, plan, state: 'draft' });
}

const part = ({ orderId, version, lineId, quantity }: HitOrder) => ({ orderId, version, lineId, quantity });
const readOffer = async (id: string) => (await world.db.select().from(offer).where(eq(offer.id, id)))[0];

describe('a plan that makes fewer boxes than are sold', () => {
  let hit: HitOrder[];

  test('names the orders that came last, with what each could have instead and what would go back', async () => {
    await order([grill()], 'Ada');
    await order([grill(), everyday()], 'Bess');
    await order([grill()], 'Cora');
    expect(await list()).toEqual([]);
    await planWith(1);
    const [product, ...others] = await list();
    expect(others).toEqual([]);
    expect(product).toMatchObject({ name: 'Grill', unit: 'boxes', taken: 3, made: 1, held: 0 });
    hit = product?.orders ?? [];
    expect(hit.map(({ name, isWholeOrder, refundPence }) => ({ name, isWholeOrder, refundPence }))).toEqual([
      { name: 'Cora', isWholeOrder: true, refundPence: 7_900 },
      { name: 'Bess', isWholeOrder: false, refundPence: 7_900 },
    ]);
    expect(hit[0]?.swaps).toEqual([{ offerId: farm.everydayOffer.id, name: 'Everyday', free: 11 }]);
  });

  test('settled by a swap, keeps the price, tells the customer that the farm had to, and sells the box no more', async () => {
    const cora = hit[0];
    if (!cora) throw new Error('Cora was not hit');
    const answer = await owner.post('/api/shortfalls/swap').send({ ...part(cora), offerId: farm.everydayOffer.id });
    expect(answer.status, answer.text).toBe(200);
    const lines = await world.db.select().from(orderLine).where(eq(orderLine.orderId, cora.orderId));
    expect(lines).toMatchObject([{ offerId: farm.everydayOffer.id, quantity: 1, unitPricePence: 7_900 }]);
    expect(await readOffer(farm.grillOffer.id)).toMatchObject({ sold: 2, offered: 2 });
    expect(await readOffer(farm.everydayOffer.id)).toMatchObject({ sold: 2, offered: 12 });
    await world.runJobs(['send-mail']);
    const mail = await world.mail.waitForMail('cora@example.com', ({ subject }) => subject.includes('has changed'));
    expect(mail.text).toContain('had to change order');
    expect(mail.text).not.toContain('as you asked');
  });

  test('settled by a refund, pays that part back once and keeps the rest of the order', async () => {
    const [product] = await list();
    const bess = product?.orders[0];
    if (bess?.name !== 'Bess') throw new Error('Bess was not hit');
    const both = await Promise.all([
      owner.post('/api/shortfalls/refund').send(part(bess)),
      owner.post('/api/shortfalls/refund').send(part(bess)),
    ]);
    expect(both.map(({ status }) => status).sort()).toEqual([200, 409]);
    const refunds = (await world.db.select().from(payment).where(eq(payment.orderId, bess.orderId))).filter(
      ({ kind }) => kind === 'refund',
    );
    expect(refunds).toMatchObject([{ amountPence: 7_900, reason: 'Could not be filled: 1 × Grill' }]);
    const [row] = await world.db.select().from(customerOrder).where(eq(customerOrder.id, bess.orderId));
    expect(row).toMatchObject({ state: 'confirmed', totalPence: 6_400 });
    expect(await readOffer(farm.grillOffer.id)).toMatchObject({ sold: 1, offered: 1 });
    expect(await list()).toEqual([]);
    await world.runJobs(['send-mail', 'settle-refund']);
    const mail = await world.mail.waitForMail('bess@example.com', ({ subject }) => subject.startsWith('Part of order'));
    expect(mail.text).toContain('1 × Grill');
    expect(mail.text).toContain('£79.00');
  });

  test('settled for an order with nothing else in it, cancels it whole and gives everything back', async () => {
    await planWith(0);
    const [product] = await list();
    const ada = product?.orders[0];
    if (ada?.name !== 'Ada') throw new Error('Ada was not hit');
    await owner.post('/api/shortfalls/refund').send(part(ada)).expect(200);
    const [row] = await world.db.select().from(customerOrder).where(eq(customerOrder.id, ada.orderId));
    expect(row?.state).toBe('cancelled');
    expect(await readOffer(farm.grillOffer.id)).toMatchObject({ sold: 0, offered: 0 });
  });

  test('seen in an older version of the order, or for more than it has, is refused and nothing moves', async () => {
    const dora = await order([everyday(2)], 'Dora');
    const [line] = await world.db.select().from(orderLine).where(eq(orderLine.orderId, dora.id));
    const [row] = await world.db.select().from(customerOrder).where(eq(customerOrder.id, dora.id));
    const good = { orderId: dora.id, version: row?.version ?? 0, lineId: line?.id ?? '', quantity: 1 };
    for (const wrong of [{ version: good.version + 1 }, { quantity: 3 }]) {
      const answer = await owner.post('/api/shortfalls/refund').send({ ...good, ...wrong });
      expect(answer.body).toMatchObject({ code: 'STATE_CHANGED' });
    }
    const money = await world.db.select().from(payment).where(eq(payment.orderId, dora.id));
    expect(money.every(({ kind }) => kind === 'charge')).toBe(true);
  });
});
