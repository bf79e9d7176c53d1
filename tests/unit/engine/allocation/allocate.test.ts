import { afterAll, describe, expect, test } from 'vitest';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import { allocate } from '#shared/engine/allocation/allocate.ts';
import type { AllocationInput } from '#shared/engine/allocation/allocation-input.ts';
import type { AllocationPlan } from '#shared/engine/allocation/allocation-plan.ts';
import {
  makeAllocationInput,
  makeBoxVariant,
  makeChoice,
  makeCut,
  makeLine,
  makeSide,
} from '#tests/support/make-small-day.ts';

const solver = createSolver({ size: 1 });
afterAll(() => solver.stop());

function wayOf(plan: AllocationPlan, choiceId: string, side = 'carcase-1/left'): string | null | undefined {
  return plan.fates.find((fate) => fate.sideId === side && fate.choiceId === choiceId)?.wayId;
}

/** The best of every way of every choice and every number of boxes, counted by hand: grams go where they cost least. */
function bruteForce(input: AllocationInput, pricePence: number): number {
  const choices = input.sides.flatMap((side) => side.choices);
  const clearance = (cutId: string) =>
    (input.cuts.find(({ id }) => id === cutId)?.clearanceTenthPencePerKg ?? 0) / 10_000;
  const [box] = input.boxes;
  if (!box) throw new RangeError('one box is needed');
  const valueOf = (made: Map<string, number>, boxes: number): number => {
    let worth = [...made].reduce((sum, [cutId, grams]) => sum + grams * clearance(cutId), 0);
    let total = 0;
    const rooms: { grams: number; cost: number }[] = [];
    for (const line of box.lines) {
      const [cutId = ''] = line.cutIds;
      const least = line.minGrams * boxes;
      const there = made.get(cutId) ?? 0;
      if (there < least) return -Infinity;
      total += least;
      worth -= least * clearance(cutId);
      rooms.push({ grams: Math.min(there, line.maxGrams * boxes) - least, cost: clearance(cutId) });
    }
    let open = Math.max(0, box.guaranteedGrams * boxes - total);
    for (const { grams, cost } of rooms.sort((a, b) => a.cost - b.cost)) {
      const taken = Math.min(open, grams);
      worth -= taken * cost;
      open -= taken;
    }
    return open > 0 ? -Infinity : worth + boxes * (pricePence - box.packagingPence);
  };
  let best = -Infinity;
  const search = (index: number, made: Map<string, number>, cost: number): void => {
    const choice = choices[index];
    if (!choice) {
      for (let boxes = 0; boxes <= 100; boxes += 1) best = Math.max(best, valueOf(made, boxes) - cost);
      return;
    }
    for (const way of choice.ways) {
      const next = new Map(made);
      for (const { cutId, grams } of way.yields) next.set(cutId, (next.get(cutId) ?? 0) + grams);
      search(index + 1, next, cost + way.costPence);
    }
  };
  search(0, new Map(), 0);
  return best;
}

