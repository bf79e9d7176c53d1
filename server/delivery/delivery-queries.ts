import { and, asc, eq, sql } from 'drizzle-orm';
import { deliveryArea } from '#db/schema/delivery.ts';
import { collectionPoint, collectionSlot } from '#db/schema/orders.ts';
import type { DeliveryAreaEdit } from '#shared/contracts/delivery.ts';
import type { Db, Tx } from '#server/deps.ts';

export type AreaRow = typeof deliveryArea.$inferSelect;
export type RoundRow = typeof collectionSlot.$inferSelect;

export function listAreas(db: Db | Tx): Promise<AreaRow[]> {
  return db.select().from(deliveryArea).orderBy(asc(deliveryArea.name), asc(deliveryArea.id));
}

export async function findArea(db: Db | Tx, areaId: string): Promise<AreaRow | null> {
  const rows = await db.select().from(deliveryArea).where(eq(deliveryArea.id, areaId));
  return rows[0] ?? null;
}

/** An area stands for a point whose times are the van's rounds. */
export async function insertArea(tx: Tx, area: DeliveryAreaEdit): Promise<AreaRow> {
  const points = await tx
    .insert(collectionPoint)
    .values({
      name: area.name,
      addressLines: [],
      directions: 'We ring or knock; the box is too good to leave in the sun.',
      bring: 'Somebody at home, and room in the fridge or freezer.',
      kind: 'van',
    })
    .returning({ id: collectionPoint.id });
  const rows = await tx
    .insert(deliveryArea)
    .values({ ...area, pointId: points[0]?.id ?? '' })
    .returning();
  const row = rows[0];
  if (!row) throw new Error('The delivery area was not kept.');
  return row;
}

/** Null when another edit came first. */
export async function updateArea(
  tx: Tx,
  { areaId, version, area }: { areaId: string; version: number; area: DeliveryAreaEdit },
): Promise<AreaRow | null> {
  const rows = await tx
    .update(deliveryArea)
    .set({ ...area, version: sql`${deliveryArea.version} + 1` })
    .where(and(eq(deliveryArea.id, areaId), eq(deliveryArea.version, version)))
    .returning();
  const row = rows[0];
  if (!row) return null;
  await tx.update(collectionPoint).set({ name: area.name }).where(eq(collectionPoint.id, row.pointId));
  return row;
}

type Round = Pick<RoundRow, 'pointId' | 'cuttingDayId' | 'startsAt' | 'endsAt' | 'capacity'>;

export async function findRound(db: Db | Tx, { pointId, startsAt }: Round): Promise<RoundRow | null> {
  const rows = await db
    .select()
    .from(collectionSlot)
    .where(and(eq(collectionSlot.pointId, pointId), eq(collectionSlot.startsAt, startsAt)));
  return rows[0] ?? null;
}

/** The round as it stands, made by the first who needs it. */
export async function ensureRound(tx: Tx, round: Round): Promise<RoundRow> {
  await tx.insert(collectionSlot).values(round).onConflictDoNothing();
  const row = await findRound(tx, round);
  if (!row) throw new Error('The round was not kept.');
  return row;
}

/** Places where people collect on a cutting day. */
export function listPointsOfDay(db: Db | Tx, dayId: string) {
  return db
    .selectDistinct({ name: collectionPoint.name, addressLines: collectionPoint.addressLines })
    .from(collectionPoint)
    .innerJoin(collectionSlot, eq(collectionSlot.pointId, collectionPoint.id))
    .where(
      and(
        eq(collectionSlot.cuttingDayId, dayId),
        eq(collectionPoint.kind, 'collection'),
        eq(collectionPoint.isActive, true),
      ),
    );
}
