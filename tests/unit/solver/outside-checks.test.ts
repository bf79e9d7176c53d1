import { afterAll, describe, expect, test } from 'vitest';
import { makeAllocationInstance } from '#scripts/bench/allocation-instances.ts';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import { allocate } from '#shared/engine/allocation/allocate.ts';
import { lpToMps } from '#shared/engine/linear/lp-to-mps.ts';
import { LpModel, type Term } from '#shared/engine/linear/lp-model.ts';
import { solveWithCbc, solveWithGlpk } from '#tests/support/other-solvers.ts';

const solver = createSolver({ size: 1 });
afterAll(() => solver.stop());

/** Milliseconds for one day and its second solver, on a machine that may be busy. */
const PATIENCE = 180_000;

/** Widths in millimetres and rolls wanted. */
const ORDERS: readonly (readonly [width: number, rolls: number])[] = [
  [1_380, 22],
  [1_520, 25],
  [1_560, 12],
  [1_710, 14],
  [1_820, 18],
  [1_880, 18],
  [1_930, 20],
  [2_000, 10],
  [2_050, 12],
  [2_100, 14],
  [2_140, 16],
  [2_150, 18],
  [2_200, 20],
];
const MASTER_WIDTH = 5_600;

/** Every pattern of at most one master roll that leaves no room for another of the widths. */
function patterns(from = 0, room = MASTER_WIDTH): number[][] {
  const fitting = ORDERS.slice(from).flatMap(([width], index) =>
    width <= room ? patterns(from + index, room - width).map((rest) => [from + index, ...rest]) : [],
  );
  return fitting.length > 0 ? fitting : [[]];
}

describe('the solver against the outside', () => {
  /**
   * Cutting stock: the worked example of the encyclopaedia article 'Cutting stock problem' (English Wikipedia), text seen
   * at graphsearch.epfl.ch/en/concept/826868: 13 widths from 5,600 mm, optimum 73 master rolls, 0.401 % waste.
   */
  test('the published cutting-stock example, is solved to its known optimum of 73 rolls', async () => {
    const isMaximal = (pattern: readonly number[]) => {
      const used = pattern.reduce((sum, index) => sum + (ORDERS[index]?.[0] ?? 0), 0);
      return MASTER_WIDTH - used < 1_380;
    };
    const cuts = patterns().filter(isMaximal);
    const model = new LpModel();
    const columns = cuts.map((_, index) => model.addColumn(`pattern${index}`, { cost: 1, kind: 'integer' }));
    for (const [order, [, rolls]] of ORDERS.entries()) {
      const terms = cuts.map((pattern, index): Term => [
        pattern.filter((each) => each === order).length,
        columns[index] ?? '',
      ]);
      model.addRow(`order${order}`, terms, ['>=', rolls]);
    }
    const solution = await solver.solve(model.write({ sense: 'Minimize' }), { gap: 0 });
    expect(solution.status).toBe('optimal');
    expect(Math.round(solution.objective)).toBe(73);
    const wanted = ORDERS.reduce((sum, [width, rolls]) => sum + width * rolls, 0);
    expect(wanted).toBe(407_160);
    expect(1 - wanted / (73 * MASTER_WIDTH)).toBeCloseTo(0.00401, 4);
  });

  /** Twenty seeded cutting days; the exported file is read by solvers of other houses. */
  const days = Array.from({ length: 20 }, (_, index) => ({
    seed: 100 + index,
    carcases: [1, 1, 2, 1, 4, 1, 2, 1, 8, 2][index % 10] ?? 1,
  }));

  test.each(days)(
    'the optimum of day $seed with $carcases carcases, is confirmed by CBC',
    async ({ seed, carcases }) => {
      const input = makeAllocationInstance({ carcases, seed, boxes: 2, loose: 3, trade: 5 });
      const plan = await allocate(input, solver);
      const optimum = plan.contributionPence + plan.wholePackPence;
      const other = await solveWithCbc({ lp: plan.lpText }, { gap: 0.0001, seconds: 50 });
      expect(other.isProven).toBe(true);
      expect(Math.abs(other.objective - optimum)).toBeLessThanOrEqual(optimum * 0.0002 + 1);
    },
    PATIENCE,
  );

  test.each(days.filter(({ carcases }) => carcases === 1).slice(0, 4))(
    'the optimum of day $seed, is confirmed by GLPK',
    async ({ seed, carcases }) => {
      const input = makeAllocationInstance({ carcases, seed, boxes: 1, loose: 2, trade: 4 });
      const plan = await allocate(input, solver);
      const optimum = plan.contributionPence + plan.wholePackPence;
      const other = await solveWithGlpk({ lp: plan.lpText }, { gap: 0.0001, seconds: 50 });
      expect(other.isProven).toBe(true);
      expect(Math.abs(other.objective - optimum)).toBeLessThanOrEqual(optimum * 0.0002 + 1);
    },
    PATIENCE,
  );

  test.each(days.filter(({ carcases }) => carcases === 1).slice(0, 3))(
    'the optimum of day $seed, is the same from the MPS file under CBC and GLPK',
    async ({ seed, carcases }) => {
      const input = makeAllocationInstance({ carcases, seed, boxes: 1, loose: 2, trade: 4 });
      const plan = await allocate(input, solver);
      const optimum = plan.contributionPence + plan.wholePackPence;
      for (const solveElsewhere of [solveWithCbc, solveWithGlpk]) {
        const other = await solveElsewhere({ mps: lpToMps(plan.lpText) }, { gap: 0.0001, seconds: 50 });
        expect(other.isProven).toBe(true);
        expect(Math.abs(other.objective - optimum)).toBeLessThanOrEqual(optimum * 0.0002 + 1);
      }
    },
    PATIENCE,
  );
});
