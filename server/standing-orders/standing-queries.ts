import { and, asc, eq, gte, gt, inArray, lte, sql } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { user } from '#db/schema/auth.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { collectionPoint, collectionSlot, customerOrder } from '#db/schema/orders.ts';
import { boxKind } from '#db/schema/products.ts';
import { standingOrder, standingTurn } from '#db/schema/standing-orders.ts';
import type { Db, Tx } from '#server/deps.ts';

export type StandingRow = typeof standingOrder.$inferSelect;
export type TurnRow = typeof standingTurn.$inferSelect;

export async function insertStanding(tx: Db | Tx, row: typeof standingOrder.$inferInsert): Promise<void> {
  await tx.insert(standingOrder).values(row).onConflictDoNothing({ target: standingOrder.basketKey });
}

/** One whose first order could not be placed is none. */
export async function deletePending(db: Db, basketKey: string): Promise<void> {
  await db.delete(standingOrder).where(and(eq(standingOrder.basketKey, basketKey), eq(standingOrder.state, 'pending')));
}

export async function lockStanding(tx: Tx, standingId: string): Promise<StandingRow | null> {
  const rows = await tx.select().from(standingOrder).where(eq(standingOrder.id, standingId)).for('update');
  return rows[0] ?? null;
}

export async function updateStanding(
  tx: Tx,
  standingId: string,
  change: Partial<Pick<StandingRow, 'state' | 'nextFrom' | 'providerCustomerId' | 'providerMethodId'>>,
): Promise<void> {
  await tx.update(standingOrder).set(change).where(eq(standingOrder.id, standingId));
}

/** Standing orders that wait for their first order, with that order and its day. */
export function listPending(db: Db) {
  return db
    .select({ standing: standingOrder, order: customerOrder, day: cuttingDay.day })
    .from(standingOrder)
    .innerJoin(customerOrder, eq(customerOrder.basketKey, standingOrder.basketKey))
    .innerJoin(cuttingDay, eq(cuttingDay.id, customerOrder.cuttingDayId))
    .where(eq(standingOrder.state, 'pending'));
}

/** Active ones for which nothing is planned, with the person and the name of the box. */
export function listUnplanned(db: Db) {
  return db
    .select({ standing: standingOrder, name: user.name, email: user.email })
    .from(standingOrder)
    .innerJoin(user, eq(user.id, standingOrder.userId))
    .innerJoin(boxKind, and(eq(boxKind.id, standingOrder.boxKindId), eq(boxKind.isActive, true)))
    .where(
      and(
        eq(standingOrder.state, 'active'),
        sql`not exists (select 1 from ${standingTurn} where ${standingTurn.standingOrderId} = ${standingOrder.id}
          and ${standingTurn.state} in ('planned', 'failed'))`,
      ),
    )
    .orderBy(asc(standingOrder.createdAt));
}

/** Days on which a standing order could have its next box, the earliest first. */
export function listCandidates(db: Db, standing: StandingRow, closesAfter: Date) {
  return db
    .select({ dayId: cuttingDay.id, day: cuttingDay.day, cutOffAt: cuttingDay.cutOffAt, offerId: offer.id })
    .from(offer)
    .innerJoin(cuttingDay, eq(cuttingDay.id, offer.cuttingDayId))
    .where(
      and(
        eq(offer.boxKindId, standing.boxKindId),
        eq(offer.isClosed, false),
        eq(cuttingDay.state, 'open'),
        gte(cuttingDay.day, standing.nextFrom),
        gt(cuttingDay.cutOffAt, closesAfter),
        sql`${offer.offered} - ${offer.held} - ${offer.sold} >= ${standing.quantity}`,
        sql`not exists (select 1 from ${standingTurn} where ${standingTurn.standingOrderId} = ${standing.id}
          and ${standingTurn.cuttingDayId} = ${cuttingDay.id})`,
      ),
    )
    .orderBy(asc(cuttingDay.day));
}

