import { asc, eq } from 'drizzle-orm';
import { boxPhotograph } from '#db/schema/photographs.ts';
import { boxKind } from '#db/schema/products.ts';
import type { Db, Tx } from '#server/deps.ts';

/** Without the bytes: what a page needs to leave room and to ask for the picture. */
export function listOfBox(db: Db | Tx, box: { id: string } | { slug: string }) {
  return db
    .select({
      id: boxPhotograph.id,
      hash: boxPhotograph.hash,
      width: boxPhotograph.width,
      height: boxPhotograph.height,
      alt: boxPhotograph.alt,
    })
    .from(boxPhotograph)
    .innerJoin(boxKind, eq(boxKind.id, boxPhotograph.boxKindId))
    .where('id' in box ? eq(boxKind.id, box.id) : eq(boxKind.slug, box.slug))
    .orderBy(asc(boxPhotograph.createdAt));
}

export async function findBytes(db: Db, hash: string) {
  const rows = await db
    .select({ contentType: boxPhotograph.contentType, bytes: boxPhotograph.bytes })
    .from(boxPhotograph)
    .where(eq(boxPhotograph.hash, hash))
    .limit(1);
  return rows[0] ?? null;
}

export async function hasBoxKind(db: Db | Tx, boxKindId: string): Promise<boolean> {
  const rows = await db.select({ id: boxKind.id }).from(boxKind).where(eq(boxKind.id, boxKindId));
  return rows.length > 0;
}

/** The same picture a second time is the first one. */
export async function insertPhotograph(tx: Tx, row: typeof boxPhotograph.$inferInsert): Promise<void> {
  await tx.insert(boxPhotograph).values(row).onConflictDoNothing();
}

/** The kind of box that it was of; null when there is no such picture. */
export async function deletePhotograph(tx: Tx, photographId: string): Promise<string | null> {
  const rows = await tx
    .delete(boxPhotograph)
    .where(eq(boxPhotograph.id, photographId))
    .returning({ boxKindId: boxPhotograph.boxKindId });
  return rows[0]?.boxKindId ?? null;
}
