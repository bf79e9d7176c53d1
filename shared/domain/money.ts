/** Price in pence of `grams` at a rate in tenths of a penny per kg; half away from zero, rounded here and nowhere else. */
export function priceForWeight(grams: number, tenthPencePerKg: number): number {
  const product = BigInt(grams) * BigInt(tenthPencePerKg);
  const half = product < 0n ? -5_000n : 5_000n;
  return Number((product + half) / 10_000n);
}

/** Refund for a box below its guarantee: missing grams x price / guarantee, rounded up in the buyer's favour. */
export function refundForMissingGrams(box: {
  missingGrams: number;
  pricePence: number;
  guaranteedGrams: number;
}): number {
  return Math.ceil((box.missingGrams * box.pricePence) / box.guaranteedGrams);
}

/** Unit price of a box in tenths of a penny per kg of its guaranteed weight. */
export function ratePerKg(pricePence: number, grams: number): number {
  return Math.round((pricePence * 10_000) / grams);
}

/** The payment company charges a card with no less than this; a smaller difference is let go and written down. */
export const SMALLEST_CHARGE_PENCE = 30;

/** What one of a line's boxes or packs was paid with, its part of a discount off; the copies sum to the line exactly. */
export function paidForCopy(
  line: { quantity: number; unitPricePence: number; discountPence: number },
  copy: number,
): number {
  const whole = line.quantity * line.unitPricePence - line.discountPence;
  return Math.floor(whole / line.quantity) + (copy <= whole % line.quantity ? 1 : 0);
}
