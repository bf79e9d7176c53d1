import type { NewReservation, ReservationLineRequest } from '#shared/contracts/trade.ts';
import { listUnits, type SideUnit } from '#shared/domain/trade-unit.ts';
import type { SideSupply } from '#shared/engine/cutout/cutout-types.ts';
import { AppError } from '#shared/errors.ts';
import type { DayCutouts } from '#server/carcases/day-figures.ts';
import type { AccountRow, NewLine } from './trade-queries.ts';

/** Each line at the butcher's own price. Refuses, beside its line, what has no price or what the day cannot give. */
export function priceLines(account: AccountRow, wanted: NewReservation, figures: DayCutouts): NewLine[] {
  const fields: Record<string, string> = {};
  const lines = wanted.lines.map((line, index): NewLine => {
    const product = line.kind === 'unit' ? line.unitKind : `cut:${line.cutId}`;
    const price = account.prices.find((candidate) => candidate.product === product);
    const refusal = price ? whyNot(line, figures) : 'There is no price agreed for this yet. Ask the farm.';
    if (refusal) fields[`lines.${index}`] = refusal;
    const tenthPencePerKg = price?.tenthPencePerKg ?? 0;
    if (line.kind === 'cut') return { kind: 'cut', cutId: line.cutId, grams: line.grams, tenthPencePerKg };
    const { unitKind, carcaseId, side } = line;
    return { kind: 'unit', unitKind, carcaseId, side, tenthPencePerKg, basis: price?.basis ?? 'scale weight' };
  });
  if (Object.keys(fields).length > 0) throw new AppError('INVALID_INPUT', 'Nothing was reserved.', { fields });
  return lines;
}

function whyNot(line: ReservationLineRequest, { specification, carcases, sides }: DayCutouts): string | null {
  if (line.kind === 'cut') {
    return specification.cuts.some((cut) => cut.id === line.cutId) ? null : 'This day does not make this cut.';
  }
  if (line.carcaseId !== null && !carcases.some(({ row }) => row.id === line.carcaseId)) {
    return 'This beast does not belong to this day.';
  }
  const fitting = sides.filter(
    (side) =>
      (line.carcaseId === null || side.carcaseId === line.carcaseId) && (line.side === null || side.side === line.side),
  );
  const units = fitting.flatMap((side) => namedUnits(side, line.unitKind));
  if (units.length === 0) return 'This day cuts no such piece.';
  return units.some(({ closedReason }) => closedReason === null) ? null : (units[0]?.closedReason ?? null);
}

/** A unit that carries vertebral column may be closed to trade, by the rule in force on the day of kill. */
function namedUnits(side: SideSupply, unitKind: string): (SideUnit & { closedReason: string | null })[] {
  return listUnits(side)
    .filter((unit) => unit.unitKind === unitKind)
    .map((unit) => ({ ...unit, closedReason: unit.hasVertebrae ? side.closedUnitReason : null }));
}
