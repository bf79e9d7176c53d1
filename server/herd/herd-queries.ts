import { and, asc, desc, eq, inArray, sql } from 'drizzle-orm';
import { carcase } from '#db/schema/carcases.ts';
import { animal, medicineRecord } from '#db/schema/herd.ts';
import type { NewAnimal } from '#shared/contracts/herd.ts';
import type { Db, Tx } from '#server/deps.ts';

export type AnimalRow = typeof animal.$inferSelect;
export type MedicineRow = typeof medicineRecord.$inferSelect;
export type AnimalCarcase = { id: string; animalId: string; state: string; killDay: string; cuttingDayId: string };

export function listAnimalRows(db: Db | Tx): Promise<AnimalRow[]> {
  return db.select().from(animal).orderBy(asc(animal.born), asc(animal.earTag));
}

export async function findAnimal(db: Db | Tx, animalId: string): Promise<AnimalRow | null> {
  const rows = await db.select().from(animal).where(eq(animal.id, animalId));
  return rows[0] ?? null;
}

/** Waits for anyone else who is changing this animal. */
export async function lockAnimal(tx: Tx, animalId: string): Promise<AnimalRow | null> {
  const rows = await tx.select().from(animal).where(eq(animal.id, animalId)).for('update');
  return rows[0] ?? null;
}

/** In id order, so that two bookings of the same animals wait for each other instead of blocking each other. */
export function lockAnimals(tx: Tx, animalIds: readonly string[]): Promise<AnimalRow[]> {
  return tx
    .select()
    .from(animal)
    .where(inArray(animal.id, [...animalIds]))
    .orderBy(asc(animal.id))
    .for('update');
}

/** Null when the ear tag is in the herd already. */
export async function insertAnimal(db: Db | Tx, values: NewAnimal): Promise<AnimalRow | null> {
  const rows = await db.insert(animal).values(values).onConflictDoNothing({ target: animal.earTag }).returning();
  return rows[0] ?? null;
}

export async function findAnimalByEarTag(db: Db | Tx, earTag: string): Promise<AnimalRow | null> {
  const rows = await db.select().from(animal).where(eq(animal.earTag, earTag));
  return rows[0] ?? null;
}

/** False when another edit came first. */
export async function updateAnimal(
  db: Db | Tx,
  animalId: string,
  edit: { version: number; values: NewAnimal },
): Promise<boolean> {
  const rows = await db
    .update(animal)
    .set({ ...edit.values, version: sql`${animal.version} + 1` })
    .where(and(eq(animal.id, animalId), eq(animal.version, edit.version)))
    .returning({ id: animal.id });
  return rows.length === 1;
}

export async function insertMedicine(
  db: Db | Tx,
  values: { animalId: string; product: string; givenOn: string; withdrawalDays: number },
): Promise<void> {
  await db.insert(medicineRecord).values(values);
}

export function listMedicines(db: Db | Tx, animalIds: readonly string[]): Promise<MedicineRow[]> {
  return db
    .select()
    .from(medicineRecord)
    .where(inArray(medicineRecord.animalId, [...animalIds]))
    .orderBy(desc(medicineRecord.givenOn), asc(medicineRecord.id));
}

export function listAnimalCarcases(db: Db | Tx, animalIds: readonly string[]): Promise<AnimalCarcase[]> {
  return db
    .select({
      id: carcase.id,
      animalId: carcase.animalId,
      state: carcase.state,
      killDay: carcase.killDay,
      cuttingDayId: carcase.cuttingDayId,
    })
    .from(carcase)
    .where(inArray(carcase.animalId, [...animalIds]));
}
