import type { Solution } from '#shared/engine/linear/solve.ts';
import type { AllocationModel, UnitColumn, WayColumn } from './allocation-model.ts';
import type { PlannedFate } from './allocation-plan.ts';
import type { Heaps } from './heaps.ts';
import { costByPrimal } from './model-sides.ts';
import { unitPrimals } from './trade-fit.ts';

export type Fates = { fates: PlannedFate[]; sold: UnitColumn[]; butcheryPence: number };

function isChosen(solution: Solution, column: string): boolean {
  return (solution.columns[column] ?? 0) > 0.5;
}

function soldPrimals(sold: readonly UnitColumn[], way: WayColumn): PlannedFate['soldPrimals'] {
  return sold
    .filter(({ side }) => side === way.side)
    .flatMap(({ line, side }) =>
      unitPrimals(line.unit, side).map(({ primalId }) => ({ primalId, tradeLineId: line.id })),
    )
    .filter(({ primalId }) => way.choice.primals.some((primal) => primal.primalId === primalId));
}

/** Grams that a way gives, without the primals that leave whole. */
function addYields(way: WayColumn, gone: ReadonlySet<string>, heaps: Heaps): void {
  for (const { primalId, cutId, grams } of way.way.yields) if (!gone.has(primalId)) heaps.add(cutId, 'fresh', grams);
}

/** Butchery of the primals that stay, shared as in the model. */
function wayCost({ way, choice }: WayColumn, gone: ReadonlySet<string>): number {
  if (gone.size === 0) return way.costPence;
  const costs = costByPrimal(choice, way);
  return choice.primals.reduce((sum, { primalId }) => sum + (gone.has(primalId) ? 0 : (costs.get(primalId) ?? 0)), 0);
}

/** What becomes of every choice of every side, in whole numbers; what the ways give is put on the heaps. */
export function readFates(model: AllocationModel, solution: Solution, heaps: Heaps): Fates {
  const sold = model.units.filter(({ column }) => isChosen(solution, column));
  let butcheryPence = sold.reduce((sum, unit) => sum + unit.butcheryPence, 0);
  const choices = new Map<string, WayColumn[]>();
  for (const way of model.ways) {
    const key = `${way.side.id} ${way.choice.choiceId}`;
    choices.set(key, [...(choices.get(key) ?? []), way]);
  }
  const fates = [...choices.values()].flatMap((ways): PlannedFate[] => {
    const [first] = ways;
    if (!first) return [];
    const leaving = soldPrimals(sold, first);
    const gone = new Set(leaving.map(({ primalId }) => primalId));
    const isWhollyGone = first.choice.primals.every(({ primalId }) => gone.has(primalId));
    const chosen = isWhollyGone ? undefined : ways.find(({ column }) => isChosen(solution, column));
    if (chosen) {
      addYields(chosen, gone, heaps);
      butcheryPence += wayCost(chosen, gone);
    }
    const { side, choice } = first;
    return [
      {
        sideId: side.id,
        carcaseId: side.carcaseId,
        side: side.side,
        choiceId: choice.choiceId,
        wayId: chosen?.way.wayId ?? null,
        soldPrimals: leaving,
      },
    ];
  });
  return { fates, sold, butcheryPence };
}
