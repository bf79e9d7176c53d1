import { afterAll, expect, test } from 'vitest';
import { makeAllocationInstance } from '#scripts/bench/allocation-instances.ts';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import { allocate } from '#shared/engine/allocation/allocate.ts';
import { refuseShortfall } from '#shared/engine/allocation/refuse-shortfall.ts';
import { makeAllocationInput, makeBoxVariant, makeLine } from '#tests/support/make-small-day.ts';

const solver = createSolver({ size: 1 });
afterAll(() => solver.stop());

test('a day without sides, is short of every box that is sold', async () => {
  const boxes = [makeBoxVariant('stew', [makeLine('stew', ['dice'])], { guaranteedGrams: 1_000, floor: 2 })];
  const plan = await allocate(makeAllocationInput({ sides: [], boxes }), solver);
  expect(plan.shortfalls).toMatchObject([{ kind: 'box', id: 'stew', short: 2 }]);
  expect(plan).toMatchObject({ contributionPence: 0, isProven: true, fates: [] });
});

test('a day that sells nothing, clears all it has', async () => {
  const plan = await allocate(makeAllocationInput({ boxes: [], mince: null }), solver);
  // By side: 9 kg of roast at 8 pounds, 12 kg of dice at 6 and 1 kg of trim at 4.
  expect(plan.money.clearancePence).toBe(2 * (7_200 + 7_200 + 400));
  expect(plan.contributionPence).toBe(plan.money.clearancePence);
});

test('packs sold loose, are short in whole packs when the cut runs out', async () => {
  const loose = [{ cutId: 'steak', floor: 90, priority: 2 as const, steps: [] }];
  const lock = { carcaseId: 'carcase-1', choiceId: 'rib', wayId: 'boned' };
  const locks = [
    { ...lock, side: 'left' as const },
    { ...lock, side: 'right' as const },
  ];
  const plan = await allocate(makeAllocationInput({ boxes: [], loose, locks }), solver);
  // 10 kg of steak in packs of 100 g to 1 kg make any number of packs up to a hundred.
  expect(plan.loose).toMatchObject([{ packs: 90, grams: 10_000, short: 0 }]);
  const more = [{ cutId: 'steak', floor: 130, priority: 2 as const, steps: [] }];
  const short = await allocate(makeAllocationInput({ boxes: [], loose: more, locks }), solver);
  expect(short.loose).toMatchObject([{ packs: 100, grams: 10_000, short: 30 }]);
  expect(short.shortfalls).toMatchObject([{ kind: 'loose', id: 'steak', short: 30, unit: 'packs' }]);
});

test('a cancelled question, ends without a plan', async () => {
  const cancel = new AbortController();
  const plan = allocate(makeAllocationInput(), solver, { signal: cancel.signal });
  cancel.abort(new Error('not wanted any more'));
  await expect(plan).rejects.toThrow('not wanted any more');
});

test('confirmed orders beyond the day, are still planned with the least shortfall, and are refused when published', async () => {
  const boxes = [
    makeBoxVariant('first', [makeLine('stew', ['dice'])], {
      guaranteedGrams: 1_000,
      floor: 20,
      steps: [],
      priority: 1,
    }),
    makeBoxVariant('second', [makeLine('stew', ['dice'])], {
      guaranteedGrams: 1_000,
      floor: 20,
      steps: [],
      priority: 3,
    }),
  ];
  const plan = await allocate(makeAllocationInput({ boxes }), solver);
  // 24 kg of dice make 24 boxes of a kilogram: the second is the one that goes without.
  expect(plan.shortfalls).toMatchObject([{ id: 'second', short: 16, unit: 'boxes' }]);
  expect(plan.isProven).toBe(true);
  expect(() => refuseShortfall(plan.shortfalls)).toThrow(
    expect.objectContaining({ code: 'CONFIRMED_EXCEEDS_STOCK', node: 'box/second' }),
  );
  expect(() => refuseShortfall([])).not.toThrow();
});

test('a day of two carcases that has sold far too much, names every order hit and keeps the first class whole', async () => {
  const day = makeAllocationInstance({ carcases: 2, seed: 2, boxes: 2, loose: 3, trade: 5 });
  const boxes = day.boxes.map((box, index) => ({ ...box, floor: index === 0 ? 60 : 2, priority: index === 0 ? 3 : 1 }));
  const plan = await allocate({ ...day, boxes: boxes as typeof day.boxes }, solver, { timeLimitSeconds: 60 });
  const hit = plan.shortfalls.filter(({ short }) => short > 0);
  expect(hit.map(({ id }) => id)).toContain(boxes[0]?.id);
  expect(hit.some(({ priority }) => priority === 1)).toBe(false);
  const [big] = plan.boxes.filter(({ variantId }) => variantId === boxes[0]?.id);
  expect((big?.boxes ?? 0) + (big?.short ?? 0)).toBe(60);
}, 180_000);
