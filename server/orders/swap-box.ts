import type { Order } from '#shared/contracts/orders.ts';
import { scale } from '#shared/engine/rounding.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps, Tx } from '#server/deps.ts';
import { finishChange, lockChangeable } from './change-order.ts';
import { exchange } from './hold.ts';
import { addLine, hasPacks, listSwapRows, reduceLine, type SwapRow } from './order-line-queries.ts';
import { listLines, type LineRow, type OrderRow } from './order-queries.ts';
import { readOrder } from './view-order.ts';

/** `byUserId` is set where the farm swaps for the customer. */
export type Swap = { token: string; lineId: string; offerId: string; quantity: number; byUserId?: string };

/**
 * Exchanges boxes of a paid order for another variant of the same box: one offer freed and the other taken in one
 * transaction. What was paid stays as it is.
 */
export async function swapBox(deps: Deps, swap: Swap): Promise<Order> {
  await deps.db.transaction(async (tx) => {
    const order = await lockChangeable(tx, deps, swap.token);
    const line = await getLine(tx, order, swap);
    const wanted = getVariant(await listSwapRows(tx, order.cuttingDayId), line, swap.offerId);
    const { quantity } = swap;
    if (!(await exchange(tx, { dayId: order.cuttingDayId, quantity, from: line.offerId, to: wanted.offerId }))) {
      throw new AppError(
        'OUT_OF_STOCK',
        `Of ${wanted.name} not so many are left any more. Nothing was changed; your order has ${line.name} as before.`,
        { figures: { left: wanted.free, asked: quantity } },
      );
    }
    const discountPence = scale(line.discountPence, quantity, line.quantity);
    await reduceLine(tx, line, { quantity, discountPence });
    const { offerId, name, unitGrams } = wanted;
    const { unitPricePence } = line;
    await addLine(tx, { orderId: order.id, offerId, name, unitGrams, quantity, unitPricePence, discountPence });
    await finishChange(tx, deps, {
      order,
      set: {},
      change: {
        action: 'swapped',
        byUserId: swap.byUserId,
        detail: { from: line.offerId, to: offerId, quantity },
        words: `${quantity} × ${line.name} is now ${quantity} × ${name}, at the same price.`,
      },
    });
  });
  return readOrder(deps, swap.token);
}

async function getLine(tx: Tx, order: OrderRow, { lineId, quantity }: Swap): Promise<LineRow> {
  const line = (await listLines(tx, order.id)).find((each) => each.id === lineId);
  if (!line || line.quantity < quantity) {
    throw new AppError('STATE_CHANGED', 'This order has changed meanwhile. Nothing was swapped; look at it again.');
  }
  if (await hasPacks(tx, line.id)) {
    throw new AppError('STATE_CHANGED', `${line.name} is being packed already. Nothing was swapped.`);
  }
  return line;
}

/** Only a variant of the same box can be had instead of it. */
function getVariant(rows: readonly SwapRow[], line: LineRow, offerId: string): SwapRow {
  const family = rows.find((row) => row.offerId === line.offerId)?.family;
  const wanted = rows.find((row) => row.offerId === offerId && row.family === family);
  if (wanted && wanted.offerId !== line.offerId) return wanted;
  throw new AppError('INVALID_INPUT', `${line.name} cannot be swapped for this. Nothing was changed.`, {
    fields: { offerId: 'This is no swap of that box.' },
  });
}
