import { and, asc, desc, eq, max, sql } from 'drizzle-orm';
import { cuttingDay, cuttingSpecification } from '#db/schema/carcases.ts';
import { cut } from '#db/schema/products.ts';
import type { Db, Tx } from '#server/deps.ts';
import type { Cut } from '#shared/engine/figures/specification.ts';

/** An edition without its body. */
const EDITION = {
  id: cuttingSpecification.id,
  name: cuttingSpecification.name,
  edition: cuttingSpecification.edition,
  origin: cuttingSpecification.origin,
  retiredAt: cuttingSpecification.retiredAt,
  createdAt: cuttingSpecification.createdAt,
  bodyId: sql<string>`${cuttingSpecification.body}->>'id'`,
};

export type EditionRow = Awaited<ReturnType<typeof listEditions>>[number];
export type NewEdition = typeof cuttingSpecification.$inferInsert;

/** By name, the newest edition of each first. */
export function listEditions(db: Db | Tx) {
  return db
    .select(EDITION)
    .from(cuttingSpecification)
    .orderBy(asc(cuttingSpecification.name), desc(cuttingSpecification.edition));
}

export async function findEdition(db: Db | Tx, specificationId: string): Promise<EditionRow | null> {
  const rows = await db.select(EDITION).from(cuttingSpecification).where(eq(cuttingSpecification.id, specificationId));
  return rows[0] ?? null;
}

export async function findLatestEdition(db: Db | Tx, name: string): Promise<EditionRow | null> {
  const rows = await db
    .select(EDITION)
    .from(cuttingSpecification)
    .where(eq(cuttingSpecification.name, name))
    .orderBy(desc(cuttingSpecification.edition))
    .limit(1);
  return rows[0] ?? null;
}

/** The newest edition that was brought back to the shipped figures; 0 when none was. */
export async function lastRestoredEdition(db: Db | Tx, name: string): Promise<number> {
  const rows = await db
    .select({ edition: max(cuttingSpecification.edition) })
    .from(cuttingSpecification)
    .where(and(eq(cuttingSpecification.name, name), eq(cuttingSpecification.origin, 'restored')));
  return rows[0]?.edition ?? 0;
}

export function listDaysOfEditions(db: Db | Tx) {
  return db
    .select({
      id: cuttingDay.id,
      day: cuttingDay.day,
      state: cuttingDay.state,
      specificationId: cuttingDay.specificationId,
    })
    .from(cuttingDay)
    .orderBy(desc(cuttingDay.day));
}

/** Null when somebody else saved this edition first. */
export async function insertEdition(tx: Tx, row: NewEdition): Promise<string | null> {
  const rows = await tx
    .insert(cuttingSpecification)
    .values(row)
    .onConflictDoNothing()
    .returning({ id: cuttingSpecification.id });
  return rows[0]?.id ?? null;
}

export async function setRetired(tx: Tx, name: string, retiredAt: Date | null): Promise<void> {
  await tx.update(cuttingSpecification).set({ retiredAt }).where(eq(cuttingSpecification.name, name));
}

/** Cuts that the farm has not had yet enter with the prices of the specification, off the loose counter. */
export async function insertMissingCuts(tx: Tx, cuts: readonly Cut[]): Promise<void> {
  const rows = cuts.map((one) => ({
    id: one.id,
    name: one.name,
    description: one.description,
    cooking: one.cooking,
    tenthPencePerKg: one.tenthPencePerKg,
    clearanceTenthPencePerKg: one.clearanceTenthPencePerKg,
    minPackGrams: one.minPackGrams,
    maxPackGrams: one.maxPackGrams,
    looseDemandPacks: 0,
    isSoldLoose: false,
    isFarmMinced: one.kind === 'mince',
    useByDays: one.useByDays,
  }));
  await tx.insert(cut).values(rows).onConflictDoNothing();
}
