import { and, asc, desc, eq, inArray, ne, sql } from 'drizzle-orm';
import { allocation, offer } from '#db/schema/allocations.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { boxKind, boxLine, boxLineCut, cut } from '#db/schema/products.ts';
import { reservation, reservationLine, tradeAccount } from '#db/schema/trade.ts';
import type { Db, Tx } from '#server/deps.ts';
import type { AllocationAnswer } from '#shared/domain/allocation-record.ts';
import { AppError } from '#shared/errors.ts';

export type AllocationRow = typeof allocation.$inferSelect;
export type OfferRow = typeof offer.$inferSelect;
export type NewOffer = typeof offer.$inferInsert;
export type CutRow = typeof cut.$inferSelect;

export async function openDay(tx: Tx, dayId: string): Promise<void> {
  await tx
    .update(cuttingDay)
    .set({ state: 'open' })
    .where(and(eq(cuttingDay.id, dayId), eq(cuttingDay.state, 'planned')));
}

export function listCuts(db: Db | Tx): Promise<CutRow[]> {
  return db.select().from(cut).orderBy(cut.id);
}

export type BoxKindRow = typeof boxKind.$inferSelect & {
  lines: (typeof boxLine.$inferSelect & { cutIds: string[] })[];
};

/** Box kinds with their recipe, in the order in which they are shown. */
export async function listBoxKinds(db: Db | Tx): Promise<BoxKindRow[]> {
  const kinds = await db.select().from(boxKind).orderBy(boxKind.position, boxKind.id);
  const lines = await db.select().from(boxLine).orderBy(boxLine.position);
  const cuts = await db.select().from(boxLineCut).orderBy(boxLineCut.cutId);
  return kinds.map((kind) => ({
    ...kind,
    lines: lines
      .filter((line) => line.boxKindId === kind.id)
      .map((line) => ({
        ...line,
        cutIds: cuts.filter((lineCut) => lineCut.boxLineId === line.id).map((lineCut) => lineCut.cutId),
      })),
  }));
}

export function listOffers(db: Db | Tx, dayId: string): Promise<OfferRow[]> {
  return db.select().from(offer).where(eq(offer.cuttingDayId, dayId)).orderBy(offer.id);
}

/** In id order, as every hold takes them, so that the two never wait for each other in a ring. */
export function lockOffers(tx: Tx, dayId: string): Promise<OfferRow[]> {
  return tx.select().from(offer).where(eq(offer.cuttingDayId, dayId)).orderBy(asc(offer.id)).for('update');
}

export async function putOffer(tx: Tx, row: NewOffer): Promise<void> {
  await tx
    .insert(offer)
    .values(row)
    .onConflictDoUpdate({
      target: [offer.cuttingDayId, offer.productKey],
      set: { offered: row.offered, pricePence: row.pricePence, upperGrams: row.upperGrams, isClosed: false },
    });
}

/** Takes what is free off sale and leaves what is sold or held. */
export async function withdrawOffers(tx: Tx, offerIds: string[]): Promise<void> {
  if (offerIds.length === 0) return;
  await tx
    .update(offer)
    .set({ offered: sql`${offer.held} + ${offer.sold}` })
    .where(inArray(offer.id, offerIds));
}

/** Trade offers hold only what confirmed reservations take; each publication writes them anew. */
export async function replaceTradeOffers(tx: Tx, dayId: string, rows: NewOffer[]): Promise<void> {
  await tx.delete(offer).where(and(eq(offer.cuttingDayId, dayId), inArray(offer.kind, ['unit', 'cut'])));
  if (rows.length > 0) await tx.insert(offer).values(rows);
}

export type ReservedLine = typeof reservationLine.$inferSelect & {
  reservationNo: number;
  businessName: string;
  accountId: string;
};

/** Lines of a day's confirmed reservations. */
export async function listConfirmedLines(db: Db | Tx, dayId: string): Promise<ReservedLine[]> {
  const rows = await db
    .select({
      line: reservationLine,
      reservationNo: reservation.reservationNo,
      businessName: tradeAccount.businessName,
      accountId: tradeAccount.id,
    })
    .from(reservationLine)
    .innerJoin(reservation, eq(reservation.id, reservationLine.reservationId))
    .innerJoin(tradeAccount, eq(tradeAccount.id, reservation.accountId))
    .where(and(eq(reservation.cuttingDayId, dayId), inArray(reservation.state, ['confirmed', 'dispatched'])))
    .orderBy(reservationLine.id);
  return rows.map(({ line, ...rest }) => ({ ...line, ...rest }));
}

/** Names the side that serves a line, once its carcase has been weighed. */
export async function pinLine(tx: Tx, line: { id: string; carcaseId: string; side: 'left' | 'right' }): Promise<void> {
  await tx
    .update(reservationLine)
    .set({ carcaseId: line.carcaseId, side: line.side })
    .where(eq(reservationLine.id, line.id));
}

export async function addAllocation(db: Db | Tx, row: typeof allocation.$inferInsert): Promise<AllocationRow> {
  const rows = await db.insert(allocation).values(row).returning();
  const added = rows[0];
  if (!added) throw new Error('The allocation was not kept.');
  return added;
}

export async function getAllocation(db: Db | Tx, allocationId: string): Promise<AllocationRow> {
  const rows = await db.select().from(allocation).where(eq(allocation.id, allocationId));
  const row = rows[0];
  if (!row) throw new AppError('NOT_FOUND', 'There is no such allocation.');
  return row;
}

export async function findLatestAllocation(db: Db | Tx, dayId: string): Promise<AllocationRow | null> {
  const rows = await db
    .select()
    .from(allocation)
    .where(eq(allocation.cuttingDayId, dayId))
    .orderBy(desc(allocation.createdAt), desc(allocation.id))
    .limit(1);
  return rows[0] ?? null;
}

export async function findPublishedAllocation(db: Db | Tx, dayId: string): Promise<AllocationRow | null> {
  const rows = await db
    .select()
    .from(allocation)
    .where(and(eq(allocation.cuttingDayId, dayId), eq(allocation.state, 'published')));
  return rows[0] ?? null;
}

/** Adds to an answer what was worked out after it; the rest of it never changes. */
export async function storeAnswer(
  db: Db | Tx,
  id: string,
  part: Partial<Pick<AllocationAnswer, 'promise' | 'explanation'>>,
): Promise<void> {
  await db
    .update(allocation)
    .set({ plan: sql`${allocation.plan} || ${JSON.stringify(part)}::jsonb` })
    .where(eq(allocation.id, id));
}

/** Puts one allocation in force and the one before it out. */
export async function putInForce(tx: Tx, { id, dayId, at }: { id: string; dayId: string; at: Date }): Promise<void> {
  await tx
    .update(allocation)
    .set({ state: 'replaced' })
    .where(and(eq(allocation.cuttingDayId, dayId), eq(allocation.state, 'published'), ne(allocation.id, id)));
  await tx.update(allocation).set({ state: 'published', publishedAt: at }).where(eq(allocation.id, id));
}
