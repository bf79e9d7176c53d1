import { afterAll, expect, test } from 'vitest';
import { makeFillInstance } from '#scripts/bench/box-fill-instances.ts';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import type { BoxToFill, WeighedPack } from '#shared/engine/box-fill/box-fill-types.ts';
import { boundFill } from '#shared/engine/box-fill/bound-model.ts';
import { fillBoxes } from '#shared/engine/box-fill/fill-boxes.ts';
import { lowerBound } from '#shared/engine/box-fill/fill-bound.ts';
import { makeLine } from '#tests/support/make-small-day.ts';

const solver = createSolver({ size: 1 });
afterAll(() => solver.stop());

test('two recipes that share heavy packs, are bounded higher together than one by one, and no fill gives away less', async () => {
  const box = (id: string, guaranteedGrams: number): BoxToFill => ({
    id,
    recipe: {
      guaranteedGrams,
      lines: [makeLine('joint', ['joint'], { minPacks: 1, maxPacks: 1, minGrams: 1_000, state: 'either' })],
    },
    earlierGiveAwayGrams: 0,
  });
  const boxes = [box('a', 1_000), box('b', 1_100)];
  const packs = [1_150, 1_400].map((grams, index): WeighedPack => ({
    id: `p${index}`,
    cutId: 'joint',
    grams,
    state: 'fresh',
  }));
  expect(lowerBound(boxes, packs)).toBe(150 + 50);
  // Both packs must go: 2,550 g against 2,100 g.
  await expect(boundFill(boxes, packs, solver)).resolves.toBe(450);
  expect(fillBoxes({ boxes, packs, kept: [], seed: 1 }).giveAwayGrams).toBe(450);
});

test('on a made cutting day, stays at or below what the fill gives away', async () => {
  const input = makeFillInstance({ boxes: 12, seed: 9 });
  const fill = fillBoxes(input);
  expect(fill.unfilledBoxIds).toEqual([]);
  const bound = await boundFill(input.boxes, input.packs, solver);
  expect(bound).toBeGreaterThanOrEqual(fill.lowerBoundGrams);
  expect(bound).toBeLessThanOrEqual(fill.giveAwayGrams);
});
