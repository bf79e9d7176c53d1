import { afterAll, expect, test } from 'vitest';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import type { SolveProgress } from '#shared/engine/linear/solve.ts';

const solver = createSolver();
afterAll(() => solver.stop());

const SMALL = `Maximize
 value: 3 x + 2 y + 0.5 z
Subject To
 room: 2 x + y <= 7.5
 work: x + 3 y + z <= 9
Bounds
 z <= 4
General
 x y
End
`;
/** A market split instance: tiny, and far beyond any solver within a second. */
const HARD = marketSplit(4, 36);

function marketSplit(rows: number, columns: number): string {
  let state = 7;
  const next = () => (state = (state * 1103515245 + 12345) % 2147483648) % 100;
  const lines = Array.from({ length: rows }, (_, row) => {
    const weights = Array.from({ length: columns }, next);
    const half = Math.floor(weights.reduce((sum, weight) => sum + weight, 0) / 2);
    const terms = weights.map((weight, column) => `${weight} x${column}`).join(' + ');
    return ` split${row}: ${terms} + over${row} - under${row} = ${half}`;
  });
  const slacks = Array.from({ length: rows }, (_, row) => `over${row} + under${row}`).join(' + ');
  const names = Array.from({ length: columns }, (_, column) => `x${column}`).join(' ');
  return `Minimize\n miss: ${slacks}\nSubject To\n${lines.join('\n')}\nBinary\n ${names}\nEnd\n`;
}

test('solving a small model, gives its optimum by column name', async () => {
  const solution = await solver.solve(SMALL);
  expect(solution).toMatchObject({ status: 'optimal', hasAnswer: true, gap: 0, columns: { x: 3, y: 1, z: 3 } });
  expect(solution.objective).toBeCloseTo(12.5, 9);
});

test('solving a model that nothing satisfies, says infeasible and gives no answer', async () => {
  const solution = await solver.solve(SMALL.replace('2 x + y <= 7.5', 'x >= 90'));
  expect(solution).toMatchObject({ status: 'infeasible', hasAnswer: false, columns: {} });
});

test('solving text that is no model or has no best answer, is refused', async () => {
  await expect(solver.solve('no model')).rejects.toMatchObject({ code: 'SOLVER_FAILED' });
  const endless = 'Maximize\n value: x\nSubject To\n row: x - y <= 1\nEnd\n';
  await expect(solver.solve(endless)).rejects.toMatchObject({ code: 'SOLVER_FAILED' });
});

test('solving variations, starts each from the model as written', async () => {
  const linear = SMALL.replace(/General[^]*End/, 'End');
  const narrow = [{ row: 'room', lower: -Infinity, upper: 5 }];
  const answers = await solver.solveVariations(linear, [[], narrow, []]);
  expect(answers.map(({ objective }) => objective)).toEqual([13.5, 10, 13.5]);
});

test('a time limit, ends with the best answer so far, its gap and progress on the way', async () => {
  const seen: SolveProgress[] = [];
  const solution = await solver.solve(HARD, {
    gap: 0,
    timeLimitSeconds: 1,
    onProgress: (progress) => seen.push(progress),
  });
  expect(solution).toMatchObject({ status: 'limit', hasAnswer: true });
  expect(solution.gap).toBeGreaterThan(0);
  expect(seen.length).toBeGreaterThan(0);
  expect(solution.milliseconds).toBeLessThan(3_000);
});

test('a node limit, gives the same answer each time', async () => {
  const [first, second] = await Promise.all([1, 2].map(() => solver.solve(HARD, { gap: 0, nodeLimit: 5 })));
  expect({ ...second, milliseconds: 0 }).toEqual({ ...first, milliseconds: 0 });
});

test('beginning from a known answer, never ends below it', async () => {
  const solution = await solver.solve(SMALL, { start: { x: 3, y: 1, z: 3 }, nodeLimit: 0 });
  expect(solution.objective).toBeGreaterThanOrEqual(12.5 - 1e-9);
});

test('cancelling, ends at once whether running or waiting, and the solver goes on answering', async () => {
  const own = createSolver({ size: 1 });
  const cancel = new AbortController();
  const running = own.solve(HARD, { gap: 0, signal: cancel.signal });
  const waiting = own.solve(SMALL, { signal: cancel.signal });
  const after = own.solve(SMALL);
  const outcomes = Promise.allSettled([running, waiting]);
  cancel.abort(new Error('not wanted any more'));
  for (const outcome of await outcomes) {
    expect(outcome).toMatchObject({ status: 'rejected', reason: { message: 'not wanted any more' } });
  }
  await expect(after).resolves.toMatchObject({ status: 'optimal' });
  await expect(own.solve(SMALL, { signal: cancel.signal })).rejects.toThrow('not wanted any more');
  await own.stop();
});

test('stopping, refuses what is open and what comes later', async () => {
  const own = createSolver({ size: 1 });
  const open = Promise.allSettled([own.solve(HARD, { gap: 0 }), own.solve(SMALL)]);
  await own.stop();
  for (const outcome of await open) expect(outcome).toMatchObject({ reason: { code: 'SOLVER_FAILED' } });
  await expect(own.solve(SMALL)).rejects.toMatchObject({ code: 'SOLVER_FAILED' });
});
