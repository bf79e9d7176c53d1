import type { Checkout } from '#shared/contracts/orders.ts';
import { deliveryPenceOf } from '#shared/domain/delivery.ts';
import { depositOf } from '#shared/domain/deposit.ts';
import { shareDiscount } from '#shared/domain/promo.ts';
import { formatDayTime } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import { getRound } from '#server/delivery/delivery-service.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { findCodeOfOrder } from '#server/promo/promo-queries.ts';
import { takePromo } from '#server/promo/promo-service.ts';
import { claimShare } from '#server/waiting-list/waiting-share.ts';
import { getDayOnSale, mergeLines } from './basket.ts';
import { getSlotOfDay, take } from './hold.ts';
import { listLines, replaceLines, updateOrder, type OrderRow } from './order-queries.ts';

/** Where and when an order is handed over, and what the van costs where it brings it. */
export type Place = {
  day: { id: string; day: string };
  slotId: string;
  van: { pricePence: number; freeFromPence: number | null } | null;
};

/** The place of a basket, while its day can still be ordered for. */
export async function getPlaceInTime(tx: Tx, deps: Deps, { dayId, slotId, delivery }: Checkout): Promise<Place> {
  const now = deps.clock.now();
  const day = await getDayOnSale(tx, dayId);
  if (now >= day.cutOffAt) {
    throw new AppError(
      'CUTOFF_PASSED',
      `Orders for this day closed ${formatDayTime(day.cutOffAt)}. Nothing was charged; please choose a later day.`,
      { figures: { cutOffAt: day.cutOffAt.toISOString() } },
    );
  }
  if (delivery) {
    const { area, slotId: roundId } = await getRound(tx, day, delivery);
    return { day, slotId: roundId, van: area };
  }
  if (!slotId) {
    throw new AppError('INVALID_INPUT', 'Choose a place and a time to collect, or an address. Nothing was taken.', {
      fields: { slotId: 'Choose a place and a time.' },
    });
  }
  await getSlotOfDay(tx, slotId, { dayId, now });
  return { day, slotId, van: null };
}

type Holding = { order: OrderRow; basket: Checkout; place: Place };

/** Takes what a basket asks for, all or none, and works out what it comes to. */
export async function holdBasket(tx: Tx, deps: Deps, { order, basket, place }: Holding): Promise<OrderRow> {
  const { day, slotId, van } = place;
  const kept = await claimShare(tx, deps, {
    ...{ token: basket.waitingToken, dayId: day.id, orderId: order.id },
    offerIds: basket.lines.map((line) => line.offerId),
  });
  const lines = await take(tx, { day, lines: basket.lines, slotId, kept }, 'held');
  const goodsPence = lines.reduce((sum, line) => sum + line.quantity * line.unitPricePence, 0);
  const { email, userId } = order;
  const code = basket.promoCode;
  const discountPence = code ? await takePromo(tx, deps, { code, orderId: order.id, email, userId, goodsPence }) : 0;
  await replaceLines(tx, order.id, shareDiscount(lines, discountPence));
  const deliveryPence = van ? deliveryPenceOf(van, goodsPence - discountPence) : 0;
  const totalPence = goodsPence - discountPence + deliveryPence;
  const depositPence = basket.pay === 'deposit' ? depositOf(totalPence) : null;
  return updateOrder(tx, order.id, { totalPence, discountPence, deliveryPence, depositPence });
}

/** What an order keeps of its basket as it was typed. */
export function detailsOf({ dayId, name, email, phone, note, delivery }: Checkout) {
  return {
    ...{ cuttingDayId: dayId, name, email, phone, note },
    deliveryAddress: delivery?.addressLines ?? null,
    deliveryPostcode: delivery?.postcode ?? null,
  };
}

/** Whether an order is of this very basket, so that its payment page can be gone on with. */
export async function isSame(deps: Deps, order: OrderRow, basket: Checkout): Promise<boolean> {
  const held = mergeLines(await listLines(deps.db, order.id));
  const code = await findCodeOfOrder(deps.db, order.id);
  const details = detailsOf(basket);
  const kept = Object.fromEntries(
    (Object.keys(details) as (keyof typeof details)[]).map((key) => [key, order[key]] as const),
  );
  const isDeposit = order.depositPence !== null;
  const wantsDeposit = basket.pay === 'deposit' && depositOf(order.totalPence) !== null;
  return (
    JSON.stringify([kept, held, code, isDeposit]) ===
      JSON.stringify([details, mergeLines(basket.lines), basket.promoCode ?? null, wantsDeposit]) &&
    (basket.delivery !== undefined || order.slotId === basket.slotId)
  );
}
