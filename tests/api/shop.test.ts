import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { cuttingDay } from '#db/schema/carcases.ts';
import { boxKind } from '#db/schema/products.ts';
import { reservation, reservationLine, tradeAccount } from '#db/schema/trade.ts';
import type { Box, BoxCard, CollectionPoint, LooseCut, ShopHome, Trace } from '#shared/contracts/shop.ts';
import { priceForWeight } from '#shared/domain/money.ts';
import { traditionalSide } from '#shared/engine/figures/traditional-side.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeBoxKind, makeSlot } from '#tests/support/make-farm.ts';
import { makePackOf, payFor, place } from '#tests/support/make-order.ts';
import { makePublishedDay } from '#tests/support/make-published-day.ts';
import { makeTradeAccount } from '#tests/support/make-selling-day.ts';

let world: World;
let farm: Awaited<ReturnType<typeof makePublishedDay>>;

beforeAll(async () => {
  world = await startWorld();
  farm = await makePublishedDay(world);
  await world.db.update(cuttingDay).set({ state: 'open' }).where(eq(cuttingDay.id, farm.day.id));
});
afterAll(() => world.stop());

async function home(): Promise<ShopHome> {
  const answer = await world.request().get('/api/shop');
  expect(answer.status).toBe(200);
  return answer.body as ShopHome;
}

function offerOf(card: BoxCard | undefined) {
  const offer = card?.offers[0];
  if (!offer) throw new Error('This box is not on sale.');
  return offer;
}

function order(lines: { offerId: string; quantity: number }[]) {
  return {
    ...{ basketKey: randomUUID(), dayId: farm.day.id, lines, slotId: farm.slot.id, note: '' },
    ...{ name: 'Ada Fell', email: 'ada@example.com', phone: '07700 900123' },
  };
}

test('the first page shows the next day, its boxes with what is left, and a rail of all that hangs', async () => {
  const page = await home();
  expect(page.farm).toMatchObject({ name: 'Skelderwick', phone: '01632 960100' });
  const [day] = page.days;
  expect(day).toMatchObject({
    ...{ id: farm.day.id, day: farm.day.day, isInTime: true, carcaseCount: 2, hungDays: 14, soldGrams: 0 },
    collectionDays: [farm.collectionDay],
  });
  expect(page.boxes.map((box) => box.name)).toEqual(['Everyday', 'Grill']);
  expect(page.boxes.map((box) => offerOf(box).free)).toEqual([12, 10]);
  expect(offerOf(page.boxes[0])).toMatchObject({ offerId: farm.everydayOffer.id, dayId: farm.day.id, held: 0 });
  const names = traditionalSide.quarters.flatMap((quarter) => quarter.primals.map((primal) => primal.id));
  const shown = day?.rail.primals.map((primal) => primal.id) ?? [];
  expect(shown).toEqual(names.filter((id) => shown.includes(id)));
  expect(day?.rail.narrowPrimals.length).toBeLessThanOrEqual(9);
  const grams = (primals: { grams: number }[] = []) => primals.reduce((sum, primal) => sum + primal.grams, 0);
  expect(grams(day?.rail.primals)).toBe(day?.productGrams);
  expect(grams(day?.rail.narrowPrimals)).toBe(day?.productGrams);
  // Two steers of 338 kg at the reference yield of 70 %: bone, fat and loss are not product, mince is not counted twice.
  expect(day?.productGrams).toBeGreaterThan(2 * 338_000 * 0.65);
  expect(day?.productGrams).toBeLessThan(2 * 338_000 * 0.78);
});

