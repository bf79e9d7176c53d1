import { afterAll, expect, test } from 'vitest';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import { LpModel, type Term } from '#shared/engine/linear/lp-model.ts';
import type { SolveProgress } from '#shared/engine/linear/solve.ts';

const solver = createSolver({ size: 1 });
afterAll(() => solver.stop());

/** Whole numbers below `most` from a seed. */
function numbers(seed: number): (most: number) => number {
  let state = seed;
  return (most) => {
    state = (state * 1_103_515_245 + 12_345) % 2_147_483_648;
    return Math.floor((state / 2_147_483_648) * most);
  };
}

/**
 * Two trades of like sides: each side is cut one of three ways, each way gives grams of three goods, and goods are wanted
 * in whole packs at falling value.
 */
function makeModel(seed: number, sides: number): { model: LpModel; sums: string[][] } {
  const next = numbers(seed);
  const model = new LpModel();
  const made: Term[][] = [[], [], []];
  const sums: string[][] = [[], [], []];
  for (let side = 0; side < sides; side += 1) {
    const ways = [0, 1, 2].map((way) => {
      const column = model.addColumn(`way${side}_${way}`, { cost: -next(20), kind: 'binary' });
      sums[way]?.push(column);
      for (const [good, terms] of made.entries()) terms.push([-(next(30) + (good === way ? 40 : 5)), column]);
      return column;
    });
    model.addRow(
      `fate${side}`,
      ways.map((column): Term => [1, column]),
      ['=', 1],
    );
  }
  for (const [good, terms] of made.entries()) {
    const packs = model.addColumn(`packs${good}`, { cost: 300 - 20 * good, upper: sides, kind: 'integer' });
    const left = model.addColumn(`left${good}`, { cost: 3 });
    model.addRow(`supply${good}`, [...terms, [67, packs], [1, left]], ['=', 0]);
    sums.push([packs]);
  }
  return { model, sums };
}

test.each([1, 2, 3, 4, 5, 6, 7, 8])(
  'searching the sums of model %i, finds the optimum that the plain search finds',
  async (seed) => {
    const { model, sums } = makeModel(seed, 4 + seed);
    const text = model.write();
    const plain = await solver.solve(text, { gap: 0 });
    // Whole packs are no sums of every second model: what is left of a node then goes to the plain search.
    const first = seed % 2 === 0 ? sums.slice(0, 3) : sums;
    const searched = await solver.solve(text, { gap: 0, sumsFirst: first });
    expect(searched.status).toBe('optimal');
    expect(searched.objective).toBeCloseTo(plain.objective, 6);
    for (const columns of sums) {
      const sum = columns.reduce((all, column) => all + (searched.columns[column] ?? 0), 0);
      expect(Math.abs(sum - Math.round(sum))).toBeLessThan(1e-6);
    }
  },
);

test('searching for the least, ends at the same least', async () => {
  const { model, sums } = makeModel(11, 6);
  const objective = sums.flat().map((column, index): Term => [1 + ((index * 7) % 5), column]);
  const more: Term[] = (sums[0] ?? []).map((column) => [1, column]);
  model.addRow('some', more, ['>=', 3]);
  const text = model.write({ sense: 'Minimize', objective });
  const plain = await solver.solve(text, { gap: 0 });
  const searched = await solver.solve(text, { gap: 0, sumsFirst: sums });
  expect(searched).toMatchObject({ status: 'optimal', hasAnswer: true });
  expect(searched.objective).toBeCloseTo(plain.objective, 6);
});

test('searching what the relaxed model cannot satisfy, or only the whole one, says infeasible', async () => {
  const { model, sums } = makeModel(12, 5);
  const ways = sums[0] ?? [];
  model.addRow('half', [...ways.map((column): Term => [2, column])], ['=', 3]);
  await expect(solver.solve(model.write(), { sumsFirst: sums })).resolves.toMatchObject({
    status: 'infeasible',
    hasAnswer: false,
    columns: {},
  });
  model.addRow('many', [...ways.map((column): Term => [1, column])], ['>=', 99]);
  await expect(solver.solve(model.write(), { sumsFirst: sums })).resolves.toMatchObject({ status: 'infeasible' });
});

test('a search that is stopped by its nodes, gives the best so far, its gap, and the same each time', async () => {
  const { model, sums } = makeModel(13, 40);
  const seen: SolveProgress[] = [];
  const ask = () =>
    solver.solve(model.write(), {
      gap: 0,
      nodeLimit: 20,
      sumsFirst: sums,
      onProgress: (progress) => seen.push(progress),
    });
  const [first, second] = [await ask(), await ask()];
  expect({ ...second, milliseconds: 0 }).toEqual({ ...first, milliseconds: 0 });
  const whole = await solver.solve(model.write(), { gap: 0.0001 });
  expect(first.objective).toBeLessThanOrEqual(whole.objective * (1 + 0.0002));
  expect(first.objective * (1 + first.gap)).toBeGreaterThanOrEqual(whole.objective * (1 - 1e-9));
  for (const { best, bound } of seen) if (best !== null) expect(bound).toBeGreaterThanOrEqual(best - 1e-6);
});
