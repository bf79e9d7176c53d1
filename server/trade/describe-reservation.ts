import type { Reservation } from '#shared/contracts/trade.ts';
import { formatEarTag } from '#shared/domain/ear-tag.ts';
import { priceForWeight } from '#shared/domain/money.ts';
import { listUnits } from '#shared/domain/trade-unit.ts';
import { scale } from '#shared/engine/rounding.ts';
import type { Cutout, SideSupply } from '#shared/engine/cutout/cutout-types.ts';
import { findPublishedAllocation, type AllocationRow } from '#server/allocation/allocation-queries.ts';
import { loadDayCutouts, type DayCutouts } from '#server/carcases/day-figures.ts';
import type { Db, Tx } from '#server/deps.ts';
import { readProductNames, type ProductNames } from './product-names.ts';
import type { FullReservation, LineRow } from './trade-queries.ts';

export type DayContext = { figures: DayCutouts; published: AllocationRow | null };

/** Reservations with the grams that their units weigh by the newest figures of their day. */
export async function describeReservations(db: Db | Tx, rows: readonly FullReservation[]): Promise<Reservation[]> {
  const names = await readProductNames(db);
  const days = new Map<string, DayContext>();
  for (const dayId of new Set(rows.map((row) => row.cuttingDayId))) {
    const published = await findPublishedAllocation(db, dayId);
    days.set(dayId, { figures: await loadDayCutouts(db, dayId), published });
  }
  return rows.flatMap((row) => {
    const day = days.get(row.cuttingDayId);
    return day ? [describeReservation(row, { day, names })] : [];
  });
}

type Context = { day: DayContext; names: ProductNames };

function describeReservation(row: FullReservation, context: Context): Reservation {
  const lines = row.lines.map((line) => describeLine(line, context));
  return {
    id: row.id,
    reservationNo: row.reservationNo,
    businessName: row.businessName,
    dayId: row.cuttingDayId,
    day: row.day,
    state: row.state,
    cuttingNote: row.cuttingNote,
    answer: row.answer,
    createdAt: row.createdAt.toISOString(),
    version: row.version,
    lines,
    totalPence: lines.reduce((sum, line) => sum + line.linePence, 0),
  };
}

function describeLine(line: LineRow, { day, names }: Context): Reservation['lines'][number] {
  const side = line.unitKind ? sideOf(line, day) : null;
  const grams = line.grams ?? unitGrams(line.unitKind ?? 'side', side ? [side] : day.figures.sides);
  const carcase = day.figures.carcases.find((candidate) => candidate.row.id === side?.carcaseId);
  const product = line.cutId ? `cut:${line.cutId}` : (line.unitKind ?? '');
  const { dispatchedGrams, basis } = line;
  const chargedGrams =
    basis === 'cold weight' && carcase ? coldGrams(grams, carcase.cutout) : (dispatchedGrams ?? grams);
  return {
    id: line.id,
    kind: line.kind,
    name: names.get(product) ?? product,
    earTag: carcase ? formatEarTag(carcase.row.animal.earTag) : null,
    side: side?.side ?? null,
    grams,
    dispatchedGrams,
    tenthPencePerKg: line.tenthPencePerKg,
    basis,
    chargedGrams,
    linePence: priceForWeight(chargedGrams, line.tenthPencePerKg),
  };
}

/** A unit's part of the kill sheet's cold weight: its share of what is hung before any loss on the hook. */
function coldGrams(grams: number, { cold, hung }: Cutout): number {
  return hung.grams === 0 ? grams : scale(grams, cold.grams, hung.grams);
}

/** The side that the line names, else the one that the published plan gives it. */
export function sideOf(line: LineRow, { figures, published }: DayContext): SideSupply | null {
  const planned = published?.plan.plan.trade.find((candidate) => candidate.lineId === line.id)?.units[0]?.sideId;
  const id = line.carcaseId && line.side ? `${line.carcaseId}/${line.side}` : planned;
  return figures.sides.find((side) => side.id === id) ?? null;
}

/** Mean over the sides that could serve it while none is named. */
function unitGrams(unitKind: string, sides: readonly SideSupply[]): number {
  const grams = sides
    .flatMap((side) => listUnits(side).filter((unit) => unit.unitKind === unitKind))
    .map((unit) => unit.grams);
  return grams.length === 0
    ? 0
    : scale(
        grams.reduce((sum, each) => sum + each, 0),
        1,
        grams.length,
      );
}
