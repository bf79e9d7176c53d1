import { and, count, desc, eq, isNull, or } from 'drizzle-orm';
import { promoCode, promoUse } from '#db/schema/promo.ts';
import type { NewPromoCode } from '#shared/contracts/promo.ts';
import type { Db, Tx } from '#server/deps.ts';

export type PromoRow = typeof promoCode.$inferSelect;

export async function findPromo(db: Db | Tx, code: string): Promise<PromoRow | null> {
  const rows = await db.select().from(promoCode).where(eq(promoCode.code, code));
  return rows[0] ?? null;
}

/** Whoever takes a code waits for the one before, so that its uses can be counted. */
export async function lockPromo(tx: Tx, code: string): Promise<PromoRow | null> {
  const rows = await tx.select().from(promoCode).where(eq(promoCode.code, code)).for('update');
  return rows[0] ?? null;
}

export function countUses(db: Db | Tx, promoId: string): Promise<number> {
  return db.$count(promoUse, eq(promoUse.promoId, promoId));
}

type Person = { email: string; userId: string | null };

export async function hasUsed(db: Db | Tx, promoId: string, { email, userId }: Person): Promise<boolean> {
  const isPerson = or(eq(promoUse.email, email), userId === null ? undefined : eq(promoUse.userId, userId));
  const rows = await db
    .select({ orderId: promoUse.orderId })
    .from(promoUse)
    .where(and(eq(promoUse.promoId, promoId), isPerson))
    .limit(1);
  return rows.length > 0;
}

export async function insertUse(tx: Tx, use: typeof promoUse.$inferInsert): Promise<void> {
  await tx.insert(promoUse).values(use);
}

/** An order that is given back or cancelled gives its code back too. */
export async function deleteUse(tx: Tx, orderId: string): Promise<void> {
  await tx.delete(promoUse).where(eq(promoUse.orderId, orderId));
}

export async function findCodeOfOrder(db: Db | Tx, orderId: string): Promise<string | null> {
  const rows = await db
    .select({ code: promoCode.code })
    .from(promoUse)
    .innerJoin(promoCode, eq(promoCode.id, promoUse.promoId))
    .where(eq(promoUse.orderId, orderId));
  return rows[0]?.code ?? null;
}

/** The newest first, with how often each is in use. */
export function listPromos(db: Db | Tx, promoId?: string) {
  return db
    .select({ promo: promoCode, uses: count(promoUse.orderId) })
    .from(promoCode)
    .leftJoin(promoUse, eq(promoUse.promoId, promoCode.id))
    .where(promoId ? eq(promoCode.id, promoId) : undefined)
    .groupBy(promoCode.id)
    .orderBy(desc(promoCode.createdAt), promoCode.code);
}

/** Null when this code exists already. */
export async function insertPromo(tx: Tx, code: NewPromoCode): Promise<string | null> {
  const rows = await tx
    .insert(promoCode)
    .values(code)
    .onConflictDoNothing({ target: promoCode.code })
    .returning({ id: promoCode.id });
  return rows[0]?.id ?? null;
}

/** False when it is closed already or does not exist. */
export async function closePromo(tx: Tx, promoId: string, closedAt: Date): Promise<boolean> {
  const rows = await tx
    .update(promoCode)
    .set({ closedAt })
    .where(and(eq(promoCode.id, promoId), isNull(promoCode.closedAt)))
    .returning({ id: promoCode.id });
  return rows.length === 1;
}
