import type { HitOrder, ShortProduct } from '#shared/contracts/shortfalls.ts';
import { scale } from '#shared/engine/rounding.ts';
import type { Db, Tx } from '#server/deps.ts';
import { listSwapRows, type SwapRow } from '#server/orders/order-line-queries.ts';
import { findLatestAllocation, listOffers, type AllocationRow, type OfferRow } from './allocation-queries.ts';
import { listLinesOfOffer, listWorkingDays, type HitLine } from './shortfall-queries.ts';

/** What one product of a plan makes. */
type Made = { productKey: string; name: string; unit: ShortProduct['unit']; count: number };

/**
 * What is sold or held beyond what the newest plan of its day makes. Only plans on the day's present weights count: an
 * older one is worked out again first. The orders that came last are hit first.
 */
export async function findShortfalls(db: Db | Tx): Promise<ShortProduct[]> {
  const found: ShortProduct[] = [];
  for (const day of await listWorkingDays(db)) {
    const plan = await findLatestAllocation(db, day.id);
    if (!plan || plan.figuresVersion !== day.figuresVersion) continue;
    const made = madeBy(plan);
    const offers = await listOffers(db, day.id);
    const short = offers.filter((offer) => takenOf(offer) > (made.get(offer.productKey)?.count ?? 0));
    const boxRows = await listSwapRows(db, day.id);
    const spare = spareBoxes(boxRows, { made, offers });
    for (const offer of short.filter(({ kind }) => kind === 'box' || kind === 'loose')) {
      const product = made.get(offer.productKey);
      if (!product) continue;
      const { unit, count } = product;
      const name = boxRows.find(({ offerId }) => offerId === offer.id)?.name ?? product.name;
      const missing = takenOf(offer) - count;
      const orders = hitOrders(await listLinesOfOffer(db, offer.id), missing, spare.get(offer.id) ?? []);
      found.push({
        dayId: day.id,
        day: day.day,
        name,
        unit,
        made: count,
        taken: takenOf(offer),
        held: offer.held,
        orders,
      });
    }
  }
  return found;
}

function takenOf({ held, sold }: OfferRow): number {
  return held + sold;
}

function madeBy({ input, plan }: AllocationRow): Map<string, Made> {
  const cutName = (cutId: string) => input.input.cuts.find(({ id }) => id === cutId)?.name ?? cutId;
  const boxes = plan.plan.boxes.map(({ kindId, name, boxes: count }): Made => {
    return { productKey: `box:${kindId}`, name, unit: 'boxes', count };
  });
  const loose = plan.plan.loose.map(({ cutId, packs: count }): Made => {
    return { productKey: `loose:${cutId}`, name: cutName(cutId), unit: 'packs', count };
  });
  return new Map([...boxes, ...loose].map((product) => [product.productKey, product]));
}

type Stock = { made: ReadonlyMap<string, Made>; offers: readonly OfferRow[] };

/** By offer: boxes of the same family of which the plan makes more than are taken, and which are free in the shop. */
function spareBoxes(rows: readonly SwapRow[], { made, offers }: Stock): Map<string, HitOrder['swaps']> {
  const freeOf = ({ offerId, free }: SwapRow) => {
    const offer = offers.find(({ id }) => id === offerId);
    if (!offer) return 0;
    return Math.max(0, Math.min(free, (made.get(offer.productKey)?.count ?? 0) - takenOf(offer)));
  };
  return new Map(
    rows.map((row) => [
      row.offerId,
      rows
        .filter((other) => other.family === row.family && other.offerId !== row.offerId && freeOf(other) > 0)
        .map((other) => ({ offerId: other.offerId, name: other.name, free: freeOf(other) })),
    ]),
  );
}

/** The last to have come, until what is missing is covered. */
function hitOrders(lines: readonly HitLine[], missing: number, swaps: HitOrder['swaps']): HitOrder[] {
  let open = missing;
  return lines.flatMap((line): HitOrder[] => {
    if (open <= 0) return [];
    const quantity = Math.min(open, line.quantity);
    open -= quantity;
    const isWholeOrder = line.otherLines === 0 && quantity === line.quantity;
    const { orderId, orderNo, name, version, lineId } = line;
    return [
      {
        ...{ orderId, orderNo, name, version, lineId, quantity, isWholeOrder },
        refundPence: isWholeOrder ? line.totalPence : partPence(line, quantity),
        swaps: swaps.filter(({ free }) => free >= quantity),
        blocked: blockedReason(line, isWholeOrder),
      },
    ];
  });
}

/** What was paid for so many of a line, less their share of its discount. */
export function partPence(
  line: Pick<HitLine, 'quantity' | 'unitPricePence' | 'discountPence'>,
  quantity: number,
): number {
  return quantity * line.unitPricePence - scale(line.discountPence, quantity, line.quantity);
}

function blockedReason({ state, depositPence }: HitLine, isWholeOrder: boolean): string | null {
  if (state !== 'confirmed') return `It is ${state}: what is in it stays in it.`;
  if (depositPence !== null && !isWholeOrder) return 'Only a deposit was paid: its rest is reckoned by what is packed.';
  return null;
}
