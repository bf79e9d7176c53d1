import { inArray, sql } from 'drizzle-orm';
import { stockMovement, type PLACES } from '#db/schema/packs.ts';
import type { Db, Tx } from '#server/deps.ts';

export type Place = (typeof PLACES)[number];
type Balance = { carcaseId: string; packId: string | null; place: Place; grams: number };

/** Grams there now, by carcase, pack and place: the sum of all that came less all that went. Places at zero are left out. */
export async function listBalances(db: Db | Tx, carcaseIds: readonly string[]): Promise<Balance[]> {
  const rows = await db
    .select()
    .from(stockMovement)
    .where(inArray(stockMovement.carcaseId, [...carcaseIds]));
  const balances = new Map<string, Balance>();
  const add = (place: Place | null, row: (typeof rows)[number], grams: number) => {
    if (place === null) return;
    // Grams that leave the carcase for a pack name the pack; what stays behind belongs to no pack.
    const packId = place === 'carcase' ? null : row.packId;
    const key = `${row.carcaseId} ${packId ?? ''} ${place}`;
    const before = balances.get(key)?.grams ?? 0;
    balances.set(key, { carcaseId: row.carcaseId, packId, place, grams: before + grams });
  };
  for (const row of rows) {
    add(row.fromPlace, row, -row.grams);
    add(row.toPlace, row, row.grams);
  }
  return [...balances.values()].filter((balance) => balance.grams !== 0);
}

export type Movement = typeof stockMovement.$inferInsert;

export async function recordMovements(tx: Tx, movements: Movement[]): Promise<void> {
  if (movements.length > 0) await tx.insert(stockMovement).values(movements);
}

/** Carcases that have entered the ledger. */
export async function listLedgerCarcases(db: Db | Tx, carcaseIds: readonly string[]): Promise<Set<string>> {
  const rows = await db
    .select({ carcaseId: stockMovement.carcaseId, grams: sql<string>`sum(${stockMovement.grams})` })
    .from(stockMovement)
    .where(inArray(stockMovement.carcaseId, [...carcaseIds]))
    .groupBy(stockMovement.carcaseId);
  return new Set(rows.map((row) => row.carcaseId));
}
