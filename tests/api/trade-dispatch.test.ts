import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { stockMovement } from '#db/schema/packs.ts';
import { tradePrice } from '#db/schema/trade.ts';
import type { Reservation } from '#shared/contracts/trade.ts';
import { priceForWeight } from '#shared/domain/money.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { ledgerOf, makePackingDay, type PackingBench } from '#tests/support/make-packing-day.ts';
import { makeReservation } from '#tests/support/make-reservation.ts';
import { makeTradeAccount } from '#tests/support/make-selling-day.ts';
import { publishByHand } from '#tests/support/publish-by-hand.ts';

let world: World;
let bench: PackingBench;
let accountId: string;
let butcher: string;

beforeAll(async () => {
  world = await startWorld();
  bench = await makePackingDay(world);
  const person = await world.signIn('butcher');
  butcher = person.cookie;
  accountId = await makeTradeAccount(world.db, person.userId, 'Fellside Butchers');
});
afterAll(() => world.stop());

/** A confirmed hindquarter of the left side and some brisket. */
async function makeConfirmed(briskets: number, side: 'left' | 'right', basis?: 'cold weight') {
  const head = { accountId, cuttingDayId: bench.dayId, state: 'confirmed' as const };
  const unit = {
    kind: 'unit' as const,
    unitKind: 'hind',
    carcaseId: bench.carcaseId,
    side,
    tenthPencePerKg: 7_200,
    basis,
  };
  const cut = { kind: 'cut' as const, cutId: 'brisket-joint', grams: briskets, tenthPencePerKg: 9_400 };
  const made = await makeReservation(world.db, head, [unit, cut]);
  await publishByHand(world, bench.dayId);
  const list = (await world.request(bench.owner).get('/api/office/reservations')).body as {
    reservations: Reservation[];
  };
  const found = list.reservations.find((each) => each.id === made.id);
  if (!found) throw new Error('The owner does not see the reservation.');
  const line = (kind: string) => found.lines.find((each) => each.kind === kind)?.id ?? '';
  return { ...found, unitId: line('unit'), cutId: line('cut') };
}

function dispatch(id: string, body: object, cookie = bench.owner) {
  return world
    .request(cookie)
    .post(`/api/office/reservations/${id}/dispatch`)
    .send({ isShortAccepted: false, ...body });
}

test('dispatching moves pieces and packs to the butcher and prices what the scale says', async () => {
  const { id, version, unitId, cutId } = await makeConfirmed(4_000, 'left');
  const weights = [{ lineId: unitId, grams: 78_400 }];
  expect((await dispatch(id, { version, weights }, butcher)).status).toBe(403);
  const early = await dispatch(id, { version, weights });
  expect(early.body).toMatchObject({ code: 'NOT_FILLABLE', figures: { shortGrams: 4_000, packedGrams: 0 } });

  await bench.weigh('brisket-joint', [1_950, 2_010]);
  await bench.fill();
  const before = await ledgerOf(world, bench.carcaseId);
  expect(before.at('chiller')).toBe(3_960);
  const unweighed = await dispatch(id, { version, weights: [] });
  expect(unweighed.body).toMatchObject({
    code: 'INVALID_INPUT',
    fields: { [`weights.${unitId}`]: expect.any(String) as unknown },
  });
  const foreign = await dispatch(id, { version, weights: [...weights, { lineId: cutId, grams: 100 }] });
  expect(foreign.body).toMatchObject({ fields: { 'weights.1.lineId': expect.any(String) as unknown } });

  const gone = (await dispatch(id, { version, weights })).body as Reservation;
  expect(gone).toMatchObject({
    state: 'dispatched',
    totalPence: priceForWeight(78_400, 7_200) + priceForWeight(3_960, 9_400),
  });
  expect(gone.lines.find((line) => line.kind === 'unit')).toMatchObject({
    dispatchedGrams: 78_400,
    chargedGrams: 78_400,
  });
  expect(gone.lines.find((line) => line.kind === 'cut')).toMatchObject({ dispatchedGrams: 3_960, chargedGrams: 3_960 });
  const after = await ledgerOf(world, bench.carcaseId);
  expect({ trade: after.at('trade'), chiller: after.at('chiller') }).toEqual({ trade: 82_360, chiller: 0 });
  expect(after.at('carcase')).toBe(before.at('carcase') - 78_400);
  expect(after.thereGrams).toBe(after.inGrams);

  const rows = await world.db.select().from(stockMovement).where(eq(stockMovement.toPlace, 'trade'));
  const again = await dispatch(id, { version: gone.version, weights });
  expect(again.body).toMatchObject({ code: 'STATE_CHANGED' });
  expect(await world.db.select().from(stockMovement).where(eq(stockMovement.toPlace, 'trade'))).toEqual(rows);
  const seen = (await world.request(butcher).get('/api/trade/reservations')).body as { reservations: Reservation[] };
  expect(seen.reservations).toContainEqual(gone);
});

test('more than the carcase still holds is refused and nothing leaves', async () => {
  const { id, version, unitId } = await makeConfirmed(1_000, 'right', 'cold weight');
  const before = await ledgerOf(world, bench.carcaseId);
  const wish = { version, weights: [{ lineId: unitId, grams: 400_000 }], isShortAccepted: true };
  const answer = await dispatch(id, wish);
  expect(answer.status).toBe(422);
  expect(answer.body).toMatchObject({ code: 'MEASURED_EXCEEDS_PARENT', figures: { wantedGrams: 400_000 } });
  const after = await ledgerOf(world, bench.carcaseId);
  expect(after.at('carcase')).toBe(before.at('carcase'));

  const stale = await dispatch(id, { ...wish, version: version + 1, weights: [{ lineId: unitId, grams: 70_000 }] });
  expect(stale.body).toMatchObject({ code: 'STATE_CHANGED' });
  expect((await ledgerOf(world, bench.carcaseId)).at('trade')).toBe(before.at('trade'));

  // By the kill sheet's cold weight, as agreed when it was reserved, whatever the price list says since; the brisket
  // never came and costs nothing.
  await world.db.update(tradePrice).set({ basis: 'scale weight' }).where(eq(tradePrice.product, 'hind'));
  const gone = (await dispatch(id, { ...wish, weights: [{ lineId: unitId, grams: 70_000 }] })).body as Reservation;
  const unit = gone.lines.find((line) => line.kind === 'unit');
  expect(unit).toMatchObject({ basis: 'cold weight', dispatchedGrams: 70_000 });
  expect(unit?.chargedGrams).toBeGreaterThanOrEqual(unit?.grams ?? Infinity);
  expect(gone.totalPence).toBe(priceForWeight(unit?.chargedGrams ?? 0, 7_200));
});
