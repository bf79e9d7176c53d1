import type { AllocationModel } from './allocation-model.ts';

/**
 * What is decided first: how many boxes of each variant, how many sides are cut each way, how many units each trade line
 * gets. Sides of one day are nearly alike, so these counts settle the contribution; which side goes which way follows.
 */
export function leadingSums(model: AllocationModel): string[][] {
  const sums = new Map<string, string[]>();
  const add = (key: string, column: string) => {
    const columns = sums.get(key);
    if (columns) columns.push(column);
    else sums.set(key, [column]);
  };
  for (const { boxes } of model.boxes) add(`boxes ${boxes}`, boxes);
  for (const { line, column } of model.units) add(`unit ${line.id}`, column);
  for (const { choice, way, column } of model.ways) add(`way ${choice.choiceId} ${way.wayId}`, column);
  return [...sums.values()];
}
