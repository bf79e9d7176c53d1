import { priceForWeight } from '#shared/domain/money.ts';
import { apportion } from '#shared/engine/apportion.ts';
import { cardFeeOf } from './break-even.ts';
import type { CardFee, DirectCosts } from './margin-types.ts';
import type { Sale } from './share-carcases.ts';
import { splitSale, type SalePart } from './split-sale.ts';

/** One line of what was sold, with what it costs after the cut and where its beef comes from. */
export type SoldItem = {
  channel: string;
  boxKindId: string | null;
  /** What it was sold for, before what went back. */
  pricePence: number;
  costs: Partial<DirectCosts>;
  parts: readonly SalePart[];
};

/** An order as its money stands: what was paid in one or more payments, and what went back. */
export type PaidOrder = {
  /** What was or will be paid for the goods, carriage left out. */
  goodsPence: number;
  /** Paid for the carriage. */
  carriagePence: number;
  /** Each payment by card. */
  payments: readonly number[];
  refundsPence: number;
  items: readonly SoldItem[];
};

/**
 * Orders as sales. What was paid is shared over an order's items by their prices, and so are refunds and the card fees of
 * its payments; each item then over its packs by what they would bring loose. Carriage stands as a channel of its own. To
 * the penny: income adds up to what was paid, refunds to what went back.
 */
export function soldSales(orders: readonly PaidOrder[], fee: CardFee): Sale[] {
  return orders.flatMap(({ goodsPence, carriagePence, payments, refundsPence, items }) => {
    const weights = items.map(({ pricePence }, at) => ({ id: String(at).padStart(4, '0'), weight: pricePence }));
    const isPriced = weights.some(({ weight }) => weight > 0);
    const share = (pence: number) =>
      isPriced ? [...apportion(pence, weights)].sort(([a], [b]) => (a < b ? -1 : 1)).map(([, part]) => part) : [];
    const income = share(goodsPence);
    const refunds = share(refundsPence);
    const fees = share(payments.reduce((sum, paid) => sum + cardFeeOf(paid, fee), 0));
    const goods = items.flatMap(({ channel, boxKindId, costs, parts }, at) =>
      splitSale(
        {
          ...{ channel, boxKindId, carcaseId: null, cutId: null },
          incomePence: income[at] ?? 0,
          grams: 0,
          costs: { ...costs, refundsPence: refunds[at] ?? 0, cardFeesPence: fees[at] ?? 0 },
        },
        parts,
      ),
    );
    return carriagePence > 0 ? [...goods, carriage(carriagePence)] : goods;
  });
}

function carriage(incomePence: number): Sale {
  const nobody = { carcaseId: null, boxKindId: null, cutId: null };
  return { ...nobody, channel: 'delivery', incomePence, grams: 0, costs: {} };
}

/** Packs as parts of a sale, weighed by what they would bring loose. */
export function partsOfPacks(
  packs: readonly { carcaseId: string | null; cutId: string; grams: number }[],
  rateOf: (cutId: string) => number,
): SalePart[] {
  return packs.map(({ carcaseId, cutId, grams }) => ({
    ...{ carcaseId, cutId, grams },
    weight: priceForWeight(grams, rateOf(cutId)),
  }));
}
