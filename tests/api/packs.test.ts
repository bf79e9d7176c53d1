import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { pack, packAssignment, stockMovement } from '#db/schema/packs.ts';
import { orderLine } from '#db/schema/orders.ts';
import type { Fill, PackingDay } from '#shared/contracts/packs.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { getOrderRow, makeConfirmedOrder } from '#tests/support/make-order.ts';
import {
  ledgerOf,
  liveAssignments,
  makePackingDay,
  weighEverydayBox,
  type PackingBench,
} from '#tests/support/make-packing-day.ts';
import { makeReservation } from '#tests/support/make-reservation.ts';
import { makeTradeAccount } from '#tests/support/make-selling-day.ts';

const TEXT: unknown = expect.any(String);

let world: World;
let bench: PackingBench;

beforeAll(async () => {
  world = await startWorld();
  bench = await makePackingDay(world);
});
afterAll(() => world.stop());

function fillsOf(day: PackingDay, orderNo: number): Fill[] {
  return day.fills.filter((fill) => fill.orderNo === orderNo);
}

async function expectBalanced(): Promise<void> {
  const ledger = await ledgerOf(world, bench.carcaseId);
  expect(ledger.thereGrams).toBe(ledger.inGrams);
  expect(ledger.isNegative).toBe(false);
}

describe('weighing packs in', () => {
  const weighIn = (body: object, cookie = bench.packer) =>
    world.request(cookie).post(`/api/cutting-days/${bench.dayId}/packs`).send(body);

  test('gives each a code and a use-by date, and moves its grams out of the carcase', async () => {
    const packs = await bench.weigh('mince', [480, 510]);
    expect(packs.map(({ grams, place, orderNo }) => ({ grams, place, orderNo }))).toEqual([
      { grams: 480, place: 'chiller', orderNo: null },
      { grams: 510, place: 'chiller', orderNo: null },
    ]);
    for (const { code, packedOn, useBy } of packs) {
      expect(code).toMatch(/^[2-9A-HJ-NP-Z]{10}$/);
      expect(packedOn).toBe(world.clock.today());
      expect(useBy > packedOn).toBe(true);
    }
    const ledger = await ledgerOf(world, bench.carcaseId);
    expect(ledger.at('chiller')).toBe(990);
    expect(ledger.at('carcase')).toBe(ledger.inGrams - 990);
    await expectBalanced();
    for (const { id } of packs) await bench.lose(id, 'weighed twice');
  });

  test('of more than the carcase still holds, is refused with both weights and nothing is kept', async () => {
    const before = await world.db.select().from(pack);
    const answer = await weighIn({ carcaseId: bench.carcaseId, cutId: 'mince', grams: Array(10).fill(40_000) });
    expect(answer.status).toBe(422);
    const { inGrams } = await ledgerOf(world, bench.carcaseId);
    const figures = { wantedGrams: 400_000, leftGrams: inGrams };
    expect(answer.body).toMatchObject({ code: 'MEASURED_EXCEEDS_PARENT', figures });
    expect(await world.db.select().from(pack)).toEqual(before);
  });

  test('of a beast or a cut that is not of this day, is refused beside the field', async () => {
    const good = { carcaseId: bench.carcaseId, cutId: 'mince', grams: [500] };
    const stranger = await weighIn({ ...good, carcaseId: randomUUID() });
    expect(stranger.body).toMatchObject({ code: 'INVALID_INPUT', fields: { carcaseId: TEXT } });
    expect((await weighIn({ ...good, cutId: 'wing' })).body).toMatchObject({ fields: { cutId: TEXT } });
  });

  test('with weight 0, negative, in letters, in fractions or of 14 digits, is refused beside the pack', async () => {
    for (const grams of [0, -500, '500', 500.5, 12_345_678_901_234]) {
      const answer = await weighIn({ carcaseId: bench.carcaseId, cutId: 'mince', grams: [450, grams] });
      expect(answer.body).toMatchObject({ code: 'INVALID_INPUT', fields: { 'grams.1': TEXT } });
    }
    expect((await bench.read()).packs.filter((each) => each.place === 'chiller')).toEqual([]);
  });

  test('as a customer or a butcher, is forbidden', async () => {
    for (const role of ['customer', 'butcher'] as const) {
      const { cookie } = await world.signIn(role);
      const answer = await weighIn({ carcaseId: bench.carcaseId, cutId: 'mince', grams: [500] }, cookie);
      expect(answer.status).toBe(403);
    }
  });
});

