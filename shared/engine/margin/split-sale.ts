import { apportion } from '#shared/engine/apportion.ts';
import type { Sale } from './share-carcases.ts';

/** Where some of a sale came from, and how heavily it counts. */
export type SalePart = { carcaseId: string | null; cutId: string | null; weight: number; grams: number };

/**
 * One sale as sales of what went into it: income and each cost are split by weight, grams stay those of the parts. Parts
 * of no weight at all count alike. Sums to the sale, to the penny; without parts it stays whole.
 */
export function splitSale(sale: Sale, parts: readonly SalePart[]): Sale[] {
  if (parts.length === 0) return [sale];
  const hasWeight = parts.some(({ weight }) => weight > 0);
  const weights = parts.map(({ weight }, at) => ({ id: String(at).padStart(6, '0'), weight: hasWeight ? weight : 1 }));
  const share = (pence: number) => [...apportion(pence, weights)].sort(([a], [b]) => (a < b ? -1 : 1));
  const income = share(sale.incomePence);
  const costs = Object.entries(sale.costs).map(([name, pence]) => [name, share(pence)] as const);
  return parts.map(({ carcaseId, cutId, grams }, at) => ({
    ...sale,
    ...{ carcaseId, cutId, grams },
    incomePence: income[at]?.[1] ?? 0,
    costs: Object.fromEntries(costs.map(([name, shares]) => [name, shares[at]?.[1] ?? 0])),
  }));
}
