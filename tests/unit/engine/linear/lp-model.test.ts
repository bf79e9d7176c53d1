import { afterAll, expect, test } from 'vitest';
import { createSolver } from '#server/allocation/solver/solver-pool.ts';
import { LpModel } from '#shared/engine/linear/lp-model.ts';
import { Namer } from '#shared/engine/linear/namer.ts';

const solver = createSolver({ size: 1 });
afterAll(() => solver.stop());

function makeModel(): LpModel {
  const model = new LpModel();
  model.addColumn('boxes', { cost: 4_500, upper: 7, kind: 'integer' });
  model.addColumn('boned', { cost: -120, kind: 'binary' });
  model.addColumn('left', { cost: 400 });
  model.addRow(
    'supply',
    [
      [1.5, 'boxes'],
      [1, 'left'],
      [-5.25, 'boned'],
    ],
    ['=', 2.001],
  );
  return model;
}

test('writing a model, gives text that the solver reads back to the same optimum', async () => {
  const solution = await solver.solve(makeModel().write());
  // 2.001 kg and 5.25 kg of the boned way: four boxes of 1.5 kg, 1.251 kg left at 400.
  expect(solution.columns).toMatchObject({ boxes: 4, boned: 1 });
  expect(solution.objective).toBeCloseTo(4 * 4_500 - 120 + 1.251 * 400, 6);
});

test('relaxed, lets whole numbers be broken but keeps their bounds', async () => {
  const text = makeModel().write({ isRelaxed: true });
  expect(text).not.toMatch(/General|Binary/);
  const solution = await solver.solve(text);
  expect(solution.columns['boxes']).toBeCloseTo(7.251 / 1.5, 6);
});

test('a column named twice in a row, is one term; one that cancels is none', () => {
  const model = new LpModel();
  model.addColumn('x');
  model.addColumn('y');
  model.addRow(
    'twice',
    [
      [1, 'x'],
      [2, 'x'],
      [1, 'y'],
      [-1, 'y'],
    ],
    ['<=', 3],
  );
  expect(model.write()).toContain('twice: 3 x <= 3');
});

test('a row without columns, is left out when it holds and makes the model infeasible when it does not', async () => {
  const model = makeModel();
  model.addRow('holds', [], ['<=', 1]);
  expect(model.write()).not.toContain('holds');
  model.addRow('cannot', [], ['>=', 1]);
  await expect(solver.solve(model.write())).resolves.toMatchObject({ status: 'infeasible' });
});

test('two columns or rows of one name, are refused', () => {
  const model = makeModel();
  expect(() => model.addColumn('left')).toThrow(RangeError);
  expect(() => model.addRow('supply', [[1, 'left']], ['<=', 1])).toThrow(RangeError);
});

test('no line is longer than the readers of other solvers take', () => {
  const model = new LpModel();
  const terms = Array.from(
    { length: 300 },
    (_, index) => [1.25, model.addColumn(`a_long_name_of_column_${index}`)] as const,
  );
  model.addRow('long', terms, ['<=', 10]);
  for (const line of model.write().split('\n')) expect(line.length).toBeLessThanOrEqual(240);
});

test('naming ids, keeps plain short ones, numbers the others and never gives one name to two', () => {
  const namer = new Namer();
  const ids = ['fore-rib', 'b1', '018f6a2e-77aa-7c11-9f00-3b2c1d0e9f88', 'Rump', 'fore_rib', 'b2'];
  const names = ids.map((id) => namer.name('b', id));
  expect(names[0]).toBe('fore_rib');
  expect(new Set(names).size).toBe(ids.length);
  expect(ids.map((id) => namer.name('b', id))).toEqual(names);
  expect(namer.legend).toContain(`${names[2]} = ${ids[2]}`);
});
