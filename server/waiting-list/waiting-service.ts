import type { Tx } from '#server/deps.ts';
import { freeHeld } from '#server/orders/stock-queries.ts';
import { lockLivePlaces, updatePlace, type WaitingRow } from './waiting-queries.ts';

/** Gives up every place of an address, and with it what is held for it. */
export async function leaveAll(tx: Tx, email: string): Promise<void> {
  for (const place of await lockLivePlaces(tx, email.toLowerCase())) await giveUp(tx, place, 'left');
}

/** Ends a place; the box that was held for it is free again. */
async function giveUp(tx: Tx, place: WaitingRow, state: 'left' | 'lapsed'): Promise<void> {
  if (place.state === 'offered' && place.offerId) await freeHeld(tx, { offerId: place.offerId, quantity: 1 });
  await updatePlace(tx, place.id, { state, heldUntil: null });
}
