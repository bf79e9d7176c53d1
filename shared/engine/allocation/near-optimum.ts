import type { Row } from '#shared/engine/linear/lp-model.ts';
import type { Solution } from '#shared/engine/linear/solve.ts';
import type { AllocationModel } from './allocation-model.ts';

/** From so many whole-number columns on, an answer near the relaxed optimum is sought before the whole search. */
const LARGE = 400;
const TOLERANCE = 1e-6;

export function isLarge({ lp }: AllocationModel): boolean {
  return lp.size.integers >= LARGE;
}

/** The yes-or-no columns of each side. */
function columnsBySide(model: AllocationModel): Map<string, string[]> {
  const bySide = new Map<string, string[]>();
  for (const { side, column } of [...model.ways, ...model.units]) {
    const columns = bySide.get(side.id);
    if (columns) columns.push(column);
    else bySide.set(side.id, [column]);
  }
  return bySide;
}

function isWhole(value: number): boolean {
  return Math.abs(value - Math.round(value)) < TOLERANCE;
}

function hold(column: string, value: number): Row {
  return { name: `near_${column}`, terms: [[1, column]], sense: '=', right: Math.round(value) };
}

/**
 * Rows that keep every way and unit sale which the relaxed optimum answers with yes or no. `around` frees all of a side
 * where one of its ways is undecided: a wider search for less to decide.
 */
export function nearRows(model: AllocationModel, relaxed: Solution, around: 'column' | 'side'): Row[] {
  const value = (column: string) => relaxed.columns[column] ?? 0;
  return [...columnsBySide(model).values()].flatMap((columns) => {
    const decided = columns.filter((column) => isWhole(value(column)));
    if (around === 'side' && decided.length < columns.length) return [];
    return decided.map((column) => hold(column, value(column)));
  });
}

/** How far an answer can be from the best there is, given that no answer is above `bound`. */
export function gapBelow(bound: number, solution: Solution): number {
  return Math.max(0, bound - solution.objective) / Math.max(1, Math.abs(solution.objective));
}
