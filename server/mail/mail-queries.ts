import { desc, eq, sql } from 'drizzle-orm';
import { mailMessage } from '#db/schema/mail.ts';
import type { Db, Tx } from '#server/deps.ts';

export type MailRow = typeof mailMessage.$inferSelect;
export type NewMailRow = typeof mailMessage.$inferInsert;

/** Null when a mail of this event is there already. */
export async function insertMail(db: Db | Tx, mail: NewMailRow): Promise<string | null> {
  const rows = await db.insert(mailMessage).values(mail).onConflictDoNothing().returning({ id: mailMessage.id });
  return rows[0]?.id ?? null;
}

export async function findMail(db: Db | Tx, mailId: string): Promise<MailRow | null> {
  const rows = await db.select().from(mailMessage).where(eq(mailMessage.id, mailId));
  return rows[0] ?? null;
}

export function listNewestMails(db: Db | Tx, limit: number): Promise<MailRow[]> {
  return db.select().from(mailMessage).orderBy(desc(mailMessage.createdAt)).limit(limit);
}

export async function recordAttempt(
  db: Db | Tx,
  mailId: string,
  result: { state: MailRow['state']; error: string | null; sentAt: Date | null },
): Promise<void> {
  await db
    .update(mailMessage)
    .set({
      state: result.state,
      lastError: result.error,
      sentAt: result.sentAt,
      attempts: sql`${mailMessage.attempts} + 1`,
    })
    .where(eq(mailMessage.id, mailId));
}

export async function lockMail(tx: Tx, mailId: string): Promise<MailRow | null> {
  const rows = await tx.select().from(mailMessage).where(eq(mailMessage.id, mailId)).for('update');
  return rows[0] ?? null;
}

/** Back into the queue with the same Message-ID, for a person's second try. */
export async function requeueMail(tx: Tx, mailId: string): Promise<MailRow> {
  const rows = await tx
    .update(mailMessage)
    .set({ state: 'queued', attempts: 0, lastError: null })
    .where(eq(mailMessage.id, mailId))
    .returning();
  const row = rows[0];
  if (!row) throw new Error(`The mail ${mailId} has gone.`);
  return row;
}

export async function markBounced(db: Db | Tx, mailId: string, reason: string): Promise<void> {
  await db.update(mailMessage).set({ state: 'bounced', lastError: reason }).where(eq(mailMessage.id, mailId));
}

export async function findMailByMessageId(db: Db | Tx, messageId: string): Promise<MailRow | null> {
  const rows = await db.select().from(mailMessage).where(eq(mailMessage.messageId, messageId));
  return rows[0] ?? null;
}
