import type { BasketLine } from '#shared/contracts/orders.ts';
import { formatDayTime } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import type { Tx } from '#server/deps.ts';
import { getProducts, mergeLines, outOfStock, type Product } from './basket.ts';
import { findSlot, freeHeld, freeSlot, freeSold, sellHeld, takeFree, takeSlot } from './stock-queries.ts';

export type HoldRequest = {
  day: { id: string; day: string };
  lines: readonly BasketLine[];
  slotId: string;
  /** What is held already for whoever asks: so many fewer of these offers are taken. */
  kept?: ReadonlyMap<string, number>;
};
export type HeldLine = Product & { quantity: number };

/** Takes every line and the slot, or throws and, with the transaction, takes nothing. */
export async function take(tx: Tx, request: HoldRequest, into: 'held' | 'sold'): Promise<HeldLine[]> {
  const wanted = await takeLines(tx, request, into);
  if (!(await takeSlot(tx, request.slotId, request.day.id))) throw await slotFull(tx, request.slotId);
  return wanted;
}

/** The lines alone, for what joins an order that has its slot. */
export async function takeLines(
  tx: Tx,
  request: Omit<HoldRequest, 'slotId'>,
  into: 'held' | 'sold',
): Promise<HeldLine[]> {
  const { day } = request;
  const lines = mergeLines(request.lines);
  const taken = new Set<string>();
  for (const line of lines) {
    const quantity = line.quantity - (request.kept?.get(line.offerId) ?? 0);
    if (quantity > 0 && !(await takeFree(tx, { ...line, quantity }, { dayId: day.id, into }))) break;
    taken.add(line.offerId);
  }
  const products = await getProducts(tx, day.id, request.lines);
  const wanted = lines.flatMap((line) => {
    const product = products.get(line.offerId);
    return product ? [{ ...product, quantity: line.quantity }] : [];
  });
  const missing = wanted.filter((line) => !taken.has(line.offerId));
  if (missing.length > 0) {
    const short = missing.filter((line) => line.free < line.quantity);
    if (short.length > 0) throw outOfStock(day, request.lines, short);
    throw new AppError('STATE_CHANGED', 'Stock moved at this very moment. Nothing was taken; please press again.');
  }
  return wanted;
}

/** The slot, when people collect then, it belongs to the day and is still to come. */
export async function getSlotOfDay(tx: Tx, slotId: string, at: { dayId: string; now: Date }) {
  const slot = await findSlot(tx, slotId);
  if (slot?.cuttingDayId === at.dayId && slot.kind === 'collection' && slot.startsAt > at.now) return slot;
  throw new AppError('INVALID_INPUT', 'Choose a collection time of this cutting day. Nothing was taken.', {
    fields: { slotId: 'This time cannot be chosen for this day.' },
  });
}

async function slotFull(tx: Tx, slotId: string): Promise<AppError> {
  const slot = await findSlot(tx, slotId);
  const time = slot ? `The time on ${formatDayTime(slot.startsAt)}` : 'This time';
  return new AppError('SLOT_FULL', `${time} has just filled up. Nothing was taken; please choose another time.`, {
    fields: { slotId: 'This time is full.' },
    figures: { left: 0 },
  });
}

/** From one time to another, in the order of their ids, so that two orders that change places never wait in a ring. */
export async function moveSlot(
  tx: Tx,
  { dayId, from, to }: { dayId: string; from: string; to: string },
): Promise<void> {
  if (from < to) await freeSlot(tx, from);
  if (!(await takeSlot(tx, to, dayId))) throw await slotFull(tx, to);
  if (from > to) await freeSlot(tx, from);
}

/** Frees sold boxes of one offer and takes as many of another, in the order of their ids. False: not so many are free. */
export async function exchange(
  tx: Tx,
  { dayId, quantity, from, to }: { dayId: string; quantity: number; from: string; to: string },
): Promise<boolean> {
  if (from < to) await freeSold(tx, { offerId: from, quantity });
  const isTaken = await takeFree(tx, { offerId: to, quantity }, { dayId, into: 'sold' });
  if (from > to) await freeSold(tx, { offerId: from, quantity });
  return isTaken;
}

export type Taken = { lines: readonly BasketLine[]; slotId: string };

/** Gives back what an open checkout held. */
export async function release(tx: Tx, { lines, slotId }: Taken): Promise<void> {
  await releaseLines(tx, lines);
  await freeSlot(tx, slotId);
}

export async function releaseLines(tx: Tx, lines: readonly BasketLine[]): Promise<void> {
  for (const line of mergeLines(lines)) await freeHeld(tx, line);
}

/** Gives back what was paid for. */
export async function unsell(tx: Tx, { lines, slotId }: Taken): Promise<void> {
  for (const line of mergeLines(lines)) await freeSold(tx, line);
  await freeSlot(tx, slotId);
}

/** The slot stays as it is: it was counted when the order went to payment. */
export async function sell(tx: Tx, lines: readonly BasketLine[]): Promise<void> {
  for (const line of mergeLines(lines)) await sellHeld(tx, line);
}
