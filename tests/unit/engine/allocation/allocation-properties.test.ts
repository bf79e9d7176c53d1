import * as fc from 'fast-check';
import { afterAll, expect, test } from 'vitest';
import { makeAllocationInstance } from '#scripts/bench/allocation-instances.ts';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import { allocate } from '#shared/engine/allocation/allocate.ts';
import type { AllocationInput } from '#shared/engine/allocation/allocation-input.ts';
import type { AllocationPlan } from '#shared/engine/allocation/allocation-plan.ts';

const solver = createSolver({ size: 1 });
afterAll(() => solver.stop());

/** Milliseconds: several whole plans, on a machine that may be busy. */
const PATIENCE = 180_000;

const instance = (seed: number, carcases = 1) =>
  makeAllocationInstance({ carcases, seed, boxes: 3, loose: 4, trade: 8 });

/** Optimum of the model in pence: the plan's contribution and what whole packs cost. */
function optimum(plan: AllocationPlan): number {
  return plan.contributionPence + plan.wholePackPence;
}

function withoutClock({ milliseconds: _milliseconds, ...plan }: AllocationPlan): Omit<AllocationPlan, 'milliseconds'> {
  return plan;
}

/** Every list in another order; what lies within a choice, a recipe and the steps too. */
function shuffle(input: AllocationInput, turn: number): AllocationInput {
  const mix = <Item>(items: readonly Item[]): Item[] => {
    const cut = items.length === 0 ? 0 : turn % items.length;
    return [...items.slice(cut), ...items.slice(0, cut)].reverse();
  };
  return {
    ...input,
    sides: mix(input.sides).map((side) => ({
      ...side,
      choices: mix(side.choices).map((choice) => ({
        ...choice,
        primals: mix(choice.primals),
        ways: mix(choice.ways).map((way) => ({ ...way, yields: mix(way.yields) })),
      })),
    })),
    cuts: mix(input.cuts),
    stock: mix(input.stock),
    boxes: mix(input.boxes).map((box) => ({
      ...box,
      steps: mix(box.steps),
      lines: mix(box.lines).map((line) => ({ ...line, cutIds: mix(line.cutIds) })),
    })),
    loose: mix(input.loose).map((demand) => ({ ...demand, steps: mix(demand.steps) })),
    trade: mix(input.trade),
    mince: input.mince && { ...input.mince, allowedCutIds: mix(input.mince.allowedCutIds) },
    locks: mix(input.locks),
  };
}

/** Every number in the plan, with the path to it. */
function numbers(value: unknown, path = ''): [string, number][] {
  if (typeof value === 'number') return [[path, value]];
  if (Array.isArray(value)) return value.flatMap((each, index) => numbers(each, `${path}/${index}`));
  if (value === null || typeof value !== 'object') return [];
  return Object.entries(value).flatMap(([key, each]) => numbers(each, `${path}/${key}`));
}

test(
  'the same day in any order, gives the same plan to the letter',
  async () => {
    const input = instance(21);
    const plan = withoutClock(await allocate(input, solver));
    await fc.assert(
      fc.asyncProperty(fc.integer({ min: 1, max: 1_000 }), async (turn) => {
        expect(withoutClock(await allocate(shuffle(input, turn), solver))).toEqual(plan);
      }),
      { seed: 5, numRuns: 3 },
    );
  },
  PATIENCE,
);

test(
  'grams and pence are safe whole numbers and never negative; each cut balances to the gram',
  async () => {
    await fc.assert(
      fc.asyncProperty(fc.integer({ min: 1, max: 10_000 }), async (seed) => {
        const input = instance(seed);
        const plan = await allocate(input, solver);
        for (const [path, number] of numbers(plan)) {
          if (path === '/gap') expect(number).toBeGreaterThanOrEqual(0);
          else expect(Number.isSafeInteger(number), `${path} is ${number}`).toBe(true);
          if (!['/contributionPence', '/wholePackPence'].includes(path)) expect(number, path).toBeGreaterThanOrEqual(0);
        }
        for (const cut of plan.cuts) {
          const out = cut.boxGrams + cut.looseGrams + cut.tradeGrams + cut.mincedGrams + cut.leftGrams;
          expect(out, cut.cutId).toBe(cut.madeGrams + cut.stockGrams);
        }
        const { money } = plan;
        const income = money.boxPence + money.loosePence + money.tradePence + money.clearancePence;
        expect(plan.contributionPence).toBe(
          income - money.packagingPence - money.packingPence - money.butcheryPence - money.mincingPence,
        );
        expect(plan.unfillable).toBeNull();
      }),
      { seed: 6, numRuns: 3 },
    );
  },
  PATIENCE,
);

test(
  'contents of the plan, hold the guarantee and the packs that each cut may have',
  async () => {
    const input = instance(33, 2);
    const plan = await allocate(input, solver);
    const cuts = new Map(input.cuts.map((cut) => [cut.id, cut]));
    expect(plan.boxes.some(({ boxes }) => boxes > 0)).toBe(true);
    for (const box of plan.boxes) {
      const grams = box.contents.reduce((sum, each) => sum + each.grams, 0);
      const recipe = input.boxes.find(({ id }) => id === box.variantId);
      expect(grams).toBeGreaterThanOrEqual((recipe?.guaranteedGrams ?? Infinity) * box.boxes);
      for (const { cutId, grams: packed, packs } of box.contents) {
        expect(packed).toBeGreaterThanOrEqual((cuts.get(cutId)?.minPackGrams ?? Infinity) * packs);
        expect(packed).toBeLessThanOrEqual((cuts.get(cutId)?.maxPackGrams ?? 0) * packs);
      }
    }
  },
  PATIENCE,
);

test(
  'more grams of any cut, never lower the optimum by more than the two gaps',
  async () => {
    const input = instance(44);
    const before = await allocate(input, solver);
    await fc.assert(
      fc.asyncProperty(fc.constantFrom(...input.cuts), fc.integer({ min: 1, max: 4_000 }), async (cut, grams) => {
        const stock = [...input.stock, { cutId: cut.id, state: 'fresh' as const, grams }];
        const after = await allocate({ ...input, stock }, solver);
        const slack = optimum(before) * (before.gap + after.gap) + 2;
        expect(optimum(after)).toBeGreaterThanOrEqual(optimum(before) - slack);
      }),
      { seed: 8, numRuns: 4 },
    );
  },
  PATIENCE,
);
