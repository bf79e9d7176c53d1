import { and, desc, eq, isNotNull, sql } from 'drizzle-orm';
import { consentEntry, marketingContact } from '#db/schema/customers.ts';
import { mailMessage } from '#db/schema/mail.ts';
import type { Db, Tx } from '#server/deps.ts';

export type ContactRow = typeof marketingContact.$inferSelect;

/** Makes the address known, or turns it; null when it stood so already. */
export async function turnContact(
  tx: Tx,
  contact: { email: string; token: string; isSubscribed: boolean },
): Promise<string | null> {
  const rows = await tx
    .insert(marketingContact)
    .values(contact)
    .onConflictDoUpdate({
      target: marketingContact.email,
      set: { isSubscribed: contact.isSubscribed },
      setWhere: sql`${marketingContact.isSubscribed} <> ${contact.isSubscribed}`,
    })
    .returning({ id: marketingContact.id });
  return rows[0]?.id ?? null;
}

export async function insertConsent(tx: Tx, entry: typeof consentEntry.$inferInsert): Promise<void> {
  await tx.insert(consentEntry).values(entry);
}

/** By address, in lower case, or by its token. */
export async function findContact(
  db: Db | Tx,
  where: { email: string } | { token: string },
): Promise<ContactRow | null> {
  const rows = await db
    .select()
    .from(marketingContact)
    .where('email' in where ? eq(marketingContact.email, where.email) : eq(marketingContact.token, where.token));
  return rows[0] ?? null;
}

/** Each yes and no of an address, the newest first. */
export function listConsents(db: Db | Tx, email: string) {
  return db
    .select({
      isGiven: consentEntry.isGiven,
      wordingVersion: consentEntry.wordingVersion,
      source: consentEntry.source,
      createdAt: consentEntry.createdAt,
    })
    .from(consentEntry)
    .innerJoin(marketingContact, eq(marketingContact.id, consentEntry.contactId))
    .where(eq(marketingContact.email, email))
    .orderBy(desc(consentEntry.createdAt));
}

/** Marketing mail that waits in the outbox must not leave after a no. */
export async function dropQueuedMarketing(tx: Tx, email: string): Promise<void> {
  await tx
    .delete(mailMessage)
    .where(
      and(
        sql`lower(${mailMessage.toAddress}) = ${email}`,
        eq(mailMessage.state, 'queued'),
        isNotNull(mailMessage.unsubscribeUrl),
      ),
    );
}
