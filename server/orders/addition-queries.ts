import { and, asc, eq, lt } from 'drizzle-orm';
import { offer } from '#db/schema/allocations.ts';
import { orderAddition, orderAdditionLine } from '#db/schema/order-additions.ts';
import type { Db, Tx } from '#server/deps.ts';
import type { HeldLine } from './hold.ts';

export type AdditionRow = typeof orderAddition.$inferSelect;

export async function insertAddition(
  tx: Tx,
  addition: Pick<AdditionRow, 'orderId' | 'amountPence' | 'reachedPaymentAt'>,
  lines: readonly HeldLine[],
): Promise<AdditionRow> {
  const rows = await tx.insert(orderAddition).values(addition).returning();
  const row = rows[0];
  if (!row) throw new Error('The addition was not kept.');
  await tx.insert(orderAdditionLine).values(
    lines.map(({ offerId, quantity, unitPricePence, unitGrams, name }) => ({
      ...{ additionId: row.id, offerId, quantity, unitPricePence, unitGrams, name },
    })),
  );
  return row;
}

export async function findOpenAddition(db: Db | Tx, orderId: string): Promise<AdditionRow | null> {
  const rows = await db
    .select()
    .from(orderAddition)
    .where(and(eq(orderAddition.orderId, orderId), eq(orderAddition.state, 'open')));
  return rows[0] ?? null;
}

/** After the order's own row, as every change of an order begins there. */
export async function lockAddition(tx: Tx, additionId: string): Promise<AdditionRow | null> {
  const rows = await tx.select().from(orderAddition).where(eq(orderAddition.id, additionId)).for('update');
  return rows[0] ?? null;
}

export function listAdditionLines(db: Db | Tx, additionId: string) {
  return db
    .select({
      offerId: orderAdditionLine.offerId,
      kind: offer.kind,
      quantity: orderAdditionLine.quantity,
      unitPricePence: orderAdditionLine.unitPricePence,
      unitGrams: orderAdditionLine.unitGrams,
      name: orderAdditionLine.name,
    })
    .from(orderAdditionLine)
    .innerJoin(offer, eq(offer.id, orderAdditionLine.offerId))
    .where(eq(orderAdditionLine.additionId, additionId))
    .orderBy(asc(orderAdditionLine.name), asc(orderAdditionLine.id));
}

export async function endAddition(tx: Tx, additionId: string, state: 'paid' | 'ended'): Promise<void> {
  await tx.update(orderAddition).set({ state, sessionUrl: null }).where(eq(orderAddition.id, additionId));
}

/** Keeps the page on which an addition is paid; false when it has ended meanwhile. */
export async function storeAdditionPage(
  db: Db,
  additionId: string,
  page: { id: string; url: string | null; expiresAt: Date },
): Promise<boolean> {
  const rows = await db
    .update(orderAddition)
    .set({ sessionId: page.id, sessionUrl: page.url, sessionExpiresAt: page.expiresAt })
    .where(and(eq(orderAddition.id, additionId), eq(orderAddition.state, 'open')))
    .returning({ id: orderAddition.id });
  return rows.length === 1;
}

/** Additions that went to payment before `since`: their word may have been lost. */
export function listOpenAdditions(db: Db, since: Date): Promise<AdditionRow[]> {
  return db
    .select()
    .from(orderAddition)
    .where(and(eq(orderAddition.state, 'open'), lt(orderAddition.reachedPaymentAt, since)))
    .orderBy(asc(orderAddition.reachedPaymentAt))
    .limit(200);
}
