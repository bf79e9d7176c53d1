import type { NewReservation, ReservationLineRequest, TradeCarcase, TradeDay } from '#shared/contracts/trade.ts';
import { shortEarTag } from '#shared/domain/ear-tag.ts';
import { priceForWeight } from '#shared/domain/money.ts';
import { formatCount } from '#shared/domain/words.ts';

/** `Steer 00214`. */
export function nameBeast({ sex, earTag }: Pick<TradeCarcase, 'sex' | 'earTag'>): string {
  return `${sex.charAt(0).toUpperCase()}${sex.slice(1)} ${shortEarTag(earTag)}`;
}

/** Breed, class, age and hanging, as a butcher asks for them. */
export function describeBeast(carcase: TradeCarcase): string {
  const grade = [carcase.conformation, carcase.fatClass].filter(Boolean).join(' ');
  return [
    carcase.breed,
    grade || 'not classified yet',
    formatCount(carcase.ageMonths, 'month'),
    carcase.hungDays > 0 ? `hung ${formatCount(carcase.hungDays, 'day')}` : 'not hung yet',
  ].join(' · ');
}

type UnitLine = Extract<ReservationLineRequest, { kind: 'unit' }>;

export function findUnitLine(lines: readonly ReservationLineRequest[], unit: UnitLine): UnitLine | undefined {
  return lines.find(
    (line): line is UnitLine =>
      line.kind === 'unit' &&
      line.unitKind === unit.unitKind &&
      line.carcaseId === unit.carcaseId &&
      line.side === unit.side,
  );
}

/** Puts a unit on the list or takes it off. */
export function toggleUnit(lines: readonly ReservationLineRequest[], unit: UnitLine): ReservationLineRequest[] {
  const found = findUnitLine(lines, unit);
  return found ? lines.filter((line) => line !== found) : [...lines, unit];
}

/** Sets the kilograms of one cut; none takes it off the list. What is no number stays, so that the form can say so. */
export function setCutGrams(
  lines: readonly ReservationLineRequest[],
  cutId: string,
  grams: number | null,
): ReservationLineRequest[] {
  const others = lines.filter((line) => line.kind !== 'cut' || line.cutId !== cutId);
  return grams === null ? others : [...others, { kind: 'cut', cutId, grams }];
}

/** What the list comes to at the weights known now and the butcher's own prices. */
export function estimatePence(lines: NewReservation['lines'], day: TradeDay): number {
  return lines.reduce((sum, line) => sum + lineEstimate(line, day), 0);
}

function lineEstimate(line: ReservationLineRequest, day: TradeDay): number {
  if (line.kind === 'cut') {
    const cut = day.cuts.find((one) => one.cutId === line.cutId);
    return cut && !Number.isNaN(line.grams) ? priceForWeight(line.grams, cut.tenthPencePerKg) : 0;
  }
  const side = day.carcases
    .find((carcase) => carcase.id === line.carcaseId)
    ?.sides.find((one) => one.side === line.side);
  const unit = side?.units.find((one) => one.unitKind === line.unitKind);
  return unit?.tenthPencePerKg ? priceForWeight(unit.grams, unit.tenthPencePerKg) : 0;
}
