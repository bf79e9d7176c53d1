import { and, eq, inArray } from 'drizzle-orm';
import { waitingEntry } from '#db/schema/waiting-list.ts';
import type { Db, Tx } from '#server/deps.ts';

export type WaitingRow = typeof waitingEntry.$inferSelect;

/** Places of an address that are not over yet, locked; shares in the order of their offers, as every hold is taken. */
export function lockLivePlaces(tx: Tx, email: string): Promise<WaitingRow[]> {
  return tx
    .select()
    .from(waitingEntry)
    .where(and(eq(waitingEntry.email, email), inArray(waitingEntry.state, ['unconfirmed', 'waiting', 'offered'])))
    .orderBy(waitingEntry.offerId)
    .for('update');
}

export async function updatePlace(
  tx: Tx,
  placeId: string,
  change: Partial<Pick<WaitingRow, 'state' | 'offerId' | 'heldUntil' | 'orderId'>>,
): Promise<void> {
  await tx.update(waitingEntry).set(change).where(eq(waitingEntry.id, placeId));
}

export async function findPlace(db: Db | Tx, token: string): Promise<WaitingRow | null> {
  const rows = await db.select().from(waitingEntry).where(eq(waitingEntry.token, token));
  return rows[0] ?? null;
}
