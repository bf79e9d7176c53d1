import { asc, eq, inArray, or, sql } from 'drizzle-orm';
import { session, user } from '#db/schema/auth.ts';
import { cuttingDay } from '#db/schema/carcases.ts';
import { orderFeedback } from '#db/schema/customers.ts';
import { mailMessage } from '#db/schema/mail.ts';
import { customerOrder, orderLine, payment } from '#db/schema/orders.ts';
import { boxKind } from '#db/schema/products.ts';
import { standingOrder } from '#db/schema/standing-orders.ts';
import { tradeAccount } from '#db/schema/trade.ts';
import { waitingEntry } from '#db/schema/waiting-list.ts';
import type { Db } from '#server/deps.ts';

export async function readPerson(db: Db, userId: string) {
  const rows = await db
    .select({ name: user.name, email: user.email, role: user.role, openedAt: user.createdAt })
    .from(user)
    .where(eq(user.id, userId));
  const sessions = await db
    .select({
      startedAt: session.createdAt,
      endsAt: session.expiresAt,
      from: session.ipAddress,
      with: session.userAgent,
    })
    .from(session)
    .where(eq(session.userId, userId))
    .orderBy(asc(session.createdAt));
  const trade = await db
    .select({
      businessName: tradeAccount.businessName,
      addressLines: tradeAccount.addressLines,
      phone: tradeAccount.phone,
    })
    .from(tradeAccount)
    .where(eq(tradeAccount.userId, userId));
  return { ...rows[0], sessions, trade: trade[0] ?? null };
}

/** Orders under the account or under its address, each with its lines, its money and what was said about it. */
export async function readOrders(db: Db, person: { id: string; email: string }) {
  const orders = await db
    .select({ order: customerOrder, day: cuttingDay.day, stars: orderFeedback.stars, words: orderFeedback.words })
    .from(customerOrder)
    .innerJoin(cuttingDay, eq(cuttingDay.id, customerOrder.cuttingDayId))
    .leftJoin(orderFeedback, eq(orderFeedback.orderId, customerOrder.id))
    .where(or(eq(customerOrder.userId, person.id), sql`lower(${customerOrder.email}) = ${person.email.toLowerCase()}`))
    .orderBy(asc(customerOrder.orderNo));
  const ids = orders.map(({ order }) => order.id);
  if (ids.length === 0) return { orders, lines: [], payments: [] };
  const lines = await db.select().from(orderLine).where(inArray(orderLine.orderId, ids)).orderBy(asc(orderLine.name));
  const payments = await db.select().from(payment).where(inArray(payment.orderId, ids)).orderBy(asc(payment.createdAt));
  return { orders, lines, payments };
}

export function listMailsTo(db: Db, email: string) {
  return db
    .select({
      kind: mailMessage.kind,
      subject: mailMessage.subject,
      text: mailMessage.text,
      state: mailMessage.state,
      sentAt: mailMessage.sentAt,
    })
    .from(mailMessage)
    .where(sql`lower(${mailMessage.toAddress}) = ${email.toLowerCase()}`)
    .orderBy(asc(mailMessage.createdAt));
}

export function listPlacesOf(db: Db, email: string) {
  return db
    .select({ box: boxKind.name, day: cuttingDay.day, state: waitingEntry.state, askedAt: waitingEntry.createdAt })
    .from(waitingEntry)
    .innerJoin(boxKind, eq(boxKind.id, waitingEntry.boxKindId))
    .leftJoin(cuttingDay, eq(cuttingDay.id, waitingEntry.cuttingDayId))
    .where(eq(waitingEntry.email, email.toLowerCase()))
    .orderBy(asc(waitingEntry.place));
}

export function listStandingOf(db: Db, userId: string) {
  return db
    .select({
      box: boxKind.name,
      quantity: standingOrder.quantity,
      everyWeeks: standingOrder.everyWeeks,
      state: standingOrder.state,
      phone: standingOrder.phone,
      terms: standingOrder.terms,
      startedAt: standingOrder.createdAt,
    })
    .from(standingOrder)
    .innerJoin(boxKind, eq(boxKind.id, standingOrder.boxKindId))
    .where(eq(standingOrder.userId, userId))
    .orderBy(asc(standingOrder.createdAt));
}
