import type { BasketLine } from '#shared/contracts/orders.ts';
import type { CuttingDaySummary, DayOffer, ShopHome } from '#shared/contracts/shop.ts';
import { useBasketPrice } from './orders.ts';
import type { CutList } from './shop.ts';
import type { Basket, BasketItem } from './use-basket.ts';

/** A thing in the basket, and what its product has to offer: on the chosen day and on the others. */
export type ChosenItem = BasketItem & { offer: DayOffer | undefined; elsewhere: DayOffer[] };

type Counter = { home: ShopHome | undefined; cuts: CutList | undefined };

/** The day of the basket while it is open; else the next one that can be ordered for. */
export function dayOfBasket(basket: Basket, days: readonly CuttingDaySummary[]): CuttingDaySummary | undefined {
  const open = days.filter((day) => day.isInTime).sort((one, other) => one.day.localeCompare(other.day));
  return open.find((day) => day.id === basket.dayId) ?? open[0];
}

/** Finds the offers of what is in the basket. What left the counter altogether has none. */
export function chosenItems(basket: Basket, dayId: string | undefined, { home, cuts }: Counter): ChosenItem[] {
  const openDays = new Set((home?.days ?? []).filter((day) => day.isInTime).map((day) => day.id));
  return basket.items.map((item) => {
    const offers =
      item.kind === 'box'
        ? home?.boxes.find((box) => box.slug === item.productId)?.offers
        : cuts?.cuts.find((cut) => cut.id === item.productId)?.offers;
    return {
      ...item,
      offer: offers?.find((offer) => offer.dayId === dayId),
      elsewhere: (offers ?? []).filter(
        (offer) => offer.dayId !== dayId && offer.free >= item.quantity && openDays.has(offer.dayId),
      ),
    };
  });
}

/** Everything that the basket and the checkout show, from what the counter offers now. */
export function useBasketOrder(basket: Basket, counter: Counter) {
  const day = dayOfBasket(basket, counter.home?.days ?? []);
  const items = chosenItems(basket, day?.id, counter);
  const lines: BasketLine[] = items.flatMap(({ offer, quantity }) =>
    offer ? [{ offerId: offer.offerId, quantity }] : [],
  );
  const price = useBasketPrice(day?.id, lines);
  // Figures of a former basket may still be shown while the new ones are worked out: they are matched by offer.
  const priced = items.map((item) => ({
    ...item,
    priced: price.data?.lines.find((line) => line.offerId === item.offer?.offerId),
  }));
  const isRight =
    priced.length > 0 && priced.every(({ quantity, priced: line }) => line !== undefined && line.free >= quantity);
  return { day, items: priced, lines, price, isRight };
}
