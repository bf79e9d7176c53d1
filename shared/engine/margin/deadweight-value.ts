import { priceForWeight } from '#shared/domain/money.ts';
import { isOlderThan } from '#shared/engine/cutout/vertebrae-rule.ts';
import { EngineError } from '#shared/engine/engine-error.ts';
import type { DeadweightInput, DeadweightValue, PriceGrid } from './margin-types.ts';

function classAdjustment(grid: PriceGrid, conformation: string, fatClass: string): number {
  const adjustment = grid.adjustments[fatClass]?.[conformation];
  if (adjustment !== undefined) return adjustment;
  const message = `The price grid ${grid.name} has no price for ${conformation} ${fatClass}. Add it to the grid first.`;
  throw new EngineError('CLASS_UNKNOWN', message, { node: 'grid', figures: { conformation, fatClass } });
}

/** The step with the highest threshold that is reached, whatever the order in which the steps are written. */
function lastReached<T extends { adjustment: number }>(
  steps: readonly T[],
  threshold: (step: T) => number,
  isReached: (threshold: number) => boolean,
): number {
  const reached = steps.filter((step) => isReached(threshold(step)));
  const last = reached.reduce<T | null>(
    (best, step) => (best && threshold(best) >= threshold(step) ? best : step),
    null,
  );
  return last?.adjustment ?? 0;
}

/**
 * What the carcase would have brought sold deadweight that week: cold weight x (base + class + weight + age), less levy,
 * haulage and deductions. British prices are pence a kg of cold deadweight. Refuses with CLASS_UNKNOWN when the grid has
 * no price for the class.
 */
export function deadweightValue(input: DeadweightInput): DeadweightValue {
  const { grid, bornDay, killDay } = input;
  const adjustments = {
    classAdjustment: classAdjustment(grid, input.conformation, input.fatClass),
    weightAdjustment: lastReached(
      grid.weightSteps,
      (step) => step.fromGrams,
      (fromGrams) => input.coldGrams >= fromGrams,
    ),
    ageAdjustment: lastReached(
      grid.ageSteps,
      (step) => step.overMonths,
      (months) => bornDay === null || isOlderThan(bornDay, killDay, months),
    ),
  };
  const { classAdjustment: byClass, weightAdjustment, ageAdjustment } = adjustments;
  const tenthPencePerKg = input.baseTenthPencePerKg + byClass + weightAdjustment + ageAdjustment;
  const grossPence = priceForWeight(input.coldGrams, tenthPencePerKg);
  const deductedPence = input.levyPence + input.haulagePence + input.deductionsPence;
  return { tenthPencePerKg, ...adjustments, grossPence, deductedPence, netPence: grossPence - deductedPence };
}
