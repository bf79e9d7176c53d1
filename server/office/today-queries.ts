import { and, asc, count, desc, eq, inArray, lte, ne, notInArray, sum } from 'drizzle-orm';
import { allocation } from '#db/schema/allocations.ts';
import { carcase, cuttingDay } from '#db/schema/carcases.ts';
import { animal } from '#db/schema/herd.ts';
import { mailMessage } from '#db/schema/mail.ts';
import { customerOrder, payment } from '#db/schema/orders.ts';
import { reservation, tradeAccount } from '#db/schema/trade.ts';
import type { Db } from '#server/deps.ts';

export type TodayDay = typeof cuttingDay.$inferSelect & { carcases: number };

/** Days that are not closed, soonest first, then the newest closed ones. */
export async function listTodayDays(db: Db, closedLimit: number): Promise<TodayDay[]> {
  const working = await db.select().from(cuttingDay).where(ne(cuttingDay.state, 'closed')).orderBy(asc(cuttingDay.day));
  const closed = await db
    .select()
    .from(cuttingDay)
    .where(eq(cuttingDay.state, 'closed'))
    .orderBy(desc(cuttingDay.day))
    .limit(closedLimit);
  const rows = await db
    .select({ dayId: carcase.cuttingDayId, carcases: count() })
    .from(carcase)
    .groupBy(carcase.cuttingDayId);
  const carcases = new Map(rows.map((row) => [row.dayId, row.carcases]));
  return [...working, ...closed].map((day) => ({ ...day, carcases: carcases.get(day.id) ?? 0 }));
}

/** Carcases whose kill day has come and whose kill sheet has not. */
export function listMissingKillSheets(db: Db, today: string) {
  return db
    .select({ id: carcase.id, earTag: animal.earTag, killDay: carcase.killDay, dayId: carcase.cuttingDayId })
    .from(carcase)
    .innerJoin(animal, eq(animal.id, carcase.animalId))
    .where(and(eq(carcase.state, 'booked'), lte(carcase.killDay, today)))
    .orderBy(asc(carcase.killDay), asc(animal.earTag));
}

export type DayAllocation = Pick<
  typeof allocation.$inferSelect,
  'id' | 'cuttingDayId' | 'state' | 'figuresVersion' | 'isProven' | 'createdAt' | 'plan'
>;

/** By day: the newest allocation and the one in force. */
export async function listNewestAllocations(db: Db, dayIds: readonly string[]): Promise<DayAllocation[]> {
  if (dayIds.length === 0) return [];
  const columns = {
    id: allocation.id,
    cuttingDayId: allocation.cuttingDayId,
    state: allocation.state,
    figuresVersion: allocation.figuresVersion,
    isProven: allocation.isProven,
    createdAt: allocation.createdAt,
    plan: allocation.plan,
  };
  const newest = await db
    .selectDistinctOn([allocation.cuttingDayId], columns)
    .from(allocation)
    .where(inArray(allocation.cuttingDayId, [...dayIds]))
    .orderBy(allocation.cuttingDayId, desc(allocation.createdAt), desc(allocation.id));
  const inForce = await db
    .select(columns)
    .from(allocation)
    .where(and(inArray(allocation.cuttingDayId, [...dayIds]), eq(allocation.state, 'published')));
  const known = new Set(newest.map((row) => row.id));
  return [...newest, ...inForce.filter((row) => !known.has(row.id))];
}

export function listAskedReservations(db: Db) {
  return db
    .select({
      id: reservation.id,
      reservationNo: reservation.reservationNo,
      businessName: tradeAccount.businessName,
      day: cuttingDay.day,
      dayId: cuttingDay.id,
    })
    .from(reservation)
    .innerJoin(tradeAccount, eq(tradeAccount.id, reservation.accountId))
    .innerJoin(cuttingDay, eq(cuttingDay.id, reservation.cuttingDayId))
    .where(eq(reservation.state, 'asked'))
    .orderBy(asc(reservation.createdAt));
}

export function listApplications(db: Db) {
  return db
    .select({ id: tradeAccount.id, businessName: tradeAccount.businessName })
    .from(tradeAccount)
    .where(eq(tradeAccount.state, 'applied'))
    .orderBy(asc(tradeAccount.createdAt));
}

export type OrderCount = {
  dayId: string;
  state: typeof customerOrder.$inferSelect.state;
  orders: number;
  pence: number;
};

/** Orders and their pence by day and state. */
export async function countOrdersByState(db: Db, dayIds: readonly string[]): Promise<OrderCount[]> {
  if (dayIds.length === 0) return [];
  const rows = await db
    .select({
      dayId: customerOrder.cuttingDayId,
      state: customerOrder.state,
      orders: count(),
      pence: sum(customerOrder.totalPence),
    })
    .from(customerOrder)
    .where(
      and(
        inArray(customerOrder.cuttingDayId, [...dayIds]),
        notInArray(customerOrder.state, ['awaiting payment', 'cancelled']),
      ),
    )
    .groupBy(customerOrder.cuttingDayId, customerOrder.state);
  return rows.map((row) => ({ ...row, pence: Number(row.pence ?? 0) }));
}

/** Money given back on orders that stand, by day. */
export async function sumRefunds(db: Db, dayIds: readonly string[]): Promise<Map<string, number>> {
  if (dayIds.length === 0) return new Map();
  const rows = await db
    .select({ dayId: customerOrder.cuttingDayId, pence: sum(payment.amountPence) })
    .from(payment)
    .innerJoin(customerOrder, eq(customerOrder.id, payment.orderId))
    .where(
      and(
        inArray(customerOrder.cuttingDayId, [...dayIds]),
        eq(payment.kind, 'refund'),
        eq(payment.state, 'done'),
        notInArray(customerOrder.state, ['awaiting payment', 'cancelled']),
      ),
    )
    .groupBy(customerOrder.cuttingDayId);
  return new Map(rows.map((row) => [row.dayId, Number(row.pence ?? 0)]));
}

export function listUndeliveredMails(db: Db, limit: number) {
  return db
    .select({
      id: mailMessage.id,
      state: mailMessage.state,
      subject: mailMessage.subject,
      toAddress: mailMessage.toAddress,
      lastError: mailMessage.lastError,
    })
    .from(mailMessage)
    .where(inArray(mailMessage.state, ['failed', 'bounced']))
    .orderBy(desc(mailMessage.createdAt))
    .limit(limit);
}

/** Rests of packed orders that the saved card was not charged with: their customers have a link to pay. */
export function listFailedBalances(db: Db) {
  return db
    .select({ orderNo: customerOrder.orderNo, name: customerOrder.name, amountPence: payment.amountPence })
    .from(payment)
    .innerJoin(customerOrder, eq(customerOrder.id, payment.orderId))
    .where(
      and(
        eq(payment.kind, 'charge'),
        eq(payment.reason, 'balance'),
        eq(payment.state, 'failed'),
        ne(customerOrder.state, 'cancelled'),
      ),
    )
    .orderBy(asc(customerOrder.orderNo));
}
