import type { Answer } from '#shared/contracts/endpoint.ts';
import type { BasketLine, PricedLine } from '#shared/contracts/orders.ts';
import type { priceBasketSchema } from '#shared/contracts/orders-schema.ts';
import { formatDay } from '#shared/domain/words.ts';
import { AppError, type ErrorFigures, type FieldErrors } from '#shared/errors.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { findShare } from '#server/waiting-list/waiting-share.ts';
import { findDay, listProducts } from './stock-queries.ts';

export type Product = Pick<PricedLine, 'offerId' | 'kind' | 'name' | 'free' | 'unitPricePence' | 'unitGrams'>;

/** One line an offer, in id order: every transaction takes offers in this order, so that none waits in a ring. */
export function mergeLines(lines: readonly BasketLine[]): BasketLine[] {
  const quantities = new Map<string, number>();
  for (const { offerId, quantity } of lines) quantities.set(offerId, (quantities.get(offerId) ?? 0) + quantity);
  return [...quantities]
    .map(([offerId, quantity]) => ({ offerId, quantity }))
    .sort((a, b) => (a.offerId < b.offerId ? -1 : 1));
}

/** The day that is asked for, while it is on sale. */
export async function getDayOnSale(db: Db | Tx, dayId: string) {
  const day = await findDay(db, dayId);
  if (day?.state !== 'open') {
    throw new AppError(
      'BASKET_EXPIRED',
      'This cutting day is not on sale any more. Nothing was charged; please choose again from the next day.',
    );
  }
  return day;
}

/** The products of a basket. One that has gone ends the whole basket, since its price is gone too. */
export async function getProducts(
  db: Db | Tx,
  dayId: string,
  lines: readonly BasketLine[],
): Promise<Map<string, Product>> {
  const rows = await listProducts(
    db,
    dayId,
    lines.map((line) => line.offerId),
  );
  const products = new Map<string, Product>();
  for (const row of rows) {
    const isBox = row.kind === 'box';
    const name = (isBox ? row.boxName : row.cutName) ?? '';
    const unitGrams = (isBox ? row.boxGrams : row.upperGrams) ?? 0;
    const { offerId, free } = row;
    const unitPricePence = row.pricePence ?? 0;
    products.set(offerId, { offerId, kind: isBox ? 'box' : 'loose', name, free, unitPricePence, unitGrams });
  }
  const gone = lines.findIndex((line) => !products.has(line.offerId));
  if (gone >= 0) {
    throw new AppError(
      'BASKET_EXPIRED',
      'Something in this basket is not on sale any more. Nothing was charged; please choose again.',
      { fields: { [`lines.${gone}.offerId`]: 'This is not on sale any more.' } },
    );
  }
  return products;
}

export async function priceOf(
  deps: Deps,
  body: { dayId: string; lines: BasketLine[]; waitingToken?: string | undefined },
): Promise<Answer<typeof priceBasketSchema>> {
  const day = await getDayOnSale(deps.db, body.dayId);
  const kept = await findShare(deps, { token: body.waitingToken, dayId: day.id });
  const products = await getProducts(deps.db, day.id, body.lines);
  const lines = body.lines.flatMap(({ offerId, quantity }) => {
    const product = products.get(offerId);
    if (!product) return [];
    // What is kept for this buyer alone is theirs to buy, though it is free for nobody else.
    const free = product.free + (offerId === kept ? 1 : 0);
    return [{ ...product, free, quantity, linePence: quantity * product.unitPricePence }];
  });
  return {
    dayId: day.id,
    day: day.day,
    cutOffAt: day.cutOffAt.toISOString(),
    isInTime: deps.clock.now() < day.cutOffAt,
    lines,
    totalPence: lines.reduce((sum, line) => sum + line.linePence, 0),
  };
}

/** Names what is short and how many are left of it, beside the line that asked for it. */
export function outOfStock(
  day: { day: string },
  asked: readonly BasketLine[],
  short: readonly (Product & { quantity: number })[],
): AppError {
  const sentences = short.map(({ name, free, quantity }) =>
    free === 0
      ? `${name} has sold out for ${formatDay(day.day)}.`
      : `Of ${name} only ${free} ${free === 1 ? 'is' : 'are'} left for ${formatDay(day.day)}, and you asked for ${quantity}.`,
  );
  const fields: FieldErrors = {};
  const figures: ErrorFigures = {};
  for (const { offerId, free } of short) {
    figures[offerId] = free;
    const at = asked.findIndex((line) => line.offerId === offerId);
    fields[`lines.${at}.quantity`] = free === 0 ? 'Sold out.' : `Only ${free} left.`;
  }
  const first = short[0];
  if (first) Object.assign(figures, { left: first.free, asked: first.quantity });
  return new AppError('OUT_OF_STOCK', `${sentences.join(' ')} Nothing was taken and nothing was charged.`, {
    fields,
    figures,
  });
}