test('a sale shows on the rail: held while it is being paid, then sold, by about what the boxes weigh', async () => {
  const grill = (await home()).boxes.find((box) => box.name === 'Grill');
  const before = (await home()).days[0];
  const placed = await place(world, order([{ offerId: offerOf(grill).offerId, quantity: 2 }]));
  const held = await home();
  const sum = (day: ShopHome['days'][number] | undefined, key: 'soldGrams' | 'heldGrams') =>
    day?.rail.primals.reduce((total, primal) => total + primal[key], 0) ?? 0;
  expect(offerOf(held.boxes.find((box) => box.name === 'Grill'))).toMatchObject({
    free: offerOf(grill).free - 2,
    held: 2,
  });
  expect(sum(held.days[0], 'heldGrams') - sum(before, 'heldGrams')).toBe(2 * 3_600);
  await payFor(world, placed);
  const sold = await home();
  expect(sum(sold.days[0], 'heldGrams')).toBe(sum(before, 'heldGrams'));
  expect(sold.days[0]?.soldGrams).toBe(sum(sold.days[0], 'soldGrams'));
  expect(sum(sold.days[0], 'soldGrams')).toBe(2 * 3_600);
  for (const primal of sold.days[0]?.rail.primals ?? []) {
    expect(primal.soldGrams + primal.heldGrams, primal.name).toBeLessThanOrEqual(primal.grams);
  }
});

test('a box page gives its lines, servings, freezer space and what it takes of one side', async () => {
  const box = (await world.request().get('/api/boxes/grill')).body as Box;
  expect(box).toMatchObject({ slug: 'grill', guaranteedGrams: 3_000, servings: 18, freezerLitres: 5 });
  expect(box.tenthPencePerKg).toBe(Math.round((7_900 * 10_000) / 3_000));
  expect(box.lines.map((line) => line.name)).toEqual(['Steaks', 'Mince']);
  expect(box.lines[0]?.cuts).toHaveLength(3);
  expect(box.lines[1]).toMatchObject({ minGrams: 800, maxGrams: 1_650, cooking: 'mince' });
  expect(box.rail.boxes).toBeGreaterThan(0);
  const taken = box.rail.rail.primals.reduce((sum, primal) => sum + primal.soldGrams, 0);
  expect(Math.abs(taken - box.rail.boxes * 3_600)).toBeLessThan(20);
  for (const primal of box.rail.rail.primals) expect(primal.soldGrams).toBeLessThanOrEqual(primal.grams);
  const missing = await world.request().get('/api/boxes/no-such-box');
  expect(missing.status).toBe(404);
  expect(missing.body).toMatchObject({ code: 'NOT_FOUND' });
});

test('loose cuts carry the price of their upper weight and the price of a kilogram', async () => {
  const { cuts, days } = (await world.request().get('/api/cuts')).body as { cuts: LooseCut[]; days: unknown[] };
  expect(days).toHaveLength(1);
  expect(cuts.length).toBeGreaterThan(5);
  for (const cut of cuts) {
    expect(cut.pricePence, cut.name).toBe(priceForWeight(cut.upperGrams, cut.tenthPencePerKg));
  }
  const fillet = cuts.find((cut) => cut.id === 'fillet-steak');
  expect(fillet).toMatchObject({ upperGrams: 450, pricePence: 2_340, tenthPencePerKg: 52_000 });
  expect(fillet?.offers).toMatchObject([{ offerId: farm.filletOffer.id, free: 8 }]);
});

test('a box that is off sale is shown nowhere, and one that no plan makes has no rail', async () => {
  const quiet = await makeBoxKind(world.db, 'unplanned', { name: 'Unplanned' });
  const page = (await world.request().get('/api/boxes/unplanned')).body as Box;
  expect(page).toMatchObject({ offers: [], rail: { boxes: 0, rail: { primals: [] } } });
  await world.db.update(boxKind).set({ isActive: false }).where(eq(boxKind.id, quiet.id));
  expect((await world.request().get('/api/boxes/unplanned')).status).toBe(404);
  expect((await home()).boxes.some((box) => box.name === 'Unplanned')).toBe(false);
});

