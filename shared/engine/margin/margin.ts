import { divideHalfAway } from '#shared/engine/rounding.ts';
import type { DirectCosts, Margin, MarginDimension, MarginEntry } from './margin-types.ts';

export type MarginInput = {
  incomePence: number;
  costs: Partial<DirectCosts>;
  /** Net deadweight value of the same beef. */
  deadweightPence: number;
  /** Cold deadweight behind it. */
  coldGrams: number;
};

export function totalCosts(costs: Partial<DirectCosts>): number {
  return Object.values(costs).reduce((sum, pence) => sum + pence, 0);
}

/** Pence over grams as tenths of a penny per kg; 0 where there is no weight to divide by. */
export function perKg(pence: number, grams: number): number {
  return grams > 0 ? divideHalfAway(BigInt(pence) * 10_000n, BigInt(grams)) : 0;
}

/**
 * Contribution is income less direct costs; gain is contribution less what the same beef would have brought deadweight.
 * Each rate is rounded once from its own pence, so that the three may differ in their last tenth. Joint costs stay out.
 */
export function marginOf({ incomePence, costs, deadweightPence, coldGrams }: MarginInput): Margin {
  const costPence = totalCosts(costs);
  const contributionPence = incomePence - costPence;
  const gainPence = contributionPence - deadweightPence;
  return {
    incomePence,
    costPence,
    contributionPence,
    deadweightPence,
    gainPence,
    contributionPerKg: perKg(contributionPence, coldGrams),
    deadweightPerKg: perKg(deadweightPence, coldGrams),
    gainPerKg: perKg(gainPence, coldGrams),
  };
}

/**
 * Margins of a ledger of sales by carcase, cutting day, channel, box or cut, in the order of their ids. Entries that do
 * not name the dimension stand under `null`, last, so that every list adds up to the whole.
 */
export function marginsBy(
  entries: readonly MarginEntry[],
  dimension: MarginDimension,
): { id: string | null; margin: Margin }[] {
  const groups = new Map<string | null, MarginEntry[]>();
  for (const entry of entries) groups.set(entry[dimension], [...(groups.get(entry[dimension]) ?? []), entry]);
  return [...groups]
    .sort(([a], [b]) => (a === b ? 0 : a === null ? 1 : b === null ? -1 : a < b ? -1 : 1))
    .map(([id, group]) => ({ id, margin: marginOf(sumEntries(group)) }));
}

export function sumEntries(entries: readonly MarginEntry[]): MarginInput {
  const costs: Record<string, number> = {};
  const sum = { incomePence: 0, deadweightPence: 0, coldGrams: 0 };
  for (const entry of entries) {
    sum.incomePence += entry.incomePence;
    sum.deadweightPence += entry.deadweightPence;
    sum.coldGrams += entry.coldGrams;
    for (const [name, pence] of Object.entries(entry.costs)) costs[name] = (costs[name] ?? 0) + pence;
  }
  return { ...sum, costs };
}
