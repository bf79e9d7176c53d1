import { and, eq, gt, inArray, like, or, sql } from 'drizzle-orm';
import { auditEntry } from '#db/schema/audit.ts';
import { user, verification } from '#db/schema/auth.ts';
import { customerProfile, marketingContact, orderFeedback } from '#db/schema/customers.ts';
import { mailMessage } from '#db/schema/mail.ts';
import { customerOrder, payment, webhookEvent } from '#db/schema/orders.ts';
import { promoUse } from '#db/schema/promo.ts';
import { tradeAccount } from '#db/schema/trade.ts';
import { waitingEntry } from '#db/schema/waiting-list.ts';
import type { Db, Tx } from '#server/deps.ts';

export async function findProfile(db: Db | Tx, userId: string) {
  const rows = await db
    .select({ name: user.name, email: user.email, phone: customerProfile.phone })
    .from(user)
    .leftJoin(customerProfile, eq(customerProfile.userId, user.id))
    .where(eq(user.id, userId));
  return rows[0] ?? null;
}

export async function saveProfile(
  tx: Tx,
  userId: string,
  { name, phone }: { name: string; phone: string },
): Promise<void> {
  await tx.update(user).set({ name }).where(eq(user.id, userId));
  await tx
    .insert(customerProfile)
    .values({ userId, phone })
    .onConflictDoUpdate({ target: customerProfile.userId, set: { phone } });
}

const CLOSING = 'close account ';

/** One link at a time: a newer one takes the place of the last. */
export async function keepClosingLink(
  tx: Tx,
  link: { userId: string; tokenHash: string; expiresAt: Date },
): Promise<void> {
  const identifier = `${CLOSING}${link.userId}`;
  await tx.delete(verification).where(eq(verification.identifier, identifier));
  await tx.insert(verification).values({ identifier, value: link.tokenHash, expiresAt: link.expiresAt });
}

/** The account that a link closes, locked; null when the link is used or too old. */
export async function lockClosing(tx: Tx, tokenHash: string, now: Date) {
  const links = await tx
    .select({ identifier: verification.identifier })
    .from(verification)
    .where(
      and(
        eq(verification.value, tokenHash),
        like(verification.identifier, `${CLOSING}%`),
        gt(verification.expiresAt, now),
      ),
    );
  const userId = links[0]?.identifier.slice(CLOSING.length);
  if (!userId) return null;
  const rows = await tx.select().from(user).where(eq(user.id, userId)).for('update');
  return rows[0] ?? null;
}

/** Orders of the account, and those that were placed with its address without signing in. */
export function listOrdersOf(db: Db | Tx, { userId, email }: { userId: string; email: string }) {
  return db
    .select({
      id: customerOrder.id,
      orderNo: customerOrder.orderNo,
      state: customerOrder.state,
      isHeld: customerOrder.isHeld,
      isMoneyMoving: sql<boolean>`exists (select 1 from ${payment} where ${payment.orderId} = ${customerOrder.id}
        and ${payment.state} = 'asked')`,
    })
    .from(customerOrder)
    .where(or(eq(customerOrder.userId, userId), sql`lower(${customerOrder.email}) = ${email.toLowerCase()}`))
    .orderBy(customerOrder.orderNo);
}

export async function hasTradeAccount(db: Db | Tx, userId: string): Promise<boolean> {
  const rows = await db.select({ id: tradeAccount.id }).from(tradeAccount).where(eq(tradeAccount.userId, userId));
  return rows.length > 0;
}

/** Takes out of orders who ordered; what was sold, when and for how much stays, as the books need it. */
export async function forgetOrders(tx: Tx, orderIds: readonly string[]): Promise<void> {
  if (orderIds.length === 0) return;
  const ids = [...orderIds];
  await tx
    .update(customerOrder)
    .set({
      ...{ userId: null, name: 'Account closed', email: 'closed@account.invalid', phone: '', note: '' },
      ...{ deliveryAddress: null, deliveryPostcode: null, providerCustomerId: null, providerMethodId: null },
    })
    .where(inArray(customerOrder.id, ids));
  await tx.update(orderFeedback).set({ words: '' }).where(inArray(orderFeedback.orderId, ids));
  await tx
    .update(promoUse)
    .set({ email: sql`'closed ' || ${promoUse.orderId}` })
    .where(inArray(promoUse.orderId, ids));
  // The payment company's messages name the payer; that they came, and for which order, is told by the payments.
  await tx
    .update(webhookEvent)
    .set({ payload: {} })
    .where(inArray(sql<string>`${webhookEvent.payload} #>> '{data,object,metadata,orderId}'`, ids));
  await tx.delete(mailMessage).where(inArray(mailMessage.orderId, ids));
}

/** Everything else that names the address, and the account itself with its sessions. */
export async function forgetPerson(tx: Tx, person: { id: string; email: string }): Promise<void> {
  const email = person.email.toLowerCase();
  await tx.delete(mailMessage).where(sql`lower(${mailMessage.toAddress}) = ${email}`);
  await tx.delete(marketingContact).where(eq(marketingContact.email, email));
  await tx.delete(waitingEntry).where(eq(waitingEntry.email, email));
  await tx
    .delete(verification)
    .where(or(eq(verification.identifier, `${CLOSING}${person.id}`), eq(verification.value, person.id)));
  await tx.update(auditEntry).set({ byUserId: null }).where(eq(auditEntry.byUserId, person.id));
  await tx.delete(user).where(eq(user.id, person.id));
}
