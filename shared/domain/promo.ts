import { apportion } from '#shared/engine/apportion.ts';
import { scale } from '#shared/engine/rounding.ts';
import { SMALLEST_CHARGE_PENCE } from './money.ts';

/** A share of the goods in per cent, or an amount: one of the two. */
export type PromoWorth = { percent: number | null; amountPence: number | null };

/** What a code takes off the goods. Enough is left that a card can be charged at all. */
export function discountOf({ percent, amountPence }: PromoWorth, goodsPence: number): number {
  const wanted = percent === null ? (amountPence ?? 0) : scale(goodsPence, percent, 100);
  return Math.max(0, Math.min(wanted, goodsPence - SMALLEST_CHARGE_PENCE));
}

type Line = { offerId: string; quantity: number; unitPricePence: number };

/** Each line's share of a discount, in proportion to what it costs: a later weight refund counts from what was paid. */
export function shareDiscount<L extends Line>(
  lines: readonly L[],
  discountPence: number,
): (L & { discountPence: number })[] {
  const shares = lines.map((line) => ({ id: line.offerId, weight: line.quantity * line.unitPricePence }));
  const parts = discountPence > 0 ? apportion(discountPence, shares) : new Map<string, number>();
  return lines.map((line) => ({ ...line, discountPence: parts.get(line.offerId) ?? 0 }));
}

/** As people type it, `spring 10`, to how it is kept, `SPRING10`. */
export function normaliseCode(text: string): string {
  return text.replace(/[\s-]/g, '').toUpperCase();
}
