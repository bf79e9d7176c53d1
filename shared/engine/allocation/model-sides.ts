import { apportion } from '#shared/engine/apportion.ts';
import type { ChoiceSupply, SideSupply, WayYield } from '#shared/engine/cutout/cutout-types.ts';
import type { Term } from '#shared/engine/linear/lp-model.ts';
import { addShort, addTerm, heapKey, type AllocationModel, type UnitColumn } from './allocation-model.ts';
import type { TradeUnit } from './allocation-input.ts';
import { fitUnit, type UnitLine } from './trade-fit.ts';

/** `c3_left`: carcases are numbered in the order of their ids. */
function sideName(model: AllocationModel, side: SideSupply): string {
  return `${model.namer.name('c', side.carcaseId)}_${side.side}`;
}

function unitName(unit: TradeUnit): string {
  if (unit.kind === 'side') return 'side';
  return unit.kind === 'quarter' ? unit.quarter : unit.primalId.replaceAll('-', '_');
}

/** What a missing unit weighs in the shortfall: the average of those that fit, else a quarter of 80 kg. */
function missingPence(line: UnitLine, fitting: readonly UnitColumn[]): number {
  if (fitting.length === 0) return line.tenthPencePerKg * 8;
  return fitting.reduce((sum, { incomePence }) => sum + incomePence, 0) / fitting.length;
}

function addUnitLine(model: AllocationModel, line: UnitLine): void {
  const name = model.namer.name('t', line.id);
  const fitting = model.input.sides.flatMap((side): UnitColumn[] => {
    const unit = fitUnit(line, side);
    if (!unit) return [];
    const column = model.lp.addColumn(`sell_${name}_${sideName(model, side)}_${unitName(line.unit)}`, {
      cost: unit.incomePence - unit.butcheryPence,
      kind: 'binary',
    });
    return [{ ...unit, column }];
  });
  model.units.push(...fitting);
  const sold: Term[] = fitting.map(({ column }) => [1, column]);
  if (!line.isConfirmed) {
    model.lp.addRow(`wanted_${name}`, sold, ['<=', line.quantity]);
    return;
  }
  const short = addShort(model, {
    name: `short_${name}`,
    most: line.quantity,
    isWhole: true,
    priority: line.priority,
    penceEach: missingPence(line, fitting),
  });
  model.lp.addRow(`ordered_${name}`, [...sold, ...short], ['=', line.quantity]);
}

function lockedWay(model: AllocationModel, side: SideSupply, choice: ChoiceSupply): string | null {
  const lock = model.input.locks.find(
    (each) => each.carcaseId === side.carcaseId && each.side === side.side && each.choiceId === choice.choiceId,
  );
  return lock?.wayId ?? null;
}

/** Butchery of a way, shared over the primals that it covers by their grams: a primal that leaves whole costs none. */
export function costByPrimal(choice: ChoiceSupply, way: WayYield): Map<string, number> {
  const shares = choice.primals.map(({ primalId, grams }) => ({ id: primalId, weight: grams }));
  if (way.costPence === 0 || shares.every(({ weight }) => weight === 0)) return new Map();
  return apportion(way.costPence, shares);
}

type Place = { side: SideSupply; choice: ChoiceSupply; name: string; leaving: UnitColumn[] };

function addYields(model: AllocationModel, way: WayYield, primals: ReadonlyMap<string, string>): void {
  for (const { primalId, cutId, grams } of way.yields) {
    const column = primals.get(primalId);
    if (column && grams > 0) addTerm(model.yields, heapKey(cutId, 'fresh'), [grams / 1000, column]);
  }
}

/** One column per way when all that a choice covers shares one fate. */
function addWholeChoice(model: AllocationModel, { side, choice, name, leaving }: Place): void {
  const locked = lockedWay(model, side, choice);
  const ways = choice.ways.filter(({ closedReason }) => closedReason === null);
  const cut: Term[] = ways.map((way) => {
    const column = model.lp.addColumn(`way_${name}_${way.wayId.replaceAll('-', '_')}`, {
      cost: -way.costPence,
      lower: way.wayId === locked ? 1 : 0,
      kind: 'binary',
    });
    const primals = new Map(choice.primals.map(({ primalId }) => [primalId, column]));
    model.ways.push({ side, choice, way, column, primals });
    addYields(model, way, primals);
    return [1, column];
  });
  const left: Term[] = leaving.map(({ column }) => [1, column]);
  model.lp.addRow(`fate_${name}`, [...cut, ...left], ['=', 1]);
}

/**
 * Where one of several primals may leave whole, each primal has a fate of its own, but those that stay share one way:
 * with the rump sold, a T-bone loin gives the loin's share of its lines.
 */
function addSplitChoice(model: AllocationModel, { side, choice, name, leaving }: Place): void {
  const locked = lockedWay(model, side, choice);
  const fates = new Map<string, Term[]>(choice.primals.map(({ primalId }) => [primalId, []]));
  const whole: Term[] = [];
  for (const { line, column } of leaving) {
    if (line.unit.kind === 'primal') fates.get(line.unit.primalId)?.push([1, column]);
    else whole.push([1, column]);
  }
  const ways = choice.ways.filter(({ closedReason }) => closedReason === null);
  const chosen: Term[] = ways.map((way) => {
    const wayName = `${name}_${way.wayId.replaceAll('-', '_')}`;
    const column = model.lp.addColumn(`way_${wayName}`, { lower: way.wayId === locked ? 1 : 0, kind: 'binary' });
    const costs = costByPrimal(choice, way);
    const primals = new Map(
      choice.primals.map(({ primalId }) => {
        const part = model.lp.addColumn(`part_${wayName}_${primalId.replaceAll('-', '_')}`, {
          cost: -(costs.get(primalId) ?? 0),
          lower: way.wayId === locked ? 1 : 0,
          upper: 1,
        });
        model.lp.addRow(
          `as_${wayName}_${primalId.replaceAll('-', '_')}`,
          [
            [1, part],
            [-1, column],
          ],
          ['<=', 0],
        );
        fates.get(primalId)?.push([1, part]);
        return [primalId, part] as const;
      }),
    );
    model.ways.push({ side, choice, way, column, primals });
    addYields(model, way, primals);
    return [1, column];
  });
  model.lp.addRow(`fate_${name}`, [...chosen, ...whole], ['<=', 1]);
  for (const [primalId, terms] of fates) {
    model.lp.addRow(`fate_${name}_${primalId.replaceAll('-', '_')}`, [...terms, ...whole], ['=', 1]);
  }
}

function isTouched({ line }: UnitColumn, choice: ChoiceSupply): boolean {
  const { unit } = line;
  if (unit.kind === 'side') return true;
  if (unit.kind === 'quarter') return unit.quarter === choice.quarter;
  return choice.primals.some(({ primalId }) => primalId === unit.primalId);
}

/** Whole sides, quarters and primals for the trade, and the way of everything else: each primal has one fate. */
export function addSides(model: AllocationModel): void {
  for (const line of model.input.trade) if (line.kind === 'unit') addUnitLine(model, line);
  for (const side of model.input.sides) {
    const sold = model.units.filter((unit) => unit.side === side);
    for (const choice of side.choices) {
      const leaving = sold.filter((unit) => isTouched(unit, choice));
      const place = { side, choice, name: `${sideName(model, side)}_${choice.choiceId.replaceAll('-', '_')}`, leaving };
      const isSplit = choice.primals.length > 1 && leaving.some(({ line }) => line.unit.kind === 'primal');
      if (isSplit) addSplitChoice(model, place);
      else addWholeChoice(model, place);
    }
  }
}
