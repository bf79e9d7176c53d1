import type { BasketLine, PricedLine } from '#shared/contracts/orders.ts';
import type { CuttingDaySummary, DayOffer, ShopHome } from '#shared/contracts/shop.ts';
import { useBasketPrice } from './orders.ts';
import type { CutList } from './shop.ts';
import type { Basket, BasketItem } from './use-basket.ts';

/** A thing in the basket, as the counter offers its product on the chosen day and on the others. */
export type ChosenItem = BasketItem & { line: PricedLine | undefined; elsewhere: DayOffer[] };

type Counter = { home: ShopHome | undefined; cuts: CutList | undefined };

/** The day of the basket while it is open; else the next one that can be ordered for. */
export function dayOfBasket(basket: Basket, days: readonly CuttingDaySummary[]): CuttingDaySummary | undefined {
  const open = days.filter((day) => day.isInTime).sort((one, other) => one.day.localeCompare(other.day));
  return open.find((day) => day.id === basket.dayId) ?? open[0];
}

type Product = { offers: DayOffer[]; unitPricePence: number; unitGrams: number };

function findProduct(item: BasketItem, { home, cuts }: Counter): Product | undefined {
  if (item.kind === 'box') {
    const box = home?.boxes.find((one) => [one, ...one.swaps].some(({ slug }) => slug === item.productId));
    const own = box && [box, ...box.swaps].find(({ slug }) => slug === item.productId);
    return box && own && { offers: own.offers, unitPricePence: box.pricePence, unitGrams: box.guaranteedGrams };
  }
  const cut = cuts?.cuts.find((one) => one.id === item.productId);
  return cut && { offers: cut.offers, unitPricePence: cut.pricePence, unitGrams: cut.upperGrams };
}

/** Finds the offers of what is in the basket. What the day does not offer has no line. */
export function chosenItems(basket: Basket, dayId: string | undefined, counter: Counter): ChosenItem[] {
  const openDays = new Set((counter.home?.days ?? []).filter((day) => day.isInTime).map((day) => day.id));
  return basket.items.map((item) => {
    const product = findProduct(item, counter);
    const offer = product?.offers.find((one) => one.dayId === dayId);
    return {
      ...item,
      line: product && offer && lineOf(item, { ...product, offer }),
      elsewhere: (product?.offers ?? []).filter(
        (one) => one.dayId !== dayId && one.free >= item.quantity && openDays.has(one.dayId),
      ),
    };
  });
}

function lineOf({ kind, name, quantity }: BasketItem, product: Product & { offer: DayOffer }): PricedLine {
  const { offer, unitPricePence, unitGrams } = product;
  const linePence = unitPricePence * quantity;
  return { offerId: offer.offerId, kind, name, quantity, free: offer.free, unitPricePence, linePence, unitGrams };
}

/**
 * Everything that the basket and the checkout show. The counter's figures stand at once; the farm's own answer for this
 * basket, fresher and binding, takes their place line by line.
 */
export function useBasketOrder(basket: Basket, counter: Counter) {
  const day = dayOfBasket(basket, counter.home?.days ?? []);
  const chosen = chosenItems(basket, day?.id, counter);
  const lines: BasketLine[] = chosen.flatMap(({ line, quantity }) =>
    line ? [{ offerId: line.offerId, quantity }] : [],
  );
  const price = useBasketPrice(day?.id, lines);
  const items = chosen.map((item) => ({ ...item, line: answeredLine(item.line, price.data?.lines) }));
  return {
    day,
    items,
    lines,
    totalPence: items.reduce((sum, { line }) => sum + (line?.linePence ?? 0), 0),
    isRight: items.every(({ line, quantity }) => line !== undefined && line.free >= quantity),
    error: price.error,
    refetch: price.refetch,
  };
}

/** An answer for another quantity still tells what is left. */
function answeredLine(line: PricedLine | undefined, answer: readonly PricedLine[] | undefined): PricedLine | undefined {
  const told = answer?.find((one) => one.offerId === line?.offerId);
  if (!line || !told) return line;
  return told.quantity === line.quantity ? told : { ...line, free: told.free };
}
