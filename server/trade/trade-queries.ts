import { and, asc, desc, eq, gte, inArray, ne, sql } from 'drizzle-orm';
import { user } from '#db/schema/auth.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { cut } from '#db/schema/products.ts';
import { reservation, reservationLine, tradeAccount, tradePrice } from '#db/schema/trade.ts';
import type { Db, Tx } from '#server/deps.ts';
import type { Day } from '#shared/domain/day.ts';

export type PriceRow = typeof tradePrice.$inferSelect;
export type AccountRow = typeof tradeAccount.$inferSelect & { email: string; prices: PriceRow[] };
export type ReservationRow = typeof reservation.$inferSelect;
export type LineRow = typeof reservationLine.$inferSelect;
export type FullReservation = ReservationRow & { businessName: string; day: Day; lines: LineRow[] };

async function withPrices(
  db: Db | Tx,
  rows: { account: typeof tradeAccount.$inferSelect; email: string }[],
): Promise<AccountRow[]> {
  if (rows.length === 0) return [];
  const prices = await db
    .select()
    .from(tradePrice)
    .where(
      inArray(
        tradePrice.accountId,
        rows.map(({ account }) => account.id),
      ),
    )
    .orderBy(asc(tradePrice.product));
  return rows.map(({ account, email }) => ({
    ...account,
    email,
    prices: prices.filter((price) => price.accountId === account.id),
  }));
}

function selectAccounts(db: Db | Tx) {
  return db
    .select({ account: tradeAccount, email: user.email })
    .from(tradeAccount)
    .innerJoin(user, eq(user.id, tradeAccount.userId));
}

export async function findAccountOf(db: Db | Tx, userId: string): Promise<AccountRow | null> {
  const rows = await selectAccounts(db).where(eq(tradeAccount.userId, userId));
  return (await withPrices(db, rows))[0] ?? null;
}

export async function findAccount(db: Db | Tx, accountId: string): Promise<AccountRow | null> {
  const rows = await selectAccounts(db).where(eq(tradeAccount.id, accountId));
  return (await withPrices(db, rows))[0] ?? null;
}

export async function listAccounts(db: Db | Tx): Promise<AccountRow[]> {
  return withPrices(db, await selectAccounts(db).orderBy(asc(tradeAccount.createdAt)));
}

/** False when this person has an account already. */
export async function addAccount(tx: Tx, row: typeof tradeAccount.$inferInsert): Promise<boolean> {
  const rows = await tx.insert(tradeAccount).values(row).onConflictDoNothing().returning({ id: tradeAccount.id });
  return rows.length === 1;
}

type Versioned<T> = { version: number; values: T };

/** False when another edit came first. */
export async function updateAccount(
  tx: Tx,
  accountId: string,
  edit: Versioned<Partial<typeof tradeAccount.$inferInsert>>,
): Promise<boolean> {
  const rows = await tx
    .update(tradeAccount)
    .set({ ...edit.values, version: sql`${tradeAccount.version} + 1` })
    .where(and(eq(tradeAccount.id, accountId), eq(tradeAccount.version, edit.version)))
    .returning({ id: tradeAccount.id });
  return rows.length === 1;
}

export async function setRole(tx: Tx, userId: string, role: 'butcher' | 'customer'): Promise<void> {
  // An owner who tries the trade area out stays an owner.
  await tx
    .update(user)
    .set({ role })
    .where(and(eq(user.id, userId), inArray(user.role, ['butcher', 'customer'])));
}

export async function replacePrices(
  tx: Tx,
  accountId: string,
  prices: Omit<typeof tradePrice.$inferInsert, 'accountId'>[],
): Promise<void> {
  await tx.delete(tradePrice).where(eq(tradePrice.accountId, accountId));
  if (prices.length > 0) await tx.insert(tradePrice).values(prices.map((price) => ({ ...price, accountId })));
}

export async function listCutNames(db: Db | Tx): Promise<Map<string, string>> {
  const rows = await db.select({ id: cut.id, name: cut.name }).from(cut);
  return new Map(rows.map((row) => [row.id, row.name]));
}

/** Days that are still to be cut, the next first. */
export async function listComingDays(db: Db | Tx, today: Day) {
  return db
    .select()
    .from(cuttingDay)
    .where(and(gte(cuttingDay.day, today), ne(cuttingDay.state, 'closed')))
    .orderBy(asc(cuttingDay.day));
}

async function withLines(
  db: Db | Tx,
  rows: { reservation: ReservationRow; businessName: string; day: Day }[],
): Promise<FullReservation[]> {
  if (rows.length === 0) return [];
  const lines = await db
    .select()
    .from(reservationLine)
    .where(
      inArray(
        reservationLine.reservationId,
        rows.map((row) => row.reservation.id),
      ),
    )
    .orderBy(asc(reservationLine.id));
  return rows.map((row) => ({
    ...row.reservation,
    businessName: row.businessName,
    day: row.day,
    lines: lines.filter((line) => line.reservationId === row.reservation.id),
  }));
}

function selectReservations(db: Db | Tx) {
  return db
    .select({ reservation, businessName: tradeAccount.businessName, day: cuttingDay.day })
    .from(reservation)
    .innerJoin(tradeAccount, eq(tradeAccount.id, reservation.accountId))
    .innerJoin(cuttingDay, eq(cuttingDay.id, reservation.cuttingDayId));
}

export async function listReservationRows(db: Db | Tx, accountId: string | null): Promise<FullReservation[]> {
  const rows = await selectReservations(db)
    .where(accountId ? eq(reservation.accountId, accountId) : undefined)
    .orderBy(desc(cuttingDay.day), desc(reservation.reservationNo));
  return withLines(db, rows);
}

export async function findReservation(db: Db | Tx, id: string): Promise<FullReservation | null> {
  const rows = await selectReservations(db).where(eq(reservation.id, id));
  return (await withLines(db, rows))[0] ?? null;
}

export async function findReservationByKey(db: Db | Tx, requestKey: string): Promise<FullReservation | null> {
  const rows = await selectReservations(db).where(eq(reservation.requestKey, requestKey));
  return (await withLines(db, rows))[0] ?? null;
}

export type NewLine = Omit<typeof reservationLine.$inferInsert, 'reservationId'>;

/** Null when a reservation with this request key exists already. */
export async function addReservation(
  tx: Tx,
  row: typeof reservation.$inferInsert,
  lines: NewLine[],
): Promise<string | null> {
  const rows = await tx.insert(reservation).values(row).onConflictDoNothing().returning({ id: reservation.id });
  const added = rows[0];
  if (!added) return null;
  await tx.insert(reservationLine).values(lines.map((line) => ({ ...line, reservationId: added.id })));
  return added.id;
}

export async function setDispatchedGrams(tx: Tx, lineId: string, dispatchedGrams: number): Promise<void> {
  await tx.update(reservationLine).set({ dispatchedGrams }).where(eq(reservationLine.id, lineId));
}

/** False when the reservation has moved on since the caller looked. */
export async function updateReservation(
  tx: Db | Tx,
  id: string,
  edit: Versioned<Pick<ReservationRow, 'state' | 'answer'>>,
): Promise<boolean> {
  const rows = await tx
    .update(reservation)
    .set({ ...edit.values, version: sql`${reservation.version} + 1` })
    .where(and(eq(reservation.id, id), eq(reservation.version, edit.version)))
    .returning({ id: reservation.id });
  return rows.length === 1;
}
