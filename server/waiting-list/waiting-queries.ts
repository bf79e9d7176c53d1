import { and, asc, count, eq, gt, inArray, isNull, lt, lte, sql } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { boxKind } from '#db/schema/products.ts';
import { waitingEntry } from '#db/schema/waiting-list.ts';
import type { Db, Tx } from '#server/deps.ts';

export type WaitingRow = typeof waitingEntry.$inferSelect;

const LIVE = ['unconfirmed', 'waiting', 'offered'] as const;
const isFree = sql`${offer.offered} > ${offer.held} + ${offer.sold}`;

/** Null: this address waits for this box and day already. */
export async function insertPlace(tx: Tx, place: typeof waitingEntry.$inferInsert): Promise<WaitingRow | null> {
  const rows = await tx.insert(waitingEntry).values(place).onConflictDoNothing().returning();
  return rows[0] ?? null;
}

export async function countLivePlaces(tx: Tx, email: string): Promise<number> {
  const rows = await tx
    .select({ count: count() })
    .from(waitingEntry)
    .where(and(eq(waitingEntry.email, email), inArray(waitingEntry.state, [...LIVE])));
  return rows[0]?.count ?? 0;
}

export async function findBox(db: Db | Tx, slug: string) {
  const rows = await db
    .select({ id: boxKind.id, name: boxKind.name })
    .from(boxKind)
    .where(and(eq(boxKind.slug, slug), eq(boxKind.isActive, true), isNull(boxKind.variantOfId)));
  return rows[0] ?? null;
}

/** What is on sale of a box, on one day or on all, with what is free of it. */
export function listOffersOfBox(
  db: Db | Tx,
  { boxKindId, dayId, now }: { boxKindId: string; dayId: string | null; now: Date },
) {
  return db
    .select({ id: offer.id, free: sql<number>`${offer.offered} - ${offer.held} - ${offer.sold}` })
    .from(offer)
    .innerJoin(cuttingDay, eq(cuttingDay.id, offer.cuttingDayId))
    .where(
      and(
        eq(offer.boxKindId, boxKindId),
        eq(offer.isClosed, false),
        eq(cuttingDay.state, 'open'),
        gt(cuttingDay.cutOffAt, now),
        dayId ? eq(cuttingDay.id, dayId) : undefined,
      ),
    );
}

/** A place with its box, the day asked for, what is kept for it, and how many wait before it. */
export async function readPlace(db: Db | Tx, token: string) {
  const askedDay = sql<string | null>`(select ${cuttingDay.day}::text from ${cuttingDay}
    where ${cuttingDay.id} = ${waitingEntry.cuttingDayId})`;
  const rows = await db
    .select({
      place: waitingEntry,
      slug: boxKind.slug,
      box: boxKind.name,
      day: askedDay,
      kept: { dayId: cuttingDay.id, day: cuttingDay.day },
      ahead: sql<number>`(select count(*)::int from ${waitingEntry} as other where other.state = 'waiting'
        and other.box_kind_id = ${waitingEntry.boxKindId} and other.place < ${waitingEntry.place})`,
    })
    .from(waitingEntry)
    .innerJoin(boxKind, eq(boxKind.id, waitingEntry.boxKindId))
    .leftJoin(offer, eq(offer.id, waitingEntry.offerId))
    .leftJoin(cuttingDay, eq(cuttingDay.id, offer.cuttingDayId))
    .where(eq(waitingEntry.token, token));
  return rows[0] ?? null;
}

export async function lockPlace(tx: Tx, where: { id: string } | { token: string }): Promise<WaitingRow | null> {
  const rows = await tx
    .select()
    .from(waitingEntry)
    .where('id' in where ? eq(waitingEntry.id, where.id) : eq(waitingEntry.token, where.token))
    .for('update');
  return rows[0] ?? null;
}

/** Places of an address that are not over yet, locked; shares in the order of their offers, as every hold is taken. */
export function lockLivePlaces(tx: Tx, email: string): Promise<WaitingRow[]> {
  return tx
    .select()
    .from(waitingEntry)
    .where(and(eq(waitingEntry.email, email), inArray(waitingEntry.state, [...LIVE])))
    .orderBy(waitingEntry.offerId)
    .for('update');
}

/** The cutting day of an offer that can still be bought from. */
export async function findOfferDay(tx: Tx, offerId: string): Promise<string | null> {
  const rows = await tx
    .select({ dayId: offer.cuttingDayId })
    .from(offer)
    .where(and(eq(offer.id, offerId), eq(offer.isClosed, false)));
  return rows[0]?.dayId ?? null;
}

export async function updatePlace(
  tx: Tx,
  placeId: string,
  change: Partial<Pick<WaitingRow, 'state' | 'offerId' | 'heldUntil' | 'orderId'>>,
): Promise<void> {
  await tx.update(waitingEntry).set(change).where(eq(waitingEntry.id, placeId));
}

/** Places whose kept time has run out, and confirmations that nobody pressed since `askedBefore`. */
export async function listOverdue(db: Db, { now, askedBefore }: { now: Date; askedBefore: Date }) {
  const kept = await db
    .select({ id: waitingEntry.id })
    .from(waitingEntry)
    .where(and(eq(waitingEntry.state, 'offered'), lte(waitingEntry.heldUntil, now)));
  const unconfirmed = await db
    .select({ id: waitingEntry.id })
    .from(waitingEntry)
    .where(and(eq(waitingEntry.state, 'unconfirmed'), lt(waitingEntry.createdAt, askedBefore)));
  return [...kept, ...unconfirmed].map((row) => row.id);
}

/** Who waits for something that is free now, in the order of their places; for each the next day first. */
export function listServable(db: Db, now: Date) {
  return db
    .select({
      placeId: waitingEntry.id,
      offerId: offer.id,
      dayId: cuttingDay.id,
      day: cuttingDay.day,
      cutOffAt: cuttingDay.cutOffAt,
    })
    .from(waitingEntry)
    .innerJoin(offer, and(eq(offer.boxKindId, waitingEntry.boxKindId), eq(offer.isClosed, false), isFree))
    .innerJoin(
      cuttingDay,
      and(
        eq(cuttingDay.id, offer.cuttingDayId),
        eq(cuttingDay.state, 'open'),
        gt(cuttingDay.cutOffAt, now),
        sql`coalesce(${waitingEntry.cuttingDayId}, ${cuttingDay.id}) = ${cuttingDay.id}`,
      ),
    )
    .where(eq(waitingEntry.state, 'waiting'))
    .orderBy(asc(waitingEntry.place), asc(cuttingDay.day));
}

export function countByBox(db: Db) {
  const countOf = (state: WaitingRow['state']) =>
    sql<number>`count(*) filter (where ${waitingEntry.state} = ${state})::int`;
  return db
    .select({ name: boxKind.name, waiting: countOf('waiting'), kept: countOf('offered'), taken: countOf('taken') })
    .from(waitingEntry)
    .innerJoin(boxKind, eq(boxKind.id, waitingEntry.boxKindId))
    .groupBy(boxKind.id, boxKind.name, boxKind.position)
    .orderBy(asc(boxKind.position));
}
