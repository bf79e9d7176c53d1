import type { Order } from '#shared/contracts/orders.ts';
import type { Deps } from '#server/deps.ts';
import { listPayments, type PaymentRow } from '#server/payments/payment-queries.ts';
import { BALANCE } from '#server/payments/payment-state.ts';
import { findCodeOfOrder } from '#server/promo/promo-queries.ts';
import { findOpenAddition, listAdditionLines } from './addition-queries.ts';
import { wordsOf } from './line-words.ts';
import { listSwapRows, type SwapRow } from './order-line-queries.ts';
import { listLines, listOrderPacks, type LineRow, type OrderRow } from './order-queries.ts';
import { getDay, getOrderByToken, getPlace, viewLine } from './read-order.ts';

/** The order as its customer sees it by the private link, and what can be done with it now. */
export async function readOrder(deps: Deps, token: string): Promise<Order> {
  const order = await getOrderByToken(deps.db, token);
  const [lines, collection, packs, payments, day, swaps, addition, promoCode] = await Promise.all([
    listLines(deps.db, order.id),
    getPlace(deps.db, order),
    listOrderPacks(deps.db, order.id),
    listPayments(deps.db, order.id),
    getDay(deps.db, order.cuttingDayId),
    listSwapRows(deps.db, order.cuttingDayId),
    readAddition(deps, order),
    findCodeOfOrder(deps.db, order.id),
  ]);
  const now = deps.clock.now();
  const canChange = order.state === 'confirmed' && now < day.cutOffAt;
  const isOpen = order.isHeld && order.sessionExpiresAt !== null && now < order.sessionExpiresAt;
  const { orderNo, state, paymentState, name, email, note, version } = order;
  const { discountPence, deliveryPence, totalPence } = order;
  return {
    ...{ orderNo, token, state, paymentState, name, email, note, version },
    ...{ discountPence, deliveryPence, totalPence, addition, promoCode },
    deposit: depositOf(order, payments),
    isDelivered: order.deliveryAddress !== null,
    paymentUrl: isOpen ? order.sessionUrl : null,
    paymentExpiresAt: isOpen ? (order.sessionExpiresAt?.toISOString() ?? null) : null,
    day: day.day,
    cutOffAt: day.cutOffAt.toISOString(),
    dayId: order.cuttingDayId,
    slotId: order.slotId,
    canChange,
    lines: lines.map((line) => ({
      ...viewLine(line),
      id: line.id,
      offerId: line.offerId,
      swaps: canChange ? swapsOf(swaps, line) : [],
    })),
    refundedPence: payments
      .filter((row) => row.kind === 'refund' && row.state === 'done')
      .reduce((sum, row) => sum + row.amountPence, 0),
    collection: {
      ...collection,
      startsAt: collection.startsAt.toISOString(),
      endsAt: collection.endsAt.toISOString(),
    },
    packs: packs.map(({ code, cut, grams, line, quantity, copy }) => ({
      ...{ code, cut, grams },
      box: quantity > 1 ? `${line}, ${copy} of ${quantity}` : line,
    })),
  };
}

/** Until it is weighed the rest is what is open of the total; then it is what was worked out. */
function depositOf(order: OrderRow, payments: readonly PaymentRow[]): Order['deposit'] {
  const { depositPence, balancePence, totalPence } = order;
  if (depositPence === null) return null;
  const charged = payments
    .filter((row) => row.kind === 'charge' && row.state === 'done')
    .reduce((sum, row) => sum + row.amountPence, 0);
  if (balancePence === null) return { depositPence, rest: 'later', restPence: totalPence - charged };
  const balance = payments.find((row) => row.kind === 'charge' && row.reason === BALANCE);
  const rest = !balance || balance.state === 'done' ? 'paid' : balance.state;
  return { depositPence, rest, restPence: balance?.amountPence ?? 0 };
}

/** More for the order, while it waits to be paid on its page. */
async function readAddition({ db, clock }: Deps, order: OrderRow): Promise<Order['addition']> {
  const addition = await findOpenAddition(db, order.id);
  if (!addition?.sessionUrl || !addition.sessionExpiresAt || clock.now() >= addition.sessionExpiresAt) return null;
  return {
    amountPence: addition.amountPence,
    paymentUrl: addition.sessionUrl,
    expiresAt: addition.sessionExpiresAt.toISOString(),
    words: wordsOf(await listAdditionLines(db, addition.id)),
  };
}

/** What a line could be swapped for now: the free variants of the same box. */
function swapsOf(rows: readonly SwapRow[], { offerId }: LineRow): Order['lines'][number]['swaps'] {
  const family = rows.find((row) => row.offerId === offerId)?.family;
  return rows
    .filter((row) => row.family === family && row.offerId !== offerId && row.free > 0)
    .map(({ offerId: id, name, summary, free }) => ({ offerId: id, name, summary, free }));
}