/** Times of a day at a point that have room. */
export function listRoomyTimes(db: Db, { dayId, pointId }: { dayId: string; pointId: string }) {
  return db
    .select({ id: collectionSlot.id, startsAt: collectionSlot.startsAt })
    .from(collectionSlot)
    .where(
      and(
        eq(collectionSlot.cuttingDayId, dayId),
        eq(collectionSlot.pointId, pointId),
        sql`${collectionSlot.taken} < ${collectionSlot.capacity}`,
      ),
    )
    .orderBy(asc(collectionSlot.startsAt));
}

/** False: this day has its turn already. */
export async function insertTurn(tx: Tx, row: typeof standingTurn.$inferInsert): Promise<boolean> {
  const rows = await tx.insert(standingTurn).values(row).onConflictDoNothing().returning({ id: standingTurn.id });
  return rows.length === 1;
}

function selectTurns(db: Db | Tx) {
  return db
    .select({
      turn: standingTurn,
      standing: standingOrder,
      order: customerOrder,
      box: boxKind.name,
      day: cuttingDay.day,
      cutOffAt: cuttingDay.cutOffAt,
    })
    .from(standingTurn)
    .innerJoin(standingOrder, eq(standingOrder.id, standingTurn.standingOrderId))
    .innerJoin(customerOrder, eq(customerOrder.id, standingTurn.orderId))
    .innerJoin(boxKind, eq(boxKind.id, standingOrder.boxKindId))
    .innerJoin(cuttingDay, eq(cuttingDay.id, standingTurn.cuttingDayId));
}

export type TurnFacts = Awaited<ReturnType<typeof selectTurns>>[number];

export async function findTurn(db: Db | Tx, where: { token: string } | { id: string }): Promise<TurnFacts | null> {
  const rows = await selectTurns(db).where(
    'token' in where ? eq(standingTurn.token, where.token) : eq(standingTurn.id, where.id),
  );
  return rows[0] ?? null;
}

/** Turns of some states whose charge comes before an instant, the earliest first. */
export function listTurns(db: Db | Tx, where: { states: TurnRow['state'][]; chargedBefore: Date }) {
  return selectTurns(db)
    .where(and(inArray(standingTurn.state, where.states), lte(standingTurn.chargeAt, where.chargedBefore)))
    .orderBy(asc(standingTurn.chargeAt));
}

export function listTurnsOf(db: Db | Tx, standingIds: readonly string[]) {
  return selectTurns(db)
    .where(
      and(inArray(standingTurn.standingOrderId, [...standingIds]), inArray(standingTurn.state, ['planned', 'failed'])),
    )
    .orderBy(asc(standingTurn.chargeAt));
}

export async function lockTurn(tx: Tx, turnId: string): Promise<TurnRow | null> {
  const rows = await tx.select().from(standingTurn).where(eq(standingTurn.id, turnId)).for('update');
  return rows[0] ?? null;
}

export async function setTurnState(tx: Tx, turnId: string, state: TurnRow['state']): Promise<void> {
  await tx.update(standingTurn).set({ state }).where(eq(standingTurn.id, turnId));
}

export function listStandingOf(db: Db, userId: string) {
  return db
    .select({ standing: standingOrder, box: boxKind.name, pointName: collectionPoint.name })
    .from(standingOrder)
    .innerJoin(boxKind, eq(boxKind.id, standingOrder.boxKindId))
    .innerJoin(collectionPoint, eq(collectionPoint.id, standingOrder.pointId))
    .where(eq(standingOrder.userId, userId))
    .orderBy(asc(standingOrder.createdAt));
}

/** The offer of a box on a day. */
export async function findBoxOffer(db: Db, { slug, dayId }: { slug: string; dayId: string }) {
  const rows = await db
    .select({ offerId: offer.id, boxKindId: boxKind.id })
    .from(offer)
    .innerJoin(boxKind, eq(boxKind.id, offer.boxKindId))
    .where(and(eq(boxKind.slug, slug), eq(boxKind.isActive, true), eq(offer.cuttingDayId, dayId)));
  return rows[0] ?? null;
}
