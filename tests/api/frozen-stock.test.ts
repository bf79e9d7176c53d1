import { and, eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { offer } from '#db/schema/allocations.ts';
import { pack, packAssignment, stockMovement } from '#db/schema/packs.ts';
import { boxKind } from '#db/schema/products.ts';
import { readFrozenStock } from '#server/allocation/frozen-stock.ts';
import { readPlaces } from '#server/packs/pack-queries.ts';
import type { Allocation } from '#shared/contracts/allocation.ts';
import { addDays } from '#shared/domain/day.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeCarcase, makeCuttingDay } from '#tests/support/make-farm.ts';
import { makeConfirmedOrder } from '#tests/support/make-order.ts';
import { makeSellingDay } from '#tests/support/make-selling-day.ts';
import { workOut } from '#tests/support/work-out.ts';

/** A day is solved for real here, on a machine that may be busy. */
const PATIENCE = 180_000;
const PACKS = 40;
const PACK_GRAMS = 500;

let world: World;
let farm: Awaited<ReturnType<typeof makeSellingDay>>;
let owner: ReturnType<World['request']>;
let plan: Allocation;

/** Mince of an earlier day that nobody bought, in the freezer since. */
async function freezeMince(): Promise<void> {
  const { db, clock } = world;
  const day = addDays(clock.today(), -30);
  const specificationId = farm.day.specificationId;
  const past = await makeCuttingDay(db, clock.today(), { day, specificationId, state: 'closed' });
  const carcaseId = (await makeCarcase(db, past.id, { state: 'sold through', killDay: addDays(day, -14) })).id;
  const rows = await db
    .insert(pack)
    .values(
      Array.from({ length: PACKS }, (_, at) => ({
        ...{ code: `FROZEN-${at}`, cuttingDayId: past.id, carcaseId, cutId: 'mince', grams: PACK_GRAMS },
        ...{ packedOn: day, useBy: addDays(day, 9) },
      })),
    )
    .returning();
  const moves = [
    { fromPlace: 'carcase', toPlace: 'chiller', reason: 'packed' },
    { fromPlace: 'chiller', toPlace: 'freezer', reason: 'left of the day' },
  ] as const;
  for (const move of moves) {
    await db.insert(stockMovement).values(rows.map(({ id: packId, grams }) => ({ ...move, carcaseId, packId, grams })));
  }
}

beforeAll(async () => {
  world = await startWorld();
  farm = await makeSellingDay(world.db, world.clock, [330_000]);
  owner = world.request((await world.signIn('owner')).cookie);
  // More boxes with mince are wanted than the mince of one beast fills.
  await world.db.update(boxKind).set({ demandBoxes: 60 }).where(eq(boxKind.id, farm.everydayId));
  await freezeMince();
});
afterAll(() => world.stop());

const mince = () => plan.cuts.find(({ cutId }) => cutId === 'mince');

describe('frozen packs of an earlier day', () => {
  test(
    'are stock of the plan, which shows what it uses; with what is made they add up to what goes out and is over',
    async () => {
      plan = await workOut(owner, farm.day.id);
      const cut = mince();
      expect(cut?.stockGrams).toBe(PACKS * PACK_GRAMS);
      expect(cut?.stockUsedGrams).toBeGreaterThan(0);
      const { madeGrams = 0, stockUsedGrams = 0, boxGrams = 0, looseGrams = 0 } = cut ?? {};
      const { tradeGrams = 0, mincedGrams = 0, leftGrams = 0 } = cut ?? {};
      expect(madeGrams + stockUsedGrams).toBe(boxGrams + looseGrams + tradeGrams + mincedGrams + leftGrams);
    },
    PATIENCE,
  );

  test(
    'that the plan on sale of one day counts on, are not counted on by another',
    async () => {
      const { figuresVersion } = plan;
      await owner.post(`/api/allocations/${plan.id}/publish`).send({ figuresVersion }).expect(200);
      const { specificationId } = farm.day;
      const later = await makeCuttingDay(world.db, addDays(world.clock.today(), 7), { specificationId });
      const left = (await readFrozenStock(world.db, later.id)).find(({ cutId }) => cutId === 'mince')?.grams ?? 0;
      expect(left).toBeLessThanOrEqual(PACKS * PACK_GRAMS - (mince()?.stockUsedGrams ?? 0));
      expect(await readFrozenStock(world.db, farm.day.id)).toEqual([
        { cutId: 'mince', state: 'frozen', grams: PACKS * PACK_GRAMS },
      ]);
    },
    PATIENCE,
  );

  test('fill an order where no fresh pack is, and go back into the freezer when it is cancelled', async () => {
    const isMince = and(eq(offer.cuttingDayId, farm.day.id), eq(offer.productKey, 'loose:mince'));
    // How many loose packs the plan leaves beside the boxes is not the point here.
    const [loose] = await world.db.update(offer).set({ offered: 5 }).where(isMince).returning();
    const lines = [{ offerId: loose?.id, quantity: 1 }];
    const counter = { day: farm.day, boxOffer: { id: loose?.id ?? '' }, slot: farm.slot };
    const order = await makeConfirmedOrder(world, counter, { lines });
    await owner.post(`/api/cutting-days/${farm.day.id}/fill`).send({}).expect(200);
    const [placed] = await world.db.select().from(packAssignment).where(eq(packAssignment.isLive, true));
    const packId = placed?.packId ?? '';
    const placeOf = async () => (await readPlaces(world.db, [packId])).get(packId)?.place;
    expect(await placeOf()).toBe('order');
    // It is spoken for by this day's own order, so this day may still count on it.
    expect((await readFrozenStock(world.db, farm.day.id))[0]?.grams).toBe(PACKS * PACK_GRAMS);
    await owner.post(`/api/office/orders/${order.id}/cancel`).send({ reason: 'You rang us.' }).expect(200);
    expect(await placeOf()).toBe('freezer');
  });

  test('taken for something else meanwhile, stop the plan that counts on them from going on sale', async () => {
    const frozen = await world.db.select().from(pack).where(eq(pack.cutId, 'mince'));
    const eaten = { fromPlace: 'freezer', toPlace: 'own use', reason: 'own use' } as const;
    await world.db
      .insert(stockMovement)
      .values(frozen.map(({ id: packId, carcaseId, grams }) => ({ ...eaten, packId, carcaseId, grams })));
    const answer = await owner
      .post(`/api/allocations/${plan.id}/publish`)
      .send({ figuresVersion: plan.figuresVersion });
    expect(answer.body).toMatchObject({ code: 'STATE_CHANGED', figures: { lyingGrams: 0 } });
  });
});
