import { refundForMissingGrams } from '#shared/domain/money.ts';
import { scale } from '#shared/engine/rounding.ts';
import { describeFill, type Job } from './fill-work.ts';

/** What one box or loose pack of an order weighs, and what that makes of the price that was paid. */
export type SettledItem = { name: string; grams: number; paidPence: number; pricePence: number };

/**
 * A loose pack costs its own weight at the rate at which it was sold, never more than was paid. A box keeps its price and
 * gives back what is missing of its guaranteed weight.
 */
export function settleJob(job: Job): SettledItem {
  const { item, grams } = describeFill(job);
  if (job.kind === 'trade') throw new Error('a butcher pays by invoice');
  const paidPence = job.pricePence;
  if (job.kind === 'box') {
    const { guaranteedGrams } = job.recipe;
    const missingGrams = Math.max(0, guaranteedGrams - grams);
    const refund =
      missingGrams > 0 ? refundForMissingGrams({ missingGrams, pricePence: paidPence, guaranteedGrams }) : 0;
    return { name: item, grams, paidPence, pricePence: paidPence - Math.min(paidPence, refund) };
  }
  const isFull = grams >= job.upperGrams;
  return { name: item, grams, paidPence, pricePence: isFull ? paidPence : scale(paidPence, grams, job.upperGrams) };
}

export function owedPence(items: readonly SettledItem[]): number {
  return items.reduce((sum, item) => sum + item.paidPence - item.pricePence, 0);
}
