import type { Order } from '#shared/contracts/orders.ts';
import { formatDayTime } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';
import { finishChange, lockChangeable } from './change-order.ts';
import { getSlotOfDay, moveSlot } from './hold.ts';
import { getCollection } from './order-queries.ts';
import { readOrder } from './view-order.ts';

/** Moves a paid order to another place or time of its cutting day, if there is room: SLOT_FULL where there is none. */
export async function changeSlot(deps: Deps, { token, slotId }: { token: string; slotId: string }): Promise<Order> {
  await deps.db.transaction(async (tx) => {
    const order = await lockChangeable(tx, deps, token);
    if (order.slotId === slotId) return;
    if (order.deliveryAddress) {
      throw new AppError(
        'STATE_CHANGED',
        'The van brings this order, so it has no time to collect. Nothing was changed.',
      );
    }
    await getSlotOfDay(tx, slotId, { dayId: order.cuttingDayId, now: deps.clock.now() });
    await moveSlot(tx, { dayId: order.cuttingDayId, from: order.slotId, to: slotId });
    const place = await getCollection(tx, slotId);
    await finishChange(tx, deps, {
      order,
      set: { slotId },
      change: {
        action: 'changed the collection',
        detail: { from: order.slotId, to: slotId },
        words: `You collect it ${formatDayTime(place.startsAt)} from ${place.name}.`,
      },
    });
  });
  return readOrder(deps, token);
}
