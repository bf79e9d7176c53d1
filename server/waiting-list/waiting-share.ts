import type { Deps, Tx } from '#server/deps.ts';
import { findOfferDay, lockPlace, readPlace, updatePlace } from './waiting-queries.ts';

type Share = { token: string | undefined; dayId: string };

/** The offer of which one box is kept for the holder of this link, as far as it is of the day; else null. */
export async function findShare(deps: Deps, { token, dayId }: Share): Promise<string | null> {
  const row = token ? await readPlace(deps.db, token) : null;
  const isKept = row?.place.state === 'offered' && row.place.heldUntil && row.place.heldUntil > deps.clock.now();
  return isKept && row.kept?.dayId === dayId ? row.place.offerId : null;
}

/**
 * Turns the kept box into one of the order's own, inside the transaction of its hold: what is kept is counted as held
 * already, so that the order takes one fewer of it. Without a live share the order takes what is free, as any does.
 */
export async function claimShare(
  tx: Tx,
  deps: Deps,
  claim: Share & { orderId: string; offerIds: readonly string[] },
): Promise<Map<string, number>> {
  const place = claim.token ? await lockPlace(tx, { token: claim.token }) : null;
  const offerId = place?.offerId;
  if (!place || !offerId || place.state !== 'offered' || !place.heldUntil) return new Map();
  if (place.heldUntil <= deps.clock.now() || !claim.offerIds.includes(offerId)) return new Map();
  if ((await findOfferDay(tx, offerId)) !== claim.dayId) return new Map();
  await updatePlace(tx, place.id, { state: 'taken', heldUntil: null, orderId: claim.orderId });
  return new Map([[offerId, 1]]);
}
