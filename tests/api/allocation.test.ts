import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { offer } from '#db/schema/allocations.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import type { Allocation } from '#shared/contracts/allocation.ts';
import { startWorld, type World } from '#tests/support/harness.ts';
import { makeSellingDay } from '#tests/support/make-selling-day.ts';
import { workOut } from '#tests/support/work-out.ts';

/** A day is solved for real here, on a machine that may be busy. */
const PATIENCE = 180_000;

let world: World;
let farm: Awaited<ReturnType<typeof makeSellingDay>>;
let owner: string;
let plan: Allocation;

beforeAll(async () => {
  world = await startWorld();
  farm = await makeSellingDay(world.db, world.clock);
  owner = (await world.signIn('owner')).cookie;
  plan = await allocate();
}, PATIENCE);
afterAll(() => world.stop());

async function allocate(locks: Allocation['locks'] = []): Promise<Allocation> {
  const answer = await workOut(world.request(owner), farm.day.id, locks);
  expect(answer).toMatchObject({ dayId: farm.day.id });
  return answer;
}

/** The newest allocation, once the worker has explained it. */
async function explained(): Promise<Allocation> {
  await world.runJobs();
  const seen = await world.request(owner).get(`/api/cutting-days/${farm.day.id}/allocation`);
  return (seen.body as { latest: Allocation }).latest;
}

function publish({ id, figuresVersion }: { id: string; figuresVersion: number }) {
  return world.request(owner).post(`/api/allocations/${id}/publish`).send({ figuresVersion });
}

describe('allocating a cutting day', () => {
  test('signed out or as a butcher, is refused and nothing is kept', async () => {
    const path = `/api/cutting-days/${farm.day.id}/plan-jobs`;
    const body = { locks: [], timeLimitSeconds: 60 };
    expect((await world.request().post(path).send(body)).status).toBe(401);
    const butcher = await world.signIn('butcher');
    expect((await world.request(butcher.cookie).post(path).send(body)).status).toBe(403);
    const seen = await world.request(owner).get(`/api/cutting-days/${farm.day.id}/allocation`);
    expect(seen.body).toMatchObject({ latest: { id: plan.id, state: 'draft' }, published: null });
  });

  test('with two weighed carcases, is proven and gives every gram a use', () => {
    expect(plan.isProven).toBe(true);
    expect(plan.shortfalls).toEqual([]);
    expect(plan.sides).toHaveLength(4);
    expect(plan.boxes.map((box) => box.name).sort()).toEqual(['Everyday', 'Grill']);
    expect(plan.boxes.every((box) => box.count > 0)).toBe(true);
    for (const cut of plan.cuts) {
      const used = cut.boxGrams + cut.looseGrams + cut.tradeGrams + cut.mincedGrams + cut.leftGrams;
      expect(cut.madeGrams, cut.name).toBe(used);
    }
  });

  test(
    'is explained a moment later: what is safe to promise, what limits each box, what more of a cut is worth',
    async () => {
      expect(plan).toMatchObject({ isExplained: false, promise: null });
      const later = await explained();
      expect(later.isExplained).toBe(true);
      expect(later.promise?.confidencePercent).toBeGreaterThanOrEqual(90);
      for (const box of later.boxes) expect(box.promised).toBeLessThanOrEqual(box.count);
      expect(later.cuts.every((cut) => cut.worthPencePerKg !== null && cut.worthPencePerKg >= 0)).toBe(true);
    },
    PATIENCE,
  );

  test(
    'with a way locked, keeps it and tells what the lock costs',
    async () => {
      const side = plan.sides[0];
      const choice = side?.choices.find((each) => each.ways.filter((way) => !way.closedReason).length > 1);
      const other = choice?.ways.find((way) => way.wayId !== choice.wayId && !way.closedReason);
      if (!side || !choice || !other) throw new Error('no side has two open ways');
      const place = { carcaseId: side.carcaseId, side: side.side, choiceId: choice.choiceId };
      await allocate([{ ...place, wayId: other.wayId }]);
      const locked = await explained();
      const kept = locked.sides[0]?.choices.find((each) => each.choiceId === choice.choiceId);
      expect(kept).toMatchObject({ wayId: other.wayId, isLocked: true });
      expect(kept?.lockCostPence).toBeGreaterThanOrEqual(0);
      // Both answers are proven within 0.01 %.
      expect(locked.contributionPence).toBeLessThanOrEqual(plan.contributionPence + plan.contributionPence / 5_000);
    },
    PATIENCE,
  );
});

describe('publishing an allocation', () => {
  test(
    'turns it into offers and refuses an older view of the figures',
    async () => {
      const stale = await publish({ id: plan.id, figuresVersion: plan.figuresVersion + 1 });
      expect(stale.status).toBe(409);
      expect(stale.body).toMatchObject({ code: 'STATE_CHANGED' });
      const published = (await publish(plan)).body as Allocation;
      expect(published.state).toBe('published');
      const offers = await world.db.select().from(offer).where(eq(offer.cuttingDayId, farm.day.id));
      const grill = offers.find((each) => each.boxKindId === farm.grillId);
      expect(grill?.offered).toBe(published.boxes.find((box) => box.boxKindId === farm.grillId)?.promised);
      const [day] = await world.db.select().from(cuttingDay).where(eq(cuttingDay.id, farm.day.id));
      expect(day?.state).toBe('open');
    },
    PATIENCE,
  );

  test('when boxes were sold meanwhile beyond what it has, refuses and leaves the offers alone', async () => {
    const isGrill = eq(offer.boxKindId, farm.grillId);
    const [before] = await world.db.select().from(offer).where(isGrill);
    const promised = before?.offered ?? 0;
    await world.db
      .update(offer)
      .set({ offered: promised + 5, sold: promised + 3 })
      .where(isGrill);
    const answer = await publish(plan);
    expect(answer.status).toBe(409);
    const figures = { taken: promised + 3, offered: promised };
    expect(answer.body).toMatchObject({ code: 'STATE_CHANGED', figures });
    const [after] = await world.db.select().from(offer).where(isGrill);
    expect(after).toMatchObject({ offered: promised + 5, sold: promised + 3 });
    await world.db.update(offer).set({ sold: 0, offered: promised }).where(isGrill);
  });

  test('after new weights, refuses: the answer rests on older figures', async () => {
    await world.db
      .update(cuttingDay)
      .set({ figuresVersion: plan.figuresVersion + 1 })
      .where(eq(cuttingDay.id, farm.day.id));
    const answer = await publish(plan);
    expect(answer.status).toBe(409);
    const seen = await world.request(owner).get(`/api/cutting-days/${farm.day.id}/allocation`);
    expect(seen.body).toMatchObject({ published: { id: plan.id, isOutOfDate: true } });
  });
});

test('the model of an allocation can be read by another solver', async () => {
  const file = await world.request(owner).get(`/api/allocations/${plan.id}/model.lp`);
  expect(file.headers['content-disposition']).toContain('allocation.lp');
  expect(file.text).toMatch(/Maximize[\s\S]+Subject To[\s\S]+End/i);
  const other = await world.request(owner).get(`/api/allocations/${plan.id}/model.mps`);
  expect(other.headers['content-disposition']).toContain('allocation.mps');
  expect(other.text).toMatch(/ROWS[\s\S]+COLUMNS[\s\S]+RHS[\s\S]+ENDATA/);
});
