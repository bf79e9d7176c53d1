import { afterAll, expect, test } from 'vitest';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import { allocate } from '#shared/engine/allocation/allocate.ts';
import { costsOfLocks, limitsOfBoxes, worthOfCuts } from '#shared/engine/allocation/explain.ts';
import { makeAllocationInput, makeBoxVariant, makeChoice, makeLine, makeSide } from '#tests/support/make-small-day.ts';

const solver = createSolver({ size: 1 });
afterAll(() => solver.stop());

/** 20 kg of dice and 30 kg of roast; a box takes 1 kg of each and sells at 40 pounds. */
const input = makeAllocationInput({
  sides: [
    makeSide('c', 'left', [
      makeChoice('chuck', { diced: { dice: 20_000 } }),
      makeChoice('rib', { bone: { roast: 30_000 } }),
    ]),
  ],
  boxes: [
    makeBoxVariant(
      'pair',
      [makeLine('stew', ['dice'], { maxGrams: 1_050 }), makeLine('joint', ['roast'], { maxGrams: 1_050 })],
      {
        guaranteedGrams: 2_000,
        pricePence: 4_000,
        packagingPence: 0,
        steps: [{ boxes: 50, valuePence: 4_000 }],
      },
    ),
  ],
  mince: null,
});

test('a box, is limited by the line that lacks grams when one more is forced', async () => {
  const plan = await allocate(input, solver);
  expect(plan.boxes[0]?.boxes).toBe(20);
  const [limit] = await limitsOfBoxes(input, plan, { solver });
  expect(limit?.lines).toEqual([{ lineId: 'stew', name: 'stew', shortGrams: 1_000 }]);
});

test('a box that demand alone limits, names no line', async () => {
  const few = { ...input, boxes: input.boxes.map((box) => ({ ...box, steps: [{ boxes: 5, valuePence: 4_000 }] })) };
  const [limit] = await limitsOfBoxes(few, await allocate(few, solver), { solver });
  expect(limit?.lines).toEqual([]);
});

test('a kilogram of the scarce cut, is worth the box that it makes; of the other, what it clears at', async () => {
  const worths = await worthOfCuts(input, await allocate(input, solver), { solver });
  const worth = (cutId: string) => worths.find((each) => each.cutId === cutId)?.pencePerKg;
  // One more box: 4,000p, less the kilogram of roast that would have cleared at 800p.
  expect(worth('dice')).toBe(3_200);
  expect(worth('roast')).toBe(800);
});

test('the cost of a lock, is the optimum without it less the optimum with it, and names the free way', async () => {
  const rib = makeChoice('rib', { bone: { roast: 9_000 }, boned: { steak: 5_000 } });
  const lock = { carcaseId: 'c', side: 'left', choiceId: 'rib', wayId: 'boned' } as const;
  const locked = makeAllocationInput({ sides: [makeSide('c', 'left', [rib])], boxes: [], mince: null, locks: [lock] });
  // 9 kg of roast clear at 7,200p, 5 kg of steak at 6,000p.
  await expect(costsOfLocks(locked, { solver })).resolves.toEqual([{ ...lock, costPence: 1_200, freeWayId: 'bone' }]);
  await expect(costsOfLocks({ ...locked, locks: [] }, { solver })).resolves.toEqual([]);
});
