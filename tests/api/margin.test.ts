import { and, eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { offer } from '#db/schema/allocations.ts';
import { auditEntry } from '#db/schema/audit.ts';
import { carcase } from '#db/schema/carcases.ts';
import { priceGrid } from '#db/schema/margin.ts';
import { orderLine, payment } from '#db/schema/orders.ts';
import { pack, packAssignment } from '#db/schema/packs.ts';
import type { Allocation } from '#shared/contracts/allocation.ts';
import type { DayMargin, MarginRow, PriceGrid, PriceGridEdit } from '#shared/contracts/margin.ts';
import { addDays } from '#shared/domain/day.ts';
import { priceForWeight } from '#shared/domain/money.ts';
import { britishGrid } from '#shared/engine/figures/price-grids.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeConfirmedOrder } from '#tests/support/make-order.ts';
import { makeSellingDay } from '#tests/support/make-selling-day.ts';
import { workOut } from '#tests/support/work-out.ts';

/** A day is solved for real here, on a machine that may be busy. */
const PATIENCE = 180_000;

let world: World;
let farm: Awaited<ReturnType<typeof makeSellingDay>>;
let owner: ReturnType<World['request']>;

beforeAll(async () => {
  world = await startWorld();
  farm = await makeSellingDay(world.db, world.clock);
  owner = world.request((await world.signIn('owner')).cookie);
});
afterAll(() => world.stop());

type Grids = { latestEdition: number; current: PriceGrid; editions: { edition: number; name: string }[] };
const readGrids = async () => (await owner.get('/api/price-grids').expect(200)).body as Grids;
const save = (edit: object) => owner.post('/api/price-grids').send(edit);

async function edited(more: Partial<PriceGridEdit> = {}): Promise<PriceGridEdit> {
  const { current, latestEdition } = await readGrids();
  return { ...current, edition: latestEdition, ...more };
}

describe('the price grid', () => {
  test('of a farm that has saved none, is the published one with its source', async () => {
    const { latestEdition, current } = await readGrids();
    expect(latestEdition).toBe(0);
    expect(current).toMatchObject({ edition: 0, name: britishGrid.name, baseTenthPencePerKg: 6_750 });
    expect(current.source).toContain('week ending 15 March 2025');
    const row = current.rows.find(({ fatClass }) => fatClass === '4L');
    expect(row?.adjustments[current.conformations.indexOf('R')]).toBe(0);
  });

  test('saved with another base, is a new edition in force from its day, and the audit trail names who', async () => {
    const tomorrow = addDays(world.clock.today(), 1);
    const later = await edited({ validFrom: tomorrow, baseTenthPencePerKg: 7_100, name: 'Our buyer' });
    expect((await save(later).expect(200)).body).toMatchObject({ edition: 1, baseTenthPencePerKg: 7_100 });
    // Not in force yet.
    expect(await readGrids()).toMatchObject({ latestEdition: 1, current: { edition: 0 } });
    const since = await edited({ validFrom: addDays(world.clock.today(), -30), baseTenthPencePerKg: 6_400 });
    await save(since).expect(200);
    expect(await readGrids()).toMatchObject({ latestEdition: 2, current: { edition: 2, baseTenthPencePerKg: 6_400 } });
    const notes = await world.db.select().from(auditEntry).where(eq(auditEntry.subject, 'price grid'));
    expect(notes).toHaveLength(2);
    expect(notes.every(({ byUserId }) => byUserId !== null)).toBe(true);
  });

  test('saved by two who saw the same edition, keeps the first and tells the second', async () => {
    const [one, other] = [await edited({ levyPence: 510 }), await edited({ levyPence: 999 })];
    const answers = await Promise.all([save(one), save(other)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect(answers.find(({ status }) => status === 409)?.body).toMatchObject({ code: 'STATE_CHANGED' });
    const rows = await world.db
      .select()
      .from(priceGrid)
      .where(eq(priceGrid.edition, one.edition + 1));
    expect(rows).toHaveLength(1);
  });

  test('with a hole in a row, a class twice or a field too many, is refused and nothing is kept', async () => {
    const before = (await readGrids()).latestEdition;
    const good = await edited();
    const [first, ...rest] = good.rows;
    if (!first) throw new Error('the grid has no row');
    const short = [{ ...first, adjustments: first.adjustments.slice(1) }, ...rest];
    const hole = await save({ ...good, rows: short });
    expect(hole.status).toBe(400);
    expect((hole.body as { fields: Record<string, string> }).fields).toHaveProperty('rows.0.adjustments');
    for (const wrong of [{ rows: [first, first] }, { extra: 1 }, { baseTenthPencePerKg: 0 }, { haulagePence: -1 }]) {
      await save({ ...good, ...wrong }).expect(400);
    }
    expect((await readGrids()).latestEdition).toBe(before);
  });
});

describe('the margin of a cutting day', () => {
  let plan: Allocation;
  const path = () => `/api/cutting-days/${farm.day.id}/margin?basis=planned`;
  const read = async () => ((await owner.get(path()).expect(200)).body as { margin: DayMargin | null }).margin;
  const readMargin = async () => {
    const margin = await read();
    if (!margin) throw new Error('there is no margin');
    return margin;
  };

  test(
    'is empty before there is a plan, and the workbench then shows the same three figures',
    async () => {
      expect(await read()).toBeNull();
      plan = await workOut(owner, farm.day.id);
      const { whole, restsOn } = await readMargin();
      expect(restsOn).toContain('not on sale yet');
      const { contributionPence, deadweightPence, gainPence } = plan;
      expect(whole).toMatchObject({ contributionPence, deadweightPence, gainPence, coldGrams: plan.coldGrams });
      expect(gainPence).toBe(contributionPence - deadweightPence);
      expect(plan.unpriced).toEqual([]);
    },
    PATIENCE,
  );

  test('prices each carcase by the edition of its day of kill, step by step', async () => {
    const { carcases } = await readMargin();
    expect(carcases).toHaveLength(2);
    for (const { deadweight, margin } of carcases) {
      if (!deadweight) throw new Error('a carcase has no deadweight value');
      expect(deadweight).toMatchObject({
        baseTenthPencePerKg: 6_400,
        conformation: 'R',
        fatClass: '4L',
        isGraded: true,
      });
      const { coldGrams, levyPence, haulagePence, deductionsPence } = deadweight;
      const steps = deadweight.classAdjustment + deadweight.weightAdjustment + deadweight.ageAdjustment;
      expect(deadweight.tenthPencePerKg).toBe(6_400 + steps);
      const gross = priceForWeight(coldGrams, deadweight.tenthPencePerKg);
      expect(deadweight.netPence).toBe(gross - levyPence - haulagePence - deductionsPence);
      expect(margin.deadweightPence).toBe(deadweight.netPence);
    }
  });

  test('by carcase, channel, box and cut, adds up to the day to the penny', async () => {
    const { whole, carcases, byBox, byCut, byChannel, joint } = await readMargin();
    const sum = (rows: readonly Pick<MarginRow, 'margin'>[]) =>
      rows.reduce((total, { margin }) => total + margin.gainPence, 0);
    for (const rows of [carcases, byBox, byCut, byChannel]) expect(sum(rows)).toBe(whole.gainPence);
    const costs = Object.values(whole.costs).reduce((total, pence) => total + pence, 0);
    expect(whole.contributionPence).toBe(whole.incomePence - costs);
    expect(joint.shares.reduce((total, { sharePence }) => total + sharePence, 0)).toBe(joint.totalPence);
    const { killPence, inspectionPence, levyPence, haulagePence, butcheryPence } = whole.costs;
    const spent = killPence + inspectionPence + levyPence + haulagePence + butcheryPence;
    expect(joint.totalPence).toBe(whole.deadweightPence + spent);
  });

  test('tells the price at which a box just pays and that at which deadweight would have been better', async () => {
    const { boxes, whole } = await readMargin();
    expect(boxes.map(({ name }) => name).sort()).toEqual(['Everyday', 'Grill']);
    for (const box of boxes) {
      expect(box.boxes).toBe(plan.boxes.find(({ boxKindId }) => boxKindId === box.boxKindId)?.count);
      expect(box.breakEvenPence).toBeGreaterThan(box.jointSharePence + box.directPence);
      expect((box.deadweightPricePence ?? 0) < box.pricePence).toBe(whole.gainPence > 0);
    }
  });

  test('with a class that the grid has no price for, says so and counts the carcase as worth nothing', async () => {
    const [first] = farm.carcases;
    const isFirst = and(eq(carcase.cuttingDayId, farm.day.id), eq(carcase.id, first?.id ?? ''));
    await world.db.update(carcase).set({ conformation: 'S' }).where(isFirst);
    const { carcases } = await readMargin();
    const found = carcases.find(({ carcaseId }) => carcaseId === first?.id);
    expect(found).toMatchObject({ deadweight: null, margin: { deadweightPence: 0 } });
    expect(found?.problem).toContain('no price for S 4L');
    await world.db.update(carcase).set({ conformation: 'R' }).where(isFirst);
  });

  test('of a day that does not exist, is not found', async () => {
    await owner.get('/api/cutting-days/00000000-0000-4000-8000-000000000000/margin?basis=planned').expect(404);
  });
});

describe('the margin of what is sold', () => {
  const read = async () => {
    const answer = await owner.get(`/api/cutting-days/${farm.day.id}/margin?basis=sold`).expect(200);
    const { margin } = answer.body as { margin: DayMargin | null };
    if (!margin) throw new Error('there is no margin');
    return margin;
  };
  const sum = (rows: readonly Pick<MarginRow, 'margin'>[]) =>
    rows.reduce((total, { margin }) => total + margin.gainPence, 0);
  let orderId: string;
  let paidPence: number;

  test(
    'before anything is sold, has its carcases to pay for and no income',
    async () => {
      const plan = await workOut(owner, farm.day.id);
      const { figuresVersion } = plan;
      await owner.post(`/api/allocations/${plan.id}/publish`).send({ figuresVersion }).expect(200);
      const { whole, byChannel } = await read();
      expect(whole.incomePence).toBe(0);
      expect(whole.costs).toMatchObject({ killPence: 2 * 16_500, cardFeesPence: 0, refundsPence: 0 });
      expect(byChannel.map(({ name }) => name)).toEqual(['Not sold']);
    },
    PATIENCE,
  );

  test('takes an order at what was paid, less the card fee and what went back', async () => {
    const isGrill = and(eq(offer.cuttingDayId, farm.day.id), eq(offer.boxKindId, farm.grillId));
    const [grill] = await world.db.select().from(offer).where(isGrill);
    const counter = { day: farm.day, boxOffer: { id: grill?.id ?? '' }, slot: farm.slot };
    const order = await makeConfirmedOrder(world, counter, { lines: [{ offerId: grill?.id, quantity: 2 }] });
    [orderId, paidPence] = [order.id, order.totalPence];
    const [charge] = await world.db.select().from(payment).where(eq(payment.orderId, orderId));
    const refund = { orderId, kind: 'refund', reason: 'light', amountPence: 300, state: 'done' } as const;
    await world.db.insert(payment).values({ ...refund, chargeId: charge?.id ?? null });
    const { whole, byChannel, byBox, byCut, carcases, boxes } = await read();
    expect(whole.incomePence).toBe(paidPence);
    const fee = Math.round((paidPence * 1_500) / 100_000) + 20;
    expect(whole.costs).toMatchObject({ refundsPence: 300, cardFeesPence: fee });
    expect(byBox[0]).toMatchObject({ name: 'Grill', margin: { incomePence: paidPence } });
    expect(boxes.find(({ name }) => name === 'Grill')).toMatchObject({ boxes: 2, pricePence: 7_900 });
    for (const rows of [carcases, byBox, byCut, byChannel]) expect(sum(rows)).toBe(whole.gainPence);
  });

  test('once it is packed, goes by the packs that lie in it and the carcase that they are of', async () => {
    const [line] = await world.db.select().from(orderLine).where(eq(orderLine.orderId, orderId));
    const [, second] = farm.carcases;
    const packedOn = world.clock.today();
    const [steak] = await world.db
      .insert(pack)
      .values({
        ...{ code: 'PACK-OF-THE-TEST', cuttingDayId: farm.day.id, carcaseId: second?.id ?? '', cutId: 'fillet-steak' },
        ...{ grams: 640, packedOn, useBy: addDays(packedOn, 9) },
      })
      .returning();
    await world.db.insert(packAssignment).values({ packId: steak?.id ?? '', orderLineId: line?.id ?? '' });
    const { byCut, carcases, whole } = await read();
    expect(byCut.find(({ id }) => id === 'fillet-steak')?.margin.incomePence).toBe(paidPence);
    const income = carcases.map(({ carcaseId, margin }) => [carcaseId === second?.id, margin.incomePence]);
    expect(income).toContainEqual([true, paidPence]);
    expect(income).toContainEqual([false, 0]);
    expect(sum(carcases)).toBe(whole.gainPence);
  });
});
