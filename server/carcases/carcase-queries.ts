import { and, asc, eq, inArray, sql } from 'drizzle-orm';
import { carcase, cuttingDay, weighing } from '#db/schema/carcases.ts';
import { animal } from '#db/schema/herd.ts';
import type { Db, Tx } from '#server/deps.ts';

export type CarcaseRow = typeof carcase.$inferSelect;
export type NewCarcaseRow = typeof carcase.$inferInsert;
/** A carcase with the beast that it came from and the day on which it is cut. */
export type CarcaseOfDay = CarcaseRow & {
  animal: { earTag: string; sex: typeof animal.$inferSelect.sex; breed: string; born: string };
  day: string;
};

function selectCarcases(db: Db | Tx) {
  return db
    .select({
      carcase,
      animal: { earTag: animal.earTag, sex: animal.sex, breed: animal.breed, born: animal.born },
      day: cuttingDay.day,
    })
    .from(carcase)
    .innerJoin(animal, eq(animal.id, carcase.animalId))
    .innerJoin(cuttingDay, eq(cuttingDay.id, carcase.cuttingDayId));
}

type Selected = { carcase: CarcaseRow; animal: CarcaseOfDay['animal']; day: string };
const flatten = ({ carcase: row, animal: beast, day }: Selected): CarcaseOfDay => ({ ...row, animal: beast, day });

/** In a fixed order, so that the same day always reads the same. */
export async function listCarcasesOfDays(db: Db | Tx, dayIds: readonly string[]): Promise<CarcaseOfDay[]> {
  if (dayIds.length === 0) return [];
  const rows = await selectCarcases(db)
    .where(inArray(carcase.cuttingDayId, [...dayIds]))
    .orderBy(asc(carcase.killDay), asc(animal.earTag));
  return rows.map(flatten);
}

export async function findCarcase(db: Db | Tx, carcaseId: string): Promise<CarcaseOfDay | null> {
  const rows = await selectCarcases(db).where(eq(carcase.id, carcaseId));
  return rows[0] ? flatten(rows[0]) : null;
}

export async function insertCarcases(tx: Tx, rows: NewCarcaseRow[]): Promise<string[]> {
  const inserted = await tx.insert(carcase).values(rows).returning({ id: carcase.id });
  return inserted.map((row) => row.id);
}

/** False when another edit came first. */
export async function updateCarcase(
  tx: Tx,
  carcaseId: string,
  edit: { version: number; values: Partial<NewCarcaseRow> },
): Promise<boolean> {
  const rows = await tx
    .update(carcase)
    .set({ ...edit.values, version: sql`${carcase.version} + 1` })
    .where(and(eq(carcase.id, carcaseId), eq(carcase.version, edit.version)))
    .returning({ id: carcase.id });
  return rows.length === 1;
}

/** Measured grams by carcase and path. */
export async function listWeighings(
  db: Db | Tx,
  carcaseIds: readonly string[],
): Promise<Map<string, Record<string, number>>> {
  const byCarcase = new Map<string, Record<string, number>>(carcaseIds.map((id) => [id, {}]));
  if (carcaseIds.length === 0) return byCarcase;
  const rows = await db
    .select()
    .from(weighing)
    .where(inArray(weighing.carcaseId, [...carcaseIds]));
  for (const row of rows) {
    const measured = byCarcase.get(row.carcaseId);
    if (measured) measured[row.node] = row.grams;
  }
  return byCarcase;
}

export async function putWeighing(tx: Tx, row: { carcaseId: string; node: string; grams: number }): Promise<void> {
  await tx
    .insert(weighing)
    .values(row)
    .onConflictDoUpdate({ target: [weighing.carcaseId, weighing.node], set: { grams: row.grams } });
}

export async function removeWeighings(tx: Tx, carcaseId: string, nodes: readonly string[]): Promise<void> {
  if (nodes.length === 0) return;
  await tx.delete(weighing).where(and(eq(weighing.carcaseId, carcaseId), inArray(weighing.node, [...nodes])));
}

/** Nothing of them is left unaccounted. */
export async function markSoldThrough(tx: Tx, carcaseIds: readonly string[]): Promise<void> {
  await tx
    .update(carcase)
    .set({ state: 'sold through', version: sql`${carcase.version} + 1` })
    .where(inArray(carcase.id, [...carcaseIds]));
}
