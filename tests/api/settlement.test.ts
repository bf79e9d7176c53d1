import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { mailMessage } from '#db/schema/mail.ts';
import type { PackingDay } from '#shared/contracts/packs.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { getOrderRow, makeConfirmedOrder, paymentsOf } from '#tests/support/make-order.ts';
import { ledgerOf, makePackingDay, weighEverydayBox, type PackingBench } from '#tests/support/make-packing-day.ts';

let world: World;
let bench: PackingBench;

beforeAll(async () => {
  world = await startWorld();
  bench = await makePackingDay(world);
});
afterAll(() => world.stop());

function refundsOf(orderId: string) {
  return paymentsOf(world, orderId).then((rows) => rows.filter((row) => row.kind === 'refund'));
}

function mailsOf(orderId: string) {
  return world.db.select().from(mailMessage).where(eq(mailMessage.orderId, orderId)).orderBy(mailMessage.createdAt);
}

function packShort(orderNo: number, cookie = bench.owner) {
  return world.request(cookie).post(`/api/cutting-days/${bench.dayId}/orders/${orderNo}/pack-short`).send({});
}

const loosePacks = (quantity: number) => [{ offerId: bench.looseOffer.id, quantity }];

describe('a packed order', () => {
  test('pays the lighter loose packs back once, with one mail that names every code', async () => {
    const order = await makeConfirmedOrder(world, bench, { lines: loosePacks(2) });
    const { pricePence, upperGrams } = bench.looseOffer;
    const [paid, upper] = [pricePence ?? 0, upperGrams ?? 0];
    const packs = await bench.weigh(bench.looseCutId, [upper - 100, upper]);
    await bench.fill();
    expect((await getOrderRow(world, order.token)).state).toBe('packed');
    const owed = paid - Math.round((paid * (upper - 100)) / upper);
    expect(owed).toBeGreaterThan(0);
    expect(await refundsOf(order.id)).toMatchObject([{ reason: 'weights settled', amountPence: owed, state: 'asked' }]);

    await world.runJobs();
    expect(await refundsOf(order.id)).toMatchObject([{ amountPence: owed, state: 'done' }]);
    expect(await getOrderRow(world, order.token)).toMatchObject({ paymentState: 'refunded in part' });
    await bench.fill();
    await world.runJobs();
    expect(await refundsOf(order.id)).toHaveLength(1);
    const settled = (await mailsOf(order.id)).filter((mail) => mail.kind !== 'order confirmed');
    expect(settled.map(({ kind, state }) => ({ kind, state }))).toEqual([{ kind: 'weights settled', state: 'sent' }]);
    for (const { code } of packs) expect(settled[0]?.text).toContain(`${world.origin}/trace/${code}`);
    expect(settled[0]?.subject).toContain(`£${(owed / 100).toFixed(2)}`);
  });

  test('bought with a code, pays the lighter pack back from what was paid and not from the price', async () => {
    const code = { code: 'HALF', percent: 50, amountPence: null, minimumPence: 0, lastDay: null };
    const more = { usageLimit: null, isOncePerCustomer: false };
    await world
      .request(bench.owner)
      .post('/api/office/promo-codes')
      .send({ ...code, ...more });
    const order = await makeConfirmedOrder(world, bench, { lines: loosePacks(1), promoCode: 'HALF' });
    const { pricePence, upperGrams } = bench.looseOffer;
    const paid = (pricePence ?? 0) - Math.round((pricePence ?? 0) / 2);
    expect(order.totalPence).toBe(paid);
    await bench.weigh(bench.looseCutId, [(upperGrams ?? 0) - 200]);
    await bench.fill();
    const owed = paid - Math.round((paid * ((upperGrams ?? 0) - 200)) / (upperGrams ?? 1));
    expect(await refundsOf(order.id)).toMatchObject([{ reason: 'weights settled', amountPence: owed }]);
    await world.runJobs();
  });

  test('that weighs what was paid for, or more, moves no money and writes no mail', async () => {
    const order = await makeConfirmedOrder(world, bench, { lines: loosePacks(1) });
    const upper = bench.looseOffer.upperGrams ?? 0;
    await bench.weigh(bench.looseCutId, [upper + 15]);
    await bench.fill();
    await world.runJobs();
    expect((await getOrderRow(world, order.token)).state).toBe('packed');
    expect(await refundsOf(order.id)).toEqual([]);
    expect((await mailsOf(order.id)).map((mail) => mail.kind)).toEqual(['order confirmed']);
  });

  test('whose pack turns out lighter on the scale, pays back only the further difference', async () => {
    const order = await makeConfirmedOrder(world, bench, { lines: loosePacks(1) });
    const [paid, upper] = [bench.looseOffer.pricePence ?? 0, bench.looseOffer.upperGrams ?? 0];
    const [pack] = await bench.weigh(bench.looseCutId, [upper - 50]);
    await bench.fill();
    await bench.reweigh(pack?.id ?? '', upper - 120);
    const refunds = await refundsOf(order.id);
    expect(refunds.map((row) => row.reason)).toEqual(['weights settled', 'weights settled again, 2']);
    const given = refunds.reduce((sum, row) => sum + row.amountPence, 0);
    expect(given).toBe(paid - Math.round((paid * (upper - 120)) / upper));
  });
});

