import { and, asc, count, desc, eq, inArray, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import { user } from '#db/schema/auth.ts';
import { carcase, cuttingDay, cuttingSpecification } from '#db/schema/carcases.ts';
import { specificationCorrection, specificationCorrectionSide } from '#db/schema/corrections.ts';
import type { Db, Tx } from '#server/deps.ts';
import type { SideName } from '#shared/engine/cutout/cutout-types.ts';

export type SideId = { carcaseId: string; side: SideName };

/** Holds other decisions on this specification back until this one is written. */
export async function lockEdition(tx: Tx, specificationId: string): Promise<void> {
  await tx
    .select({ id: cuttingSpecification.id })
    .from(cuttingSpecification)
    .where(eq(cuttingSpecification.id, specificationId))
    .for('no key update');
}

/** Closed days that were cut by any edition of the name and have a side to decide on, the earliest first. */
export async function listUndecidedDays(db: Db | Tx, name: string): Promise<string[]> {
  const decided = sql`select count(*) from ${specificationCorrectionSide} where ${specificationCorrectionSide.carcaseId} = ${carcase.id}`;
  const hasOpenSide = sql`exists (select 1 from ${carcase} where ${carcase.cuttingDayId} = ${cuttingDay.id} and (${decided}) < 2)`;
  const rows = await db
    .select({ id: cuttingDay.id })
    .from(cuttingDay)
    .innerJoin(cuttingSpecification, eq(cuttingSpecification.id, cuttingDay.specificationId))
    .where(and(eq(cuttingSpecification.name, name), eq(cuttingDay.state, 'closed'), hasOpenSide))
    .orderBy(asc(cuttingDay.day));
  return rows.map(({ id }) => id);
}

export async function listDecidedSides(db: Db | Tx, carcaseIds: readonly string[]): Promise<SideId[]> {
  if (carcaseIds.length === 0) return [];
  return db
    .select({ carcaseId: specificationCorrectionSide.carcaseId, side: specificationCorrectionSide.side })
    .from(specificationCorrectionSide)
    .where(inArray(specificationCorrectionSide.carcaseId, [...carcaseIds]));
}

/** Every decision on a specification of this name, the newest first. */
export function listCorrections(db: Db | Tx, name: string) {
  const result = alias(cuttingSpecification, 'result');
  return db
    .select({
      id: specificationCorrection.id,
      decision: specificationCorrection.decision,
      decidedAt: specificationCorrection.createdAt,
      by: user.name,
      rows: specificationCorrection.rows,
      sides: count(specificationCorrectionSide.id),
      basedOnEdition: cuttingSpecification.edition,
      resultEdition: result.edition,
    })
    .from(specificationCorrection)
    .innerJoin(cuttingSpecification, eq(cuttingSpecification.id, specificationCorrection.specificationId))
    .innerJoin(user, eq(user.id, specificationCorrection.byUserId))
    .leftJoin(result, eq(result.id, specificationCorrection.resultId))
    .leftJoin(specificationCorrectionSide, eq(specificationCorrectionSide.correctionId, specificationCorrection.id))
    .where(eq(cuttingSpecification.name, name))
    .groupBy(specificationCorrection.id, user.name, cuttingSpecification.edition, result.edition)
    .orderBy(desc(specificationCorrection.createdAt));
}

export async function findCorrectionByKey(db: Db | Tx, key: string) {
  const rows = await db
    .select({
      decision: specificationCorrection.decision,
      resultId: specificationCorrection.resultId,
      resultEdition: cuttingSpecification.edition,
    })
    .from(specificationCorrection)
    .leftJoin(cuttingSpecification, eq(cuttingSpecification.id, specificationCorrection.resultId))
    .where(eq(specificationCorrection.key, key));
  return rows[0] ?? null;
}

export async function insertCorrection(
  tx: Tx,
  row: typeof specificationCorrection.$inferInsert,
  sides: readonly SideId[],
): Promise<string> {
  const rows = await tx.insert(specificationCorrection).values(row).returning({ id: specificationCorrection.id });
  const correctionId = rows[0]?.id ?? '';
  await tx
    .insert(specificationCorrectionSide)
    .values(sides.map(({ carcaseId, side }) => ({ correctionId, carcaseId, side })));
  return correctionId;
}
