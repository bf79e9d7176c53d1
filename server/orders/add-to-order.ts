import type { BasketLine, Order } from '#shared/contracts/orders.ts';
import { SMALLEST_CHARGE_PENCE } from '#shared/domain/money.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { closeAddition, openAdditionPage } from './addition-page.ts';
import { findOpenAddition, insertAddition, listAdditionLines, type AdditionRow } from './addition-queries.ts';
import { mergeLines } from './basket.ts';
import { finishChange, lockChangeable } from './change-order.ts';
import { sell, takeLines, type HeldLine } from './hold.ts';
import { wordsOf } from './line-words.ts';
import { addLine } from './order-line-queries.ts';
import type { OrderRow } from './order-queries.ts';
import { getDay, getOrderByToken } from './read-order.ts';
import { readOrder } from './view-order.ts';

export type Adding = { token: string; version: number; lines: BasketLine[] };

/** Presses that cross each other look again; more than this many would be no person. */
const MOST_LOOKS = 5;

/**
 * Puts more into a paid order: the stock is held and the difference paid on a page of its own. An order has one open
 * addition at most, so that a second press or a second tab comes to the same page, and its version shows a press that
 * was made before an earlier one was paid.
 */
export async function addToOrder(deps: Deps, adding: Adding): Promise<Order> {
  for (let look = 0; look < MOST_LOOKS; look += 1) {
    const order = await getOrderByToken(deps.db, adding.token);
    const open = await findOpenAddition(deps.db, order.id);
    if (open && isAlive(deps, open) && (await isSame(deps, open, adding.lines))) {
      await openAdditionPage(deps, open);
      return readOrder(deps, adding.token);
    }
    if (open) await closeAddition(deps, order.id);
    const held = await hold(deps, adding);
    if (held === 'look again') continue;
    if (held) await openAdditionPage(deps, held);
    return readOrder(deps, adding.token);
  }
  throw new AppError(
    'STATE_CHANGED',
    'Something is being added to this order in another tab. Nothing was charged; look there first.',
  );
}

function isAlive(deps: Deps, { sessionExpiresAt }: AdditionRow): boolean {
  return sessionExpiresAt === null || deps.clock.now() < sessionExpiresAt;
}

async function isSame(deps: Deps, addition: AdditionRow, lines: readonly BasketLine[]): Promise<boolean> {
  const held = mergeLines(await listAdditionLines(deps.db, addition.id));
  return JSON.stringify(held) === JSON.stringify(mergeLines(lines));
}

/** Null: nothing is to be paid. */
async function hold(deps: Deps, { token, version, lines }: Adding): Promise<AdditionRow | null | 'look again'> {
  return deps.db.transaction(async (tx) => {
    const order = await lockChangeable(tx, deps, token);
    if (order.version !== version) {
      throw new AppError(
        'STATE_CHANGED',
        'This order has changed meanwhile. Nothing was added and nothing was charged; look at it again.',
      );
    }
    if (await findOpenAddition(tx, order.id)) return 'look again';
    const day = await getDay(tx, order.cuttingDayId);
    const taken = await takeLines(tx, { day, lines }, 'held');
    const amountPence = taken.reduce((sum, line) => sum + line.quantity * line.unitPricePence, 0);
    if (amountPence < SMALLEST_CHARGE_PENCE) {
      await waive(tx, deps, { order, taken, amountPence });
      return null;
    }
    return insertAddition(tx, { orderId: order.id, amountPence, reachedPaymentAt: deps.clock.now() }, taken);
  });
}

/** Less than a card can be charged: it is let go, and the line says so by its discount. */
async function waive(
  tx: Tx,
  deps: Deps,
  { order, taken, amountPence }: { order: OrderRow; taken: readonly HeldLine[]; amountPence: number },
): Promise<void> {
  await sell(tx, taken);
  for (const { offerId, quantity, unitPricePence, unitGrams, name } of taken) {
    const discountPence = quantity * unitPricePence;
    await addLine(tx, { orderId: order.id, offerId, quantity, unitPricePence, unitGrams, name, discountPence });
  }
  await finishChange(tx, deps, {
    order,
    set: { discountPence: order.discountPence + amountPence },
    change: {
      action: 'added to the order, and waived what it costs',
      detail: { amountPence },
      words: `Added: ${wordsOf(taken)}. It is too little to charge, so there is nothing more to pay.`,
    },
  });
}
