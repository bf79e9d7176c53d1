import { scale } from '#shared/engine/rounding.ts';
import type { CardFee } from './margin-types.ts';

export function cardFeeOf(pricePence: number, fee: CardFee): number {
  return pricePence > 0 ? scale(pricePence, fee.ratePpht, 100_000) + fee.fixedPence : 0;
}

/** The lowest price, in whole pence, that leaves at least `netPence` after the card fee. */
export function priceForNet(netPence: number, fee: CardFee): number {
  if (netPence <= 0) return 0;
  const after = (price: number) => price - cardFeeOf(price, fee);
  let price = Math.floor(((netPence + fee.fixedPence) * 100_000) / (100_000 - fee.ratePpht));
  while (after(price) >= netPence) price -= 1;
  while (after(price) < netPence) price += 1;
  return price;
}

/**
 * Box price at which the box neither earns nor loses: its joint-cost share, its packaging and its other direct costs are
 * just paid for after the card fee.
 */
export function breakEvenBoxPrice(box: { jointSharePence: number; directPence: number; fee: CardFee }): number {
  return priceForNet(box.jointSharePence + box.directPence, box.fee);
}

/**
 * Price of one kind of box below which selling the same carcases deadweight would have been better, everything else sold
 * as it is: the price at which their gain is nought. Null when none of this kind is sold.
 */
export function deadweightBoxPrice(kind: {
  pricePence: number;
  boxes: number;
  /** Gain of the carcases at the present price. */
  gainPence: number;
  fee: CardFee;
}): number | null {
  if (kind.boxes <= 0) return null;
  const netNow = kind.pricePence - cardFeeOf(kind.pricePence, kind.fee);
  return priceForNet(netNow - Math.floor(kind.gainPence / kind.boxes), kind.fee);
}