describe('an order that cannot be filled', () => {
  test('is packed short by the owner: the box keeps its price less what its guarantee misses', async () => {
    const lines = [{ offerId: bench.boxOffer.id, quantity: 1 }];
    const order = await makeConfirmedOrder(world, bench, { lines });
    await bench.weigh('mince', [500, 500, 500]);
    await bench.weigh('diced-beef', [700, 700]);
    const open = await bench.fill();
    expect(open.fills.find((fill) => fill.orderNo === order.orderNo)).toMatchObject({ isFilled: false, grams: 0 });

    expect((await packShort(order.orderNo, bench.packer)).status).toBe(403);
    const answer = await packShort(order.orderNo);
    const fill = (answer.body as PackingDay).fills.find((each) => each.orderNo === order.orderNo);
    expect(fill).toMatchObject({ grams: 2_900, isFilled: false, missing: [{ line: 'A joint', shortPacks: 1 }] });
    expect((await getOrderRow(world, order.token)).state).toBe('packed');
    // 1,100 g of 4,000 g are missing of a box at £64.00.
    expect(await refundsOf(order.id)).toMatchObject([{ reason: 'weights settled', amountPence: 1_760 }]);

    const after = await bench.fill();
    expect(after.fills.find((each) => each.orderNo === order.orderNo)).toEqual(fill);
    expect((await packShort(order.orderNo)).body).toMatchObject({ code: 'STATE_CHANGED' });
    await world.runJobs();
    expect(await refundsOf(order.id)).toMatchObject([{ amountPence: 1_760, state: 'done' }]);
    const ledger = await ledgerOf(world, bench.carcaseId);
    expect(ledger.thereGrams).toBe(ledger.inGrams);
  });

  test('without a single pack, is not packed but left to be cancelled', async () => {
    const order = await makeConfirmedOrder(world, bench, { lines: loosePacks(1) });
    expect((await packShort(order.orderNo)).body).toMatchObject({ code: 'NOT_FILLABLE' });
    expect((await getOrderRow(world, order.token)).state).toBe('confirmed');
    expect(await refundsOf(order.id)).toEqual([]);
    expect((await packShort(99_999)).status).toBe(404);
  });

  test('a filled box keeps its price, however much it weighs', async () => {
    const lines = [{ offerId: bench.boxOffer.id, quantity: 1 }];
    const order = await makeConfirmedOrder(world, bench, { lines });
    await weighEverydayBox(bench);
    await bench.fill();
    expect((await getOrderRow(world, order.token)).state).toBe('packed');
    expect(await refundsOf(order.id)).toEqual([]);
  });
});
