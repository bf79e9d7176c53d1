import { expect, test } from 'vitest';
import { LpModel } from '#shared/engine/linear/lp-model.ts';
import { lpToMps } from '#shared/engine/linear/lp-to-mps.ts';

function lines(text: string): string[] {
  return text.split('\n').map((line) => line.trim());
}

test('a model that seeks the greatest, is written with its objective turned and every limit stated', () => {
  const model = new LpModel();
  model.addColumn('boxes', { cost: 3, kind: 'integer' });
  model.addColumn('way', { cost: -2, kind: 'binary' });
  model.addColumn('grams', { cost: 0.5, upper: 4.25 });
  model.addColumn('held', { lower: 2, upper: 2 });
  model.addRow(
    'room',
    [
      [2, 'boxes'],
      [-1, 'way'],
      [1.125, 'grams'],
    ],
    ['<=', 7.5],
  );
  model.addRow(
    'even',
    [
      [1, 'grams'],
      [-1, 'held'],
    ],
    ['=', 0],
  );
  const mps = lines(lpToMps(model.write({ title: 'A day' })));
  expect(mps).toContain('* A day');
  expect(mps).toEqual(expect.arrayContaining(['N value', 'L room', 'E even', 'boxes value -3', 'way value 2']));
  expect(mps).toEqual(expect.arrayContaining(['grams room 1.125', 'way room -1', 'held even -1', 'RIGHT room 7.5']));
  expect(mps).toEqual(
    expect.arrayContaining(['PL LIMIT boxes', 'UP LIMIT way 1', 'UP LIMIT grams 4.25', 'FX LIMIT held 2']),
  );
  const whole = mps.slice(mps.indexOf("WHOLE 'MARKER' 'INTORG'"), mps.indexOf("WHOLE_END 'MARKER' 'INTEND'"));
  expect(whole.some((line) => line.startsWith('boxes '))).toBe(true);
  expect(whole.some((line) => line.startsWith('grams '))).toBe(false);
});

test('a model that seeks the least, keeps its signs, and long rows are read over their lines', () => {
  const model = new LpModel();
  const columns = Array.from({ length: 60 }, (_, index) =>
    model.addColumn(`column_number_${index}`, { cost: 1 + index }),
  );
  model.addRow(
    'all',
    columns.map((column) => [1, column] as const),
    ['>=', 3],
  );
  const mps = lines(lpToMps(model.write({ sense: 'Minimize' })));
  expect(mps.filter((line) => line.endsWith(' all 1'))).toHaveLength(60);
  expect(mps).toContain('column_number_59 value 60');
  expect(mps).toContain('G all');
});
