import { and, eq, inArray, sql } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { collectionPoint, collectionSlot } from '#db/schema/orders.ts';
import { boxKind, cut } from '#db/schema/products.ts';
import type { Db, Tx } from '#server/deps.ts';

export type OfferTake = { offerId: string; quantity: number };

/** One statement, so that two buyers can never both see the last one. False: not that many are free. */
export async function takeFree(
  tx: Tx,
  { offerId, quantity }: OfferTake,
  take: { dayId: string; into: 'held' | 'sold' },
): Promise<boolean> {
  const column = offer[take.into];
  const rows = await tx
    .update(offer)
    .set({ [take.into]: sql`${column} + ${quantity}` })
    .where(
      and(
        eq(offer.id, offerId),
        eq(offer.cuttingDayId, take.dayId),
        inArray(offer.kind, ['box', 'loose']),
        eq(offer.isClosed, false),
        sql`${offer.offered} - ${offer.held} - ${offer.sold} >= ${quantity}`,
      ),
    )
    .returning({ id: offer.id });
  return rows.length === 1;
}

export async function freeHeld(tx: Tx, { offerId, quantity }: OfferTake): Promise<void> {
  await tx
    .update(offer)
    .set({ held: sql`${offer.held} - ${quantity}` })
    .where(eq(offer.id, offerId));
}

export async function freeSold(tx: Tx, { offerId, quantity }: OfferTake): Promise<void> {
  await tx
    .update(offer)
    .set({ sold: sql`${offer.sold} - ${quantity}` })
    .where(eq(offer.id, offerId));
}

export async function sellHeld(tx: Tx, { offerId, quantity }: OfferTake): Promise<void> {
  await tx
    .update(offer)
    .set({ held: sql`${offer.held} - ${quantity}`, sold: sql`${offer.sold} + ${quantity}` })
    .where(eq(offer.id, offerId));
}

/** True when the last of one of these has just been paid for. */
export async function hasSoldOut(tx: Tx, offerIds: readonly string[]): Promise<boolean> {
  const rows = await tx
    .select({ id: offer.id })
    .from(offer)
    .where(and(inArray(offer.id, [...offerIds]), sql`${offer.sold} = ${offer.offered}`));
  return rows.length > 0;
}

/** False: the slot is full, or is none of this day. */
export async function takeSlot(tx: Tx, slotId: string, dayId: string): Promise<boolean> {
  const rows = await tx
    .update(collectionSlot)
    .set({ taken: sql`${collectionSlot.taken} + 1` })
    .where(
      and(
        eq(collectionSlot.id, slotId),
        eq(collectionSlot.cuttingDayId, dayId),
        sql`${collectionSlot.taken} < ${collectionSlot.capacity}`,
      ),
    )
    .returning({ id: collectionSlot.id });
  return rows.length === 1;
}

export async function freeSlot(tx: Tx, slotId: string): Promise<void> {
  await tx
    .update(collectionSlot)
    .set({ taken: sql`${collectionSlot.taken} - 1` })
    .where(eq(collectionSlot.id, slotId));
}

export async function findSlot(db: Db | Tx, slotId: string) {
  const rows = await db
    .select({ slot: collectionSlot, kind: collectionPoint.kind })
    .from(collectionSlot)
    .innerJoin(collectionPoint, eq(collectionPoint.id, collectionSlot.pointId))
    .where(eq(collectionSlot.id, slotId));
  const row = rows[0];
  return row ? { ...row.slot, kind: row.kind } : null;
}

export async function findDay(db: Db | Tx, dayId: string) {
  const rows = await db.select().from(cuttingDay).where(eq(cuttingDay.id, dayId));
  return rows[0] ?? null;
}

/** What is asked for, with its name and what it costs, in the order of its ids. */
export function listProducts(db: Db | Tx, dayId: string, offerIds: readonly string[]) {
  return db
    .select({
      offerId: offer.id,
      kind: offer.kind,
      boxName: boxKind.name,
      cutName: cut.name,
      pricePence: offer.pricePence,
      boxGrams: boxKind.guaranteedGrams,
      upperGrams: offer.upperGrams,
      free: sql<number>`case when ${offer.isClosed} then 0 else ${offer.offered} - ${offer.held} - ${offer.sold} end`,
    })
    .from(offer)
    .leftJoin(boxKind, eq(boxKind.id, offer.boxKindId))
    .leftJoin(cut, eq(cut.id, offer.cutId))
    .where(and(inArray(offer.id, [...offerIds]), eq(offer.cuttingDayId, dayId), inArray(offer.kind, ['box', 'loose'])))
    .orderBy(offer.id);
}
