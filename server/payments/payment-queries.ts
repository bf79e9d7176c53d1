import { and, asc, eq, lt, sql } from 'drizzle-orm';
import { customerOrder, payment, webhookEvent } from '#db/schema/orders.ts';
import { standingTurn } from '#db/schema/standing-orders.ts';
import type { Db, Tx } from '#server/deps.ts';

export type PaymentRow = typeof payment.$inferSelect;

/** Oldest first; a charge before the refund that was written with it. */
export function listPayments(db: Db | Tx, orderId: string): Promise<PaymentRow[]> {
  return db
    .select()
    .from(payment)
    .where(eq(payment.orderId, orderId))
    .orderBy(asc(payment.createdAt), asc(payment.kind), asc(payment.id));
}

export async function findPayment(db: Db | Tx, paymentId: string): Promise<PaymentRow | null> {
  const rows = await db.select().from(payment).where(eq(payment.id, paymentId));
  return rows[0] ?? null;
}

export async function findPaymentByProviderId(db: Db | Tx, providerId: string): Promise<PaymentRow | null> {
  const rows = await db.select().from(payment).where(eq(payment.providerId, providerId));
  return rows[0] ?? null;
}

/** Its own id; null when this charge is written down already. */
export async function insertCharge(
  tx: Tx,
  charge: { orderId: string; providerId: string; amountPence: number; reason?: 'order' | 'addition' },
): Promise<string | null> {
  const rows = await tx
    .insert(payment)
    .values({ reason: 'order', ...charge, kind: 'charge', state: 'done' })
    .onConflictDoNothing({ target: payment.providerId })
    .returning({ id: payment.id });
  return rows[0]?.id ?? null;
}

/** The rest of a deposit order, still to be taken; null when it has been asked for before. */
export async function insertBalance(tx: Tx, balance: { orderId: string; amountPence: number }): Promise<string | null> {
  const rows = await tx
    .insert(payment)
    .values({ ...balance, kind: 'charge', reason: 'balance', state: 'asked' })
    .onConflictDoNothing()
    .returning({ id: payment.id });
  return rows[0]?.id ?? null;
}

export async function findBalance(db: Db | Tx, orderId: string): Promise<PaymentRow | null> {
  const rows = await db
    .select()
    .from(payment)
    .where(and(eq(payment.orderId, orderId), eq(payment.kind, 'charge'), eq(payment.reason, 'balance')));
  return rows[0] ?? null;
}

/** One refund a reason and charge: null when it has been asked for before. */
export async function insertRefund(
  tx: Tx,
  refund: { orderId: string; reason: string; amountPence: number; chargeId: string },
): Promise<string | null> {
  const rows = await tx
    .insert(payment)
    .values({ ...refund, kind: 'refund', state: 'asked' })
    .onConflictDoNothing()
    .returning({ id: payment.id });
  return rows[0]?.id ?? null;
}

export async function updatePayment(
  db: Db | Tx,
  paymentId: string,
  change: Partial<Pick<PaymentRow, 'state' | 'providerId' | 'error' | 'attempt'>>,
): Promise<void> {
  await db.update(payment).set(change).where(eq(payment.id, paymentId));
}

/** Refunds that stand as failed, the oldest order first. */
export function listFailedRefunds(db: Db | Tx) {
  return db
    .select({
      paymentId: payment.id,
      orderNo: customerOrder.orderNo,
      name: customerOrder.name,
      amountPence: payment.amountPence,
      reason: payment.reason,
      error: payment.error,
    })
    .from(payment)
    .innerJoin(customerOrder, eq(customerOrder.id, payment.orderId))
    .where(and(eq(payment.kind, 'refund'), eq(payment.state, 'failed')))
    .orderBy(asc(customerOrder.orderNo), asc(payment.createdAt));
}

/** False when this event has been here before. */
export async function insertEvent(
  tx: Tx,
  event: { eventId: string; type: string; payload: unknown },
): Promise<boolean> {
  const rows = await tx
    .insert(webhookEvent)
    .values(event)
    .onConflictDoNothing()
    .returning({ id: webhookEvent.eventId });
  return rows.length === 1;
}

export async function hasEvent(db: Db, eventId: string): Promise<boolean> {
  const rows = await db
    .select({ id: webhookEvent.eventId })
    .from(webhookEvent)
    .where(eq(webhookEvent.eventId, eventId));
  return rows.length > 0;
}

/**
 * Holds that went to payment before `since`: their word may have been lost. A standing order's box is held without a
 * page until its card is charged.
 */
export function listHeldOrders(db: Db, since: Date) {
  return db
    .select()
    .from(customerOrder)
    .where(
      and(
        eq(customerOrder.isHeld, true),
        lt(customerOrder.reachedPaymentAt, since),
        sql`(${customerOrder.sessionId} is not null or not exists (select 1 from ${standingTurn}
          where ${standingTurn.orderId} = ${customerOrder.id} and ${standingTurn.state} in ('planned', 'failed')))`,
      ),
    )
    .orderBy(asc(customerOrder.reachedPaymentAt))
    .limit(200);
}