describe('allocating', () => {
  test.each([1, 2, 3, 4, 5, 6])('small case %i, reaches the best of all ways and box counts', async (seed) => {
    const vary = (base: number, step: number) => base + ((seed * step) % 7) * 300;
    const rib = () =>
      makeChoice(
        'rib',
        { bone: { roast: vary(8_000, 3) }, boned: { steak: vary(4_500, 5), roast: 1_500 } },
        { costs: { boned: 90 * seed } },
      );
    const chuck = () =>
      makeChoice('chuck', { diced: { dice: vary(9_000, 2), trim: 900 }, minced: { trim: vary(11_000, 4) } });
    const pricePence = 3_900 + 350 * seed;
    const input = makeAllocationInput({
      sides: [makeSide('c', 'left', [rib(), chuck()]), makeSide('c', 'right', [rib(), chuck()])],
      boxes: [
        makeBoxVariant(
          'box',
          [makeLine('stew', ['dice']), makeLine('roast', ['roast']), makeLine('mince', ['trim'], { minGrams: 300 })],
          {
            guaranteedGrams: 3_100,
            pricePence,
            steps: [{ boxes: 100, valuePence: pricePence }],
          },
        ),
      ],
      mince: null,
    });
    const plan = await allocate(input, solver, { gap: 0 });
    expect(plan.isProven).toBe(true);
    expect(plan.contributionPence + plan.wholePackPence).toBe(Math.round(bruteForce(input, pricePence)));
    expect(plan.wholePackPence).toBeGreaterThanOrEqual(-1);
  });

  test('every cut, is made and in stock as much as it is sold, minced and left', async () => {
    const plan = await allocate(
      makeAllocationInput({ stock: [{ cutId: 'dice', state: 'fresh', grams: 2_345 }] }),
      solver,
    );
    for (const cut of plan.cuts) {
      const out = cut.boxGrams + cut.looseGrams + cut.tradeGrams + cut.mincedGrams + cut.leftGrams;
      expect(out).toBe(cut.madeGrams + cut.stockGrams);
    }
    expect(plan.cuts.find(({ cutId }) => cutId === 'dice')?.stockGrams).toBe(2_345);
  });

  test('with dearer steak, bones the rib; with a lock, keeps it on the bone', async () => {
    const dear = makeAllocationInput({
      boxes: [],
      loose: [{ cutId: 'steak', floor: 0, priority: 2, steps: [{ packs: 50, tenthPencePerKg: 40_000 }] }],
    });
    expect(wayOf(await allocate(dear, solver), 'rib')).toBe('boned');
    const lock = { carcaseId: 'carcase-1', side: 'left', choiceId: 'rib', wayId: 'on-the-bone' } as const;
    const locked = await allocate({ ...dear, locks: [lock] }, solver);
    expect(wayOf(locked, 'rib')).toBe('on-the-bone');
    expect(wayOf(locked, 'rib', 'carcase-1/right')).toBe('boned');
  });

  test('locks that cannot stand, are refused by name', async () => {
    const lock = { carcaseId: 'carcase-1', side: 'left', choiceId: 'rib', wayId: 'on-the-bone' } as const;
    const input = makeAllocationInput({ locks: [lock, { ...lock, wayId: 'boned' }] });
    await expect(allocate(input, solver)).rejects.toMatchObject({ code: 'LOCK_CONFLICT' });
    const closed = makeChoice(
      'rib',
      { 'on-the-bone': { roast: 9_000 }, boned: { steak: 5_000 } },
      { closed: { 'on-the-bone': 'Over thirty months.' } },
    );
    const old = makeAllocationInput({ sides: [makeSide('carcase-1', 'left', [closed])], locks: [lock] });
    await expect(allocate(old, solver)).rejects.toMatchObject({ code: 'LOCK_CONFLICT', node: 'carcase-1/left/rib' });
    await expect(allocate({ ...old, locks: [{ ...lock, carcaseId: 'other' }] }, solver)).rejects.toMatchObject({
      code: 'LOCK_CONFLICT',
    });
  });

  test('a recipe that no box can meet, is refused with its figures', async () => {
    const lines = [makeLine('stew', ['dice']), makeLine('roast', ['roast'])];
    const input = makeAllocationInput({ boxes: [makeBoxVariant('box', lines, { guaranteedGrams: 9_000 })] });
    await expect(allocate(input, solver)).rejects.toMatchObject({
      code: 'RECIPE_INFEASIBLE',
      figures: { guaranteedGrams: 9_000, minGrams: 2_000, maxGrams: 4_000 },
    });
    const narrow = makeLine('stew', ['dice'], { minGrams: 1_000, maxGrams: 1_010 });
    const tight = makeAllocationInput({ boxes: [makeBoxVariant('box', [narrow], { guaranteedGrams: 1_000 })] });
    await expect(allocate(tight, solver)).rejects.toMatchObject({ code: 'RECIPE_INFEASIBLE' });
  });

  test('boxes sold beyond what the sides give, are short by priority, first class last', async () => {
    const variant = (id: string, priority: 1 | 2, floor: number) =>
      makeBoxVariant(id, [makeLine('stew', ['dice'])], { guaranteedGrams: 1_000, priority, floor, steps: [] });
    const input = makeAllocationInput({ boxes: [variant('first', 1, 20), variant('second', 2, 20)] });
    const plan = await allocate(input, solver);
    // 24 kg of dice: twenty first boxes of 1 kg, then four of the second.
    expect(plan.boxes.map(({ variantId, boxes, short }) => [variantId, boxes, short])).toEqual([
      ['first', 20, 0],
      ['second', 4, 16],
    ]);
    expect(plan.shortfalls).toEqual([
      { kind: 'box', id: 'second', name: 'second', priority: 2, short: 16, unit: 'boxes' },
    ]);
    expect(plan.lpText).toContain('shortfall_1');
    expect(plan.isProven).toBe(true);
  });

  test('mince, keeps its lean and is closed when the premises say so', async () => {
    const boxes = [
      makeBoxVariant('mince', [makeLine('mince', ['mince'])], { guaranteedGrams: 1_000, pricePence: 3_000 }),
    ];
    const cuts = [
      makeCut('fat-trim', { clearanceTenthPencePerKg: 1_000, leanPpht: 70_000 }),
      makeCut('lean-trim', { clearanceTenthPencePerKg: 4_000, leanPpht: 95_000 }),
      makeCut('mince', { kind: 'mince', clearanceTenthPencePerKg: 2_000 }),
    ];
    const sides = [makeSide('c', 'left', [makeChoice('chuck', { trim: { 'fat-trim': 10_000, 'lean-trim': 6_000 } })])];
    const mince = {
      closedReason: null,
      productCutId: 'mince',
      minLeanPpht: 85_000,
      costTenthPencePerKg: 500,
      allowedCutIds: ['fat-trim', 'lean-trim'],
    };
    const plan = await allocate(makeAllocationInput({ sides, cuts, boxes, mince }), solver);
    const minced = (cutId: string) => plan.cuts.find((cut) => cut.cutId === cutId)?.mincedGrams ?? 0;
    // Lean 85 %: two parts of the 70 % trim to three of the 95 %.
    expect([minced('lean-trim'), minced('fat-trim')]).toEqual([6_000, 4_000]);
    expect(plan.boxes[0]?.boxes).toBe(10);
    const shut = await allocate(
      makeAllocationInput({ sides, cuts, boxes, mince: { ...mince, closedReason: 'Too old.' } }),
      solver,
    );
    expect(shut.boxes[0]?.boxes).toBe(0);
  });

  test('frozen stock, goes only where a line takes frozen meat', async () => {
    const stock = [{ cutId: 'dice', state: 'frozen', grams: 3_000 } as const];
    const boxes = (state: 'fresh' | 'either') => [
      makeBoxVariant('stew', [makeLine('stew', ['dice'], { state })], {
        guaranteedGrams: 1_000,
        steps: [{ boxes: 50, valuePence: 4_500 }],
      }),
    ];
    await expect(allocate(makeAllocationInput({ stock, boxes: boxes('fresh') }), solver)).resolves.toMatchObject({
      boxes: [{ boxes: 24 }],
    });
    await expect(allocate(makeAllocationInput({ stock, boxes: boxes('either') }), solver)).resolves.toMatchObject({
      boxes: [{ boxes: 27 }],
    });
  });

  test('steps of falling value, are filled until the next is worth less than clearing the meat', async () => {
    const boxes = [
      makeBoxVariant('stew', [makeLine('stew', ['dice'])], {
        guaranteedGrams: 1_000,
        pricePence: 2_000,
        packagingPence: 100,
        floor: 2,
        steps: [
          { boxes: 3, valuePence: 600 },
          { boxes: 4, valuePence: 1_500 },
        ],
      }),
    ];
    const plan = await allocate(
      makeAllocationInput({
        boxes,
        sides: [makeSide('c', 'left', [makeChoice('chuck', { diced: { dice: 20_000 } })])],
      }),
      solver,
    );
    // 1 kg clears at 600p; the last step brings 600p less packaging.
    expect(plan.boxes[0]).toMatchObject({ boxes: 6, incomePence: 2 * 2_000 + 4 * 1_500 });
    expect(plan.money.packagingPence).toBe(600);
  });
});
