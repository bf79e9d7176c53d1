import type { Db } from '#db/client.ts';
import { collectionPoint } from '#db/schema/orders.ts';

export async function makeCollectionPoint(db: Db, more: Partial<typeof collectionPoint.$inferInsert> = {}) {
  const [row] = await db
    .insert(collectionPoint)
    .values({
      name: 'The farm gate',
      addressLines: ['Skelderwick Farm', 'ZZ1 1AA'],
      directions: 'Up the lane past the chapel.',
      bring: 'A cool bag and your order number.',
      ...more,
    })
    .returning();
  if (!row) throw new Error('Nothing was inserted.');
  return row;
}
