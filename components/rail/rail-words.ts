import { formatWeight } from '#shared/domain/words.ts';
import type { RailColumn } from './rail-geometry.ts';

/** `sales`: what is sold, held and free. `takes`: what some boxes or an order take of a side. */
export type RailMode = 'sales' | 'takes';

export const railWords = {
  sales: { sold: 'sold', held: 'held', rest: 'free' },
  takes: { sold: 'taken', held: 'held', rest: 'left' },
} as const satisfies Record<RailMode, Record<'sold' | 'held' | 'rest', string>>;

/** `8.2 kg sold, 1.2 kg held, 3.0 kg free`; parts of no weight are left out. */
export function describeFill(column: RailColumn, mode: RailMode): string {
  const words = railWords[mode];
  const parts = [
    [column.soldGrams, words.sold],
    [column.heldGrams, words.held],
    [column.freeGrams, words.rest],
  ] as const;
  return parts
    .filter(([grams]) => grams > 0)
    .map(([grams, word]) => `${formatWeight(grams)} ${word}`)
    .join(', ');
}

/** The whole of a primal in one breath: name, weight, fill. */
export function describePrimal(column: RailColumn, mode: RailMode): string {
  return `${column.primal.name}, ${formatWeight(column.primal.grams)}: ${describeFill(column, mode)}`;
}