test('after the cut-off the day is still shown, and nothing of it can be bought', async () => {
  const past = new Date(world.clock.now().getTime() - 1_000);
  await world.db.update(cuttingDay).set({ cutOffAt: past }).where(eq(cuttingDay.id, farm.day.id));
  const page = await home();
  expect(page.days[0]).toMatchObject({ isInTime: false });
  expect(page.boxes.flatMap((box) => box.offers.map((offer) => offer.free))).toEqual([0, 0]);
  await world.db.update(cuttingDay).set({ cutOffAt: farm.day.cutOffAt }).where(eq(cuttingDay.id, farm.day.id));
});

test('collections list the times that are to come with what is left of each, and full ones as full', async () => {
  const full = await makeSlot(world.db, farm.day.id, world.clock.today(), {
    pointId: farm.slot.pointId,
    startsAt: new Date(farm.slot.startsAt.getTime() + 3_600_000),
    endsAt: new Date(farm.slot.startsAt.getTime() + 5_400_000),
    ...{ capacity: 2, taken: 2 },
  });
  await makeSlot(world.db, farm.day.id, world.clock.today(), {
    pointId: farm.slot.pointId,
    startsAt: new Date(world.clock.now().getTime() - 3_600_000),
    endsAt: new Date(world.clock.now().getTime() + 3_600_000),
  });
  const answer = await world.request().get(`/api/cutting-days/${farm.day.id}/collections`);
  const [point] = (answer.body as { points: CollectionPoint[] }).points;
  expect(point).toMatchObject({ name: 'The farm gate', directions: 'Up the lane past the chapel.' });
  expect(point?.slots.map((slot) => slot.id)).toEqual([farm.slot.id, full.id]);
  expect(point?.slots[1]?.free).toBe(0);
  const none = await world.request().get(`/api/cutting-days/${randomUUID()}/collections`);
  expect(none.body).toEqual({ points: [], hasVan: false });
});

test('butchers are named once they have beef of the farm, by shop and town alone', async () => {
  const { userId } = await world.signIn('butcher');
  const accountId = await makeTradeAccount(world.db, userId, 'Harker & Daughter');
  await world.db
    .update(tradeAccount)
    .set({ addressLines: ['4 Bridge End', 'Thornwick', 'ZZ4 2PD'] })
    .where(eq(tradeAccount.id, accountId));
  expect((await home()).butchers).toEqual([]);
  const [kept] = await world.db
    .insert(reservation)
    .values({ accountId, cuttingDayId: farm.day.id, requestKey: randomUUID(), state: 'confirmed' })
    .returning();
  await world.db.insert(reservationLine).values({
    ...{ reservationId: kept?.id ?? '', kind: 'unit', unitKind: 'hind', tenthPencePerKg: 7_200 },
  });
  expect((await home()).butchers).toEqual([{ businessName: 'Harker & Daughter', town: 'Thornwick' }]);
});

test('a pack is traced to its beast by its code, and no other code opens anything', async () => {
  const beast = farm.carcases[0];
  const pack = await makePackOf(world, { dayId: farm.day.id, carcaseId: beast?.id ?? '', cutId: 'rump-steak' });
  const answer = await world.request().get(`/api/trace/${pack.code}`);
  const trace = answer.body as Trace;
  expect(trace).toMatchObject({
    code: pack.code,
    grams: 612,
    breed: 'Aberdeen Angus',
    hungDays: 14,
    killDay: beast?.killDay,
  });
  expect(trace.earTag).toMatch(/^UK 123450 \d{6}$/);
  expect(trace.slaughteredIn).toContain('ZZ 0001');
  expect(trace.cutIn).toContain('ZZ 0002');
  expect(answer.text).not.toMatch(/example\.com|pence|Ada/);
  for (const code of ['test-pack-code-9999', '%25', 'x'.repeat(40), 'abc']) {
    expect((await world.request().get(`/api/trace/${code}`)).status).toBe(404);
  }
});
