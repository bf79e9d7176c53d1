import { afterAll, expect, test } from 'vitest';
import { makeAllocationInstance } from '#scripts/bench/allocation-instances.ts';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import { allocate } from '#shared/engine/allocation/allocate.ts';
import type { PlanProgress } from '#shared/engine/allocation/plan-progress.ts';
import { makeAllocationInput, makeBoxVariant, makeLine } from '#tests/support/make-small-day.ts';

const solver = createSolver({ size: 1 });
afterAll(() => solver.stop());

const PATIENCE = 180_000;

test(
  'planning a day that is listened to, tells of its phases in order, and the answer is the same',
  async () => {
    const seen: PlanProgress[] = [];
    const input = makeAllocationInstance({ carcases: 1, seed: 3, boxes: 3, loose: 4, trade: 8 });
    const heard = await allocate(input, solver, { onProgress: (progress) => seen.push(progress) });
    const { milliseconds: _one, ...quiet } = await allocate(input, solver);
    expect(heard).toMatchObject(quiet);
    const phases = seen.map(({ phase }) => phase);
    expect(phases.indexOf('contribution')).toBe(0);
    expect(phases.at(-1)).toBe('packs');
    const times = seen.map(({ milliseconds }) => milliseconds);
    expect(times).toEqual([...times].sort((a, b) => a - b));
    for (const { best, bound, gap } of seen) {
      if (best !== null && bound !== null) expect(bound).toBeGreaterThanOrEqual(best - 1);
      if (gap !== null) expect(gap).toBeGreaterThanOrEqual(0);
    }
  },
  PATIENCE,
);

test('planning a day that sold too much, tells that it looks for the least shortfall', async () => {
  const seen: PlanProgress[] = [];
  const boxes = [
    makeBoxVariant('stew', [makeLine('stew', ['dice'])], { guaranteedGrams: 1_000, floor: 90, steps: [] }),
  ];
  await allocate(makeAllocationInput({ boxes }), solver, { onProgress: (progress) => seen.push(progress) });
  expect(seen.map(({ phase }) => phase)).toContain('shortfall');
});

test(
  'planning without the time for a proof, gives the best so far with its gap',
  async () => {
    const plan = await allocate(makeAllocationInstance({ carcases: 20, seed: 1 }), solver, {
      gap: 0,
      timeLimitSeconds: 5,
    });
    expect(plan.isProven).toBe(false);
    expect(plan.gap).toBeGreaterThan(0);
    expect(plan.contributionPence).toBeGreaterThan(0);
  },
  PATIENCE,
);

test('planning that is cancelled at work, rejects with the reason, and the solver answers the next question', async () => {
  const cancel = new AbortController();
  const plan = allocate(makeAllocationInstance({ carcases: 8, seed: 2 }), solver, {
    signal: cancel.signal,
    onProgress: () => cancel.abort(new Error('not wanted any more')),
  });
  await expect(plan).rejects.toThrow('not wanted any more');
  await expect(allocate(makeAllocationInput(), solver)).resolves.toMatchObject({ isProven: true });
});