describe('a weight or a pack put right', () => {
  test('weighed again, goes back into the carcase and comes out at its true weight', async () => {
    const [wrong] = await bench.weigh('mince', [5_000]);
    expect(await bench.reweigh(wrong?.id ?? '', 500)).toMatchObject({ grams: 500, place: 'chiller' });
    const rows = await world.db
      .select()
      .from(stockMovement)
      .where(eq(stockMovement.packId, wrong?.id ?? ''));
    expect(rows.map((row) => row.grams).sort((a, b) => a - b)).toEqual([500, 5_000, 5_000]);
    expect(rows.filter((row) => row.reversalOf !== null)).toHaveLength(1);
    expect((await ledgerOf(world, bench.carcaseId)).at('chiller')).toBe(500);
    await expectBalanced();
    await bench.lose(wrong?.id ?? '', 'weighed twice');
  });

  test('dropped, goes to waste; weighed twice, never was; neither can go a second time', async () => {
    const [first, second] = await bench.weigh('mince', [400, 600]);
    const carcase = (await ledgerOf(world, bench.carcaseId)).at('carcase');
    await bench.lose(first?.id ?? '', 'dropped');
    await bench.lose(second?.id ?? '', 'weighed twice');
    const after = await ledgerOf(world, bench.carcaseId);
    expect({ waste: after.at('waste'), chiller: after.at('chiller') }).toEqual({ waste: 400, chiller: 0 });
    expect(after.at('carcase')).toBe(carcase + 600);
    await expectBalanced();
    for (const gone of [first, second]) {
      expect(await bench.lose(gone?.id ?? '', 'torn')).toMatchObject({ code: 'STATE_CHANGED' });
      expect(await bench.reweigh(gone?.id ?? '', 450)).toMatchObject({ code: 'STATE_CHANGED' });
    }
  });
});

