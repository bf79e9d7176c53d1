import { and, asc, count, desc, eq, inArray, ne, notInArray, sql } from 'drizzle-orm';
import { cuttingDay, cuttingSpecification } from '#db/schema/carcases.ts';
import { collectionPoint, collectionSlot, customerOrder } from '#db/schema/orders.ts';
import { reservation } from '#db/schema/trade.ts';
import type { Db, Tx } from '#server/deps.ts';

export type CuttingDayRow = typeof cuttingDay.$inferSelect;
export type DayWithSpecification = CuttingDayRow & { specificationName: string };
export type SpecificationRow = typeof cuttingSpecification.$inferSelect;

function selectDays(db: Db | Tx) {
  return db
    .select({ day: cuttingDay, name: cuttingSpecification.name, edition: cuttingSpecification.edition })
    .from(cuttingDay)
    .innerJoin(cuttingSpecification, eq(cuttingSpecification.id, cuttingDay.specificationId));
}

type Selected = { day: CuttingDayRow; name: string; edition: number };
const flatten = ({ day, name, edition }: Selected): DayWithSpecification => ({
  ...day,
  specificationName: `${name}, edition ${edition}`,
});

export async function listDays(db: Db | Tx): Promise<DayWithSpecification[]> {
  return (await selectDays(db).orderBy(desc(cuttingDay.day))).map(flatten);
}

export async function findDay(db: Db | Tx, dayId: string): Promise<DayWithSpecification | null> {
  const rows = await selectDays(db).where(eq(cuttingDay.id, dayId));
  return rows[0] ? flatten(rows[0]) : null;
}

export async function findDayOn(db: Db | Tx, day: string): Promise<CuttingDayRow | null> {
  const rows = await db.select().from(cuttingDay).where(eq(cuttingDay.day, day));
  return rows[0] ?? null;
}

/** Holds other edits and publications of the day back; orders that name the day go on. */
export async function lockCuttingDay(tx: Tx, dayId: string): Promise<CuttingDayRow | null> {
  const rows = await tx.select().from(cuttingDay).where(eq(cuttingDay.id, dayId)).for('no key update');
  return rows[0] ?? null;
}

export async function insertDay(tx: Tx, row: typeof cuttingDay.$inferInsert): Promise<string | null> {
  const rows = await tx.insert(cuttingDay).values(row).onConflictDoNothing().returning({ id: cuttingDay.id });
  return rows[0]?.id ?? null;
}

export async function raiseFigures(tx: Tx, dayId: string): Promise<void> {
  await tx
    .update(cuttingDay)
    .set({ figuresVersion: sql`${cuttingDay.figuresVersion} + 1` })
    .where(eq(cuttingDay.id, dayId));
}

/** False when another edit came first, or the day is past choosing. */
export async function setDaySpecification(
  tx: Tx,
  dayId: string,
  { version, specificationId }: { version: number; specificationId: string },
): Promise<boolean> {
  const rows = await tx
    .update(cuttingDay)
    .set({ specificationId, version: sql`${cuttingDay.version} + 1` })
    .where(and(eq(cuttingDay.id, dayId), eq(cuttingDay.version, version), eq(cuttingDay.state, 'planned')))
    .returning({ id: cuttingDay.id });
  return rows.length === 1;
}

/** False when another edit came first. */
export async function closeDay(tx: Tx, dayId: string, version: number): Promise<boolean> {
  const rows = await tx
    .update(cuttingDay)
    .set({ state: 'closed', version: sql`${cuttingDay.version} + 1` })
    .where(and(eq(cuttingDay.id, dayId), eq(cuttingDay.version, version), ne(cuttingDay.state, 'closed')))
    .returning({ id: cuttingDay.id });
  return rows.length === 1;
}

/** Orders that were paid for, by day. */
export async function countOrders(db: Db | Tx, dayIds: readonly string[]): Promise<Map<string, number>> {
  if (dayIds.length === 0) return new Map();
  const rows = await db
    .select({ dayId: customerOrder.cuttingDayId, orders: count() })
    .from(customerOrder)
    .where(
      and(
        inArray(customerOrder.cuttingDayId, [...dayIds]),
        notInArray(customerOrder.state, ['awaiting payment', 'cancelled']),
      ),
    )
    .groupBy(customerOrder.cuttingDayId);
  return new Map(rows.map((row) => [row.dayId, row.orders]));
}

/** Numbers of the orders that nobody has handed over, settled or cancelled yet. */
export async function listUnsettledOrders(db: Db | Tx, dayId: string): Promise<number[]> {
  const rows = await db
    .select({ orderNo: customerOrder.orderNo })
    .from(customerOrder)
    .where(
      and(
        eq(customerOrder.cuttingDayId, dayId),
        inArray(customerOrder.state, ['awaiting payment', 'confirmed', 'packed', 'ready']),
      ),
    )
    .orderBy(asc(customerOrder.orderNo));
  return rows.map((row) => row.orderNo);
}

/** Numbers of the reservations that wait for an answer or for their beef. */
export async function listUnsettledReservations(db: Db | Tx, dayId: string): Promise<number[]> {
  const rows = await db
    .select({ reservationNo: reservation.reservationNo })
    .from(reservation)
    .where(and(eq(reservation.cuttingDayId, dayId), inArray(reservation.state, ['asked', 'confirmed'])))
    .orderBy(asc(reservation.reservationNo));
  return rows.map((row) => row.reservationNo);
}

export function listPoints(db: Db | Tx): Promise<{ id: string; name: string }[]> {
  return db
    .select({ id: collectionPoint.id, name: collectionPoint.name })
    .from(collectionPoint)
    .where(and(eq(collectionPoint.isActive, true), eq(collectionPoint.kind, 'collection')))
    .orderBy(asc(collectionPoint.name));
}

/** How many of the slots were new: a point opens one slot at one time. */
export async function insertSlots(tx: Tx, rows: (typeof collectionSlot.$inferInsert)[]): Promise<number> {
  if (rows.length === 0) return 0;
  const inserted = await tx.insert(collectionSlot).values(rows).onConflictDoNothing().returning();
  return inserted.length;
}

export async function findSpecification(db: Db | Tx, specificationId: string): Promise<SpecificationRow | null> {
  const rows = await db.select().from(cuttingSpecification).where(eq(cuttingSpecification.id, specificationId));
  return rows[0] ?? null;
}

export function listSpecificationRows(db: Db | Tx): Promise<{ id: string; name: string; edition: number }[]> {
  return db
    .select({ id: cuttingSpecification.id, name: cuttingSpecification.name, edition: cuttingSpecification.edition })
    .from(cuttingSpecification)
    .orderBy(asc(cuttingSpecification.name), desc(cuttingSpecification.edition));
}
