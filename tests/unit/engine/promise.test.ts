import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import { allocate } from '#shared/engine/allocation/allocate.ts';
import type { AllocationPlan } from '#shared/engine/allocation/allocation-plan.ts';
import { promiseOffers } from '#shared/engine/promise/promise.ts';
import type { PromiseInput } from '#shared/engine/promise/promise-types.ts';
import { defaultSpread, WEIGHED_SPREAD } from '#shared/engine/promise/spread.ts';
import { makeAllocationInput, makeBox } from '#tests/support/make-allocation-input.ts';

const solver = createSolver({ size: 1 });
const input = makeAllocationInput();
let plan: AllocationPlan;

beforeAll(async () => {
  plan = await allocate(input, solver, { gap: 0.01 });
}, 120_000);
afterAll(() => solver.stop());

const both = <T>(value: T) => ({ one: value, two: value });

function ask(more: Partial<PromiseInput> = {}) {
  const asked = { input, plan, spreads: both(defaultSpread('estimated')), confidence: 0.9, scenarios: 200, seed: 7 };
  return promiseOffers({ ...asked, ...more }, solver);
}

const total = (promise: Awaited<ReturnType<typeof ask>>) =>
  promise.boxes.reduce((sum, { promised }) => sum + promised, 0);

describe('what may be put on sale before weights are known', () => {
  it('once every cut is weighed, promises the whole plan with certainty', async () => {
    const promise = await ask({ spreads: both(WEIGHED_SPREAD) });
    expect(promise.boxes.map(({ promised }) => promised)).toEqual(promise.boxes.map(({ planned }) => planned));
    expect(promise).toMatchObject({ jointConfidence: 1, safeSharePpht: 100_000, isFloorAtRisk: false });
  });

  it('on live weights, promises less than the plan, within the confidence asked for', async () => {
    const promise = await ask();
    expect(total(promise)).toBeGreaterThan(0);
    expect(promise.safeSharePpht).toBeLessThan(100_000);
    for (const box of promise.boxes) expect(box.promised).toBeLessThanOrEqual(box.planned);
    expect(promise.jointConfidence).toBeGreaterThanOrEqual(0.9);
  });

  it('when the kill sheet arrives, promises at least as many', async () => {
    const [live, killed] = [await ask(), await ask({ spreads: both(defaultSpread('weighed')) })];
    expect(total(killed)).toBeGreaterThanOrEqual(total(live));
    expect(killed.safeSharePpht).toBeGreaterThan(live.safeSharePpht);
  });

  it('with more confidence asked for, promises no more', async () => {
    const [bold, careful] = [await ask({ confidence: 0.7 }), await ask({ confidence: 0.97 })];
    expect(careful.safeSharePpht).toBeLessThan(bold.safeSharePpht);
    expect(total(careful)).toBeLessThanOrEqual(total(bold));
  });

  it('with the same seed gives the same promise; in another order of sides, too', async () => {
    const turned = { ...input, sides: [...input.sides].reverse(), boxes: [...input.boxes].reverse() };
    const [one, again, other] = [await ask(), await ask(), await ask({ input: turned })];
    expect(again).toEqual(one);
    expect(other).toEqual(one);
  });

  it('raises single offers beyond the common share while all can still be filled together', async () => {
    const promise = await ask();
    const share = promise.safeSharePpht / 100_000;
    const offers = [...promise.boxes, ...promise.loose];
    for (const { promised, planned } of offers) {
      expect(promised).toBeGreaterThanOrEqual(Math.floor(share * planned));
    }
    expect(offers.some(({ promised, planned }) => promised > Math.floor(share * planned))).toBe(true);
  });
});

describe('what is sold and held', () => {
  it('is never undercut', async () => {
    const everyday = plan.boxes.find(({ variantId }) => variantId === 'everyday');
    const floor = (everyday?.boxes ?? 0) - 1;
    const boxes = input.boxes.map((box) => (box.id === 'everyday' ? { ...box, floor } : box));
    const promise = await ask({ input: { ...input, boxes } });
    expect(promise.boxes.find(({ variantId }) => variantId === 'everyday')?.promised).toBeGreaterThanOrEqual(floor);
  });

  it('when it is itself not safe, says how often and by how much, and promises nothing more', async () => {
    const floor = 60;
    const boxes = [makeBox({ id: 'everyday', floor })];
    const promise = await ask({ input: { ...input, boxes, loose: [] } });
    expect(promise.isFloorAtRisk).toBe(true);
    expect(promise.boxes).toEqual([expect.objectContaining({ variantId: 'everyday', promised: floor })]);
    const { floorShortfall } = promise;
    expect(floorShortfall?.shareOfScenarios).toBeGreaterThan(0.1);
    expect(floorShortfall?.meanShortGrams).toBeGreaterThan(0);
    expect(floorShortfall?.worstShortGrams).toBeGreaterThanOrEqual(floorShortfall?.meanShortGrams ?? 0);
    expect(promise.jointConfidence).toBeCloseTo(1 - (floorShortfall?.shareOfScenarios ?? 0), 10);
  });
});