describe('filling the orders of a day', () => {
  const looseLine = () => ({ offerId: bench.looseOffer.id, quantity: 1 });
  const boxes = (quantity: number) => ({ offerId: bench.boxOffer.id, quantity });

  test('fills boxes, loose packs and butchers’ cuts, and names the box that it cannot fill and why', async () => {
    const first = await makeConfirmedOrder(world, bench, { lines: [boxes(1)] });
    const second = await makeConfirmedOrder(world, bench, { lines: [boxes(1)] });
    const third = await makeConfirmedOrder(world, bench, { lines: [looseLine()] });
    const butcher = await world.signIn('butcher');
    const accountId = await makeTradeAccount(world.db, butcher.userId);
    const line = { kind: 'cut' as const, cutId: 'brisket-joint', grams: 4_000, tenthPencePerKg: 9_400 };
    const head = { accountId, cuttingDayId: bench.dayId, state: 'confirmed' as const };
    const reserved = await makeReservation(world.db, head, [line]);

    await weighEverydayBox(bench);
    const looseGrams = (bench.looseOffer.upperGrams ?? 0) - 20;
    await bench.weigh(bench.looseCutId, [looseGrams]);
    await bench.weigh('brisket-joint', [1_900, 2_000, 2_600]);
    await bench.weigh('mince', [500, 500, 500]);
    const day = await bench.fill();

    const everyday = [first, second].flatMap((order) => fillsOf(day, order.orderNo));
    const unfilled = everyday.find((fill) => !fill.isFilled);
    expect(everyday.find((fill) => fill.isFilled)).toMatchObject({ grams: 4_300, missing: [] });
    expect(unfilled).toMatchObject({ grams: 0, packs: [] });
    expect(unfilled?.missing.map((each) => each.line)).toContain('A joint');
    expect(fillsOf(day, third.orderNo)).toMatchObject([{ isFilled: true, packs: [{ grams: looseGrams }] }]);
    for (const { token, orderNo } of [first, second, third]) {
      const state = orderNo === unfilled?.orderNo ? 'confirmed' : 'packed';
      expect((await getOrderRow(world, token)).state).toBe(state);
    }
    const [cuts] = fillsOf(day, reserved.reservationNo);
    expect(cuts?.isFilled).toBe(true);
    expect(Math.abs((cuts?.grams ?? 0) - 4_000)).toBeLessThanOrEqual(500);
    await expectBalanced();
  });

  test('leaves what is filled as it is when more packs come, and fills the rest', async () => {
    const before = (await bench.read()).fills.filter((fill) => fill.isFilled);
    expect(before).not.toEqual([]);
    await bench.weigh('diced-beef', [650, 760]);
    await bench.weigh('topside-joint', [1_500]);
    const day = await bench.fill();
    for (const fill of before) expect(day.fills).toContainEqual(fill);
    expect(day.fills.every((fill) => fill.isFilled)).toBe(true);
    for (const { id } of day.packs) expect((await liveAssignments(world, id)).length).toBeLessThanOrEqual(1);
    await expectBalanced();
  });

  test('a pack that is lost opens its order again, and the next fill mends that box alone', async () => {
    const before = await bench.read();
    expect(before.fills.every((fill) => fill.isFilled)).toBe(true);
    const broken = before.fills.find((fill) => fill.item === 'Everyday');
    const joint = before.packs.find((each) => each.orderNo === broken?.orderNo && each.cutId === 'topside-joint');
    const opened = await bench.lose(joint?.id ?? '', 'dropped');
    expect(fillsOf(opened, broken?.orderNo ?? 0).some((fill) => !fill.isFilled)).toBe(true);
    await bench.weigh('topside-joint', [1_350]);
    const mended = await bench.fill();
    expect(mended.fills.every((fill) => fill.isFilled)).toBe(true);
    const others = (day: PackingDay) => day.fills.filter((fill) => fill.orderNo !== broken?.orderNo);
    expect(others(mended)).toEqual(others(before));
    await expectBalanced();
  });

  test('a box that only another box can mend changes a pack with it, and everything else stays shut', async () => {
    const before = await bench.read();
    for (const spare of before.packs.filter((each) => each.place === 'chiller' && each.orderNo === null)) {
      await bench.lose(spare.id, 'own use');
    }
    const stews = before.packs
      .filter((each) => each.cutId === 'diced-beef' && each.orderNo !== null)
      .sort((a, b) => a.grams - b.grams);
    const lightest = stews[0];
    const [lost, beside] = stews.filter((each) => each.orderNo !== lightest?.orderNo);
    expect(lightest?.grams).toBeLessThan(beside?.grams ?? 0);
    // The stew takes 2.2 kg at most: this pack goes in beside the lightest one, in the other box, and nowhere else.
    await bench.weigh('diced-beef', [2_200 - (lightest?.grams ?? 0)]);
    await bench.lose(lost?.id ?? '', 'torn');
    const mended = await bench.fill();
    expect(mended.fills.every((fill) => fill.isFilled)).toBe(true);
    const isOther = (fill: Fill) => fill.orderNo !== lost?.orderNo && fill.orderNo !== lightest?.orderNo;
    expect(mended.fills.filter(isOther)).toEqual(before.fills.filter(isOther));
    expect(mended.packs.every((each) => each.place !== 'chiller' || each.orderNo !== null)).toBe(true);
    await expectBalanced();
  });

  test('two fills at once put no pack into two orders', async () => {
    await makeConfirmedOrder(world, bench, { lines: [boxes(2)] });
    await weighEverydayBox(bench);
    await weighEverydayBox(bench);
    const [one, other] = await Promise.all([bench.fill(), bench.fill()]);
    expect(one.fills.every((fill) => fill.isFilled)).toBe(true);
    expect(other.fills).toEqual(one.fills);
    const live = await world.db.select().from(packAssignment).where(eq(packAssignment.isLive, true));
    expect(new Set(live.map((row) => row.packId)).size).toBe(live.length);
    const [taken] = live;
    const [line] = await world.db.select().from(orderLine);
    const again = { packId: taken?.packId ?? '', orderLineId: line?.id ?? '' };
    await expect(world.db.insert(packAssignment).values(again)).rejects.toThrow();
    await expectBalanced();
  });
});
