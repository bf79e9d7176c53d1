import { and, eq, inArray, isNull, sql } from 'drizzle-orm';
import { pack, packAssignment, stockMovement } from '#db/schema/packs.ts';
import type { Db, Tx } from '#server/deps.ts';
import type { FullReservation, LineRow } from './trade-queries.ts';

type Placed = Pick<LineRow, 'side' | 'unitKind'>;

/** The ledger's words for a piece that leaves whole; a piece of a side can leave only once. */
export function dispatchReason(reservationNo: number, { side, unitKind }: Placed): string {
  return `reservation ${reservationNo}: ${side ?? ''} ${unitKind ?? ''}`;
}

export type TradePack = { lineId: string; packId: string; carcaseId: string; code: string; grams: number };

/** Packs that are filled for the lines of a reservation, gone or still in the chiller. */
export async function listTradePacks(db: Db | Tx, lineIds: readonly string[]): Promise<TradePack[]> {
  const rows = await db
    .select({
      lineId: packAssignment.reservationLineId,
      packId: pack.id,
      carcaseId: pack.carcaseId,
      code: pack.code,
      grams: pack.grams,
    })
    .from(packAssignment)
    .innerJoin(pack, eq(pack.id, packAssignment.packId))
    .where(and(eq(packAssignment.isLive, true), inArray(packAssignment.reservationLineId, [...lineIds])))
    .orderBy(pack.code);
  return rows.flatMap((row) => (row.lineId ? [{ ...row, lineId: row.lineId }] : []));
}

/** Grams that left for the butcher, by line: what the scale said of a piece, and what the packs of a cut weigh. */
export async function readDispatched(db: Db | Tx, rows: readonly FullReservation[]): Promise<Map<string, number>> {
  const gone = rows.filter((row) => row.state === 'dispatched');
  const grams = new Map<string, number>();
  const lineIds = gone.flatMap((row) => row.lines.map((line) => line.id));
  if (lineIds.length === 0) return grams;
  for (const { lineId, grams: each } of await listTradePacks(db, lineIds)) {
    grams.set(lineId, (grams.get(lineId) ?? 0) + each);
  }
  const weighed = await listWholePieces(db);
  for (const { reservationNo, lines } of gone) {
    for (const line of lines.filter((each) => each.kind === 'unit')) {
      const found = weighed.get(`${line.carcaseId ?? ''} ${dispatchReason(reservationNo, line)}`);
      if (found !== undefined) grams.set(line.id, found);
    }
    for (const line of lines.filter((each) => each.kind === 'cut')) grams.set(line.id, grams.get(line.id) ?? 0);
  }
  return grams;
}

async function listWholePieces(db: Db | Tx): Promise<Map<string, number>> {
  const rows = await db
    .select({
      carcaseId: stockMovement.carcaseId,
      reason: stockMovement.reason,
      grams: sql<number>`sum(${stockMovement.grams})::int`,
    })
    .from(stockMovement)
    .where(and(eq(stockMovement.toPlace, 'trade'), isNull(stockMovement.packId)))
    .groupBy(stockMovement.carcaseId, stockMovement.reason);
  return new Map(rows.map((row) => [`${row.carcaseId} ${row.reason}`, row.grams]));
}
