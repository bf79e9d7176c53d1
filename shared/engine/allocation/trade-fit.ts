import { priceForWeight } from '#shared/domain/money.ts';
import type { ChoiceSupply, SideSupply } from '#shared/engine/cutout/cutout-types.ts';
import type { Fit, TradeLine, TradeUnit } from './allocation-input.ts';

export type UnitLine = Extract<TradeLine, { kind: 'unit' }>;
export type FittingUnit = {
  line: UnitLine;
  side: SideSupply;
  grams: number;
  incomePence: number;
  butcheryPence: number;
};

function choicesOf(unit: TradeUnit, side: SideSupply): ChoiceSupply[] {
  if (unit.kind === 'side') return side.choices;
  if (unit.kind === 'quarter') return side.choices.filter(({ quarter }) => quarter === unit.quarter);
  return side.choices.filter(({ primals }) => primals.some(({ primalId }) => primalId === unit.primalId));
}

export function unitPrimals(unit: TradeUnit, side: SideSupply): ChoiceSupply['primals'] {
  const primals = choicesOf(unit, side).flatMap((choice) => choice.primals);
  return unit.kind === 'primal' ? primals.filter(({ primalId }) => primalId === unit.primalId) : primals;
}

function unitGrams(unit: TradeUnit, side: SideSupply): number {
  if (unit.kind === 'side') return side.grams;
  if (unit.kind === 'quarter') return side.quarterGrams[unit.quarter];
  return unitPrimals(unit, side).reduce((sum, { grams }) => sum + grams, 0);
}

function fits(fit: Fit, side: SideSupply): boolean {
  const isListed = (list: readonly string[] | null, value: string | null) =>
    list === null || (value !== null && list.includes(value));
  return (
    (fit.carcaseId === null || fit.carcaseId === side.carcaseId) &&
    (fit.side === null || fit.side === side.side) &&
    (fit.minSideGrams === null || side.grams >= fit.minSideGrams) &&
    (fit.maxSideGrams === null || side.grams <= fit.maxSideGrams) &&
    isListed(fit.conformations, side.conformation) &&
    isListed(fit.fatClasses, side.fatClass) &&
    (fit.minHangingDays === null || side.hangingDays >= fit.minHangingDays)
  );
}

/** The ways that the line instructs, for the choices that the unit holds; null where one of them is closed. */
function instructedCost(line: UnitLine, side: SideSupply): number | null {
  const choices = choicesOf(line.unit, side);
  let pence = 0;
  for (const { choiceId, wayId } of line.instructions) {
    const choice = choices.find((each) => each.choiceId === choiceId);
    if (!choice) continue;
    const way = choice.ways.find((each) => each.wayId === wayId);
    if (!way || way.closedReason !== null) return null;
    pence += way.costPence;
  }
  return pence;
}

/**
 * The unit that a side could give to a trade line, or null when the side does not fit, may not leave whole, or has an
 * instructed way closed. Income is the line's rate on the unit's estimated grams; instructed ways cost their butchery.
 */
export function fitUnit(line: UnitLine, side: SideSupply): FittingUnit | null {
  const primals = unitPrimals(line.unit, side);
  if (primals.length === 0 || !fits(line.fit, side)) return null;
  if (side.closedUnitReason !== null && primals.some(({ hasVertebrae }) => hasVertebrae)) return null;
  const butcheryPence = instructedCost(line, side);
  const grams = unitGrams(line.unit, side);
  if (butcheryPence === null || grams === 0) return null;
  return { line, side, grams, incomePence: priceForWeight(grams, line.tenthPencePerKg), butcheryPence };
}
