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

/** Every choice its first open way, and as many boxes and packs as asked for. */
function planOf(boxes: readonly [everyday: number, grill: number], packs: number): AllocationPlan {
  return {
    fates: input.sides.flatMap((side) =>
      side.choices.map(({ choiceId, ways }) => ({
        sideId: side.id,
        carcaseId: side.carcaseId,
        side: side.side,
        choiceId,
        wayId: ways[0]?.wayId ?? null,
        soldPrimals: [],
      })),
    ),
    boxes: [
      { variantId: 'everyday', boxes: boxes[0] },
      { variantId: 'grill', boxes: boxes[1] },
    ],
    loose: [{ cutId: 'mince', packs, grams: packs * 475 }],
    trade: [],
  } as unknown as AllocationPlan;
}

// As much of everything as the estimates bear: a plan with nothing to spare.
beforeAll(async () => {
  const greedy = planOf([100, 20], 40);
  const spreads = both(WEIGHED_SPREAD);
  const most = await promiseOffers({ input, plan: greedy, spreads, confidence: 0.5, scenarios: 9, seed: 1 }, solver);
  const promised = new Map(most.boxes.map((box) => [box.variantId, box.promised]));
  plan = planOf([promised.get('everyday') ?? 0, promised.get('grill') ?? 0], most.loose[0]?.promised ?? 0);
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

describe('a plan of the allocation', () => {
  it('with every cut weighed can be promised whole', async () => {
    const allocated = await allocate(input, solver, { gap: 0.01 });
    const promise = await ask({ plan: allocated, spreads: both(WEIGHED_SPREAD), scenarios: 30 });
    expect(promise.boxes.length).toBeGreaterThan(0);
    for (const { planned, promised } of promise.boxes) expect(promised).toBe(planned);
  }, 120_000);
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
