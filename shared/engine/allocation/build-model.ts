import type { Term } from '#shared/engine/linear/lp-model.ts';
import type { AllocationInput, MeatState, Priority } from './allocation-input.ts';
import {
  emptyModel,
  getCut,
  heapKey,
  pencePerKg,
  stockGrams,
  type AllocationModel,
  type Patterns,
} from './allocation-model.ts';
import { addBoxes } from './model-boxes.ts';
import { addCutLines, addMince } from './model-cut-lines.ts';
import { addLooseDemand } from './model-loose.ts';
import { addSides } from './model-sides.ts';

/** Whole packs of the day: what boxes and loose packs take of a cut is some number of packs within its range. */
function addPacks(model: AllocationModel, cutId: string): void {
  const { lp } = model;
  const cut = getCut(model, cutId);
  const name = model.namer.name('k', cutId);
  const made = [...(model.packed.get(cutId) ?? [])];
  const stock = stockGrams(model.input, cutId, 'fresh') / 1000;
  if (stock > 0) made.push([-1, lp.addColumn(`packed_before_${name}`, { upper: stock })]);
  const packs = lp.addColumn(`packs_${name}`, { upper: mostPacks(model, cutId), kind: 'integer' });
  lp.addRow(`packs_heavy_${name}`, [...made, [-cut.minPackGrams / 1000, packs]], ['>=', 0]);
  lp.addRow(`packs_light_${name}`, [...made, [-cut.maxPackGrams / 1000, packs]], ['<=', 0]);
}

/** More packs of a cut than every way of every side could give together. */
function mostPacks(model: AllocationModel, cutId: string): number {
  const made = (model.yields.get(heapKey(cutId, 'fresh')) ?? []).reduce(
    (sum, [kg, column]) => sum + (column.startsWith('mince_') ? 0 : kg),
    0,
  );
  const minced =
    cutId === model.input.mince?.productCutId
      ? model.minced.reduce((sum, each) => sum + supplyKg(model, each.cutId), 0)
      : 0;
  return Math.ceil((made + minced) / (getCut(model, cutId).minPackGrams / 1000));
}

function supplyKg(model: AllocationModel, cutId: string): number {
  const made = (model.yields.get(heapKey(cutId, 'fresh')) ?? []).reduce((sum, [kg]) => sum + kg, 0);
  return made + stockGrams(model.input, cutId, 'fresh') / 1000;
}

function addSupply(model: AllocationModel, cutId: string, state: MeatState): void {
  const key = heapKey(cutId, state);
  const stock = stockGrams(model.input, cutId, state) / 1000;
  const yields = model.yields.get(key) ?? [];
  if (yields.length === 0 && stock === 0) return;
  const name = `${model.namer.name('k', cutId)}_${state}`;
  const column = model.lp.addColumn(`left_${name}`, {
    cost: pencePerKg(getCut(model, cutId).clearanceTenthPencePerKg),
  });
  model.left.push({ cutId, state, column });
  const made: Term[] = yields.map(([kg, each]) => [-kg, each]);
  model.lp.addRow(`supply_${name}`, [...(model.uses.get(key) ?? []), [1, column], ...made], ['=', stock]);
}

/**
 * The program of one cutting day from an input in order (see `orderInput`). With `isPacked` the packs of every cut in
 * every line are whole numbers: too many for the plan itself, but soon answered once ways and unit sales are fixed.
 * With `patterns` every box follows one of them.
 */
export function buildModel(
  input: AllocationInput,
  about: { isPacked?: boolean; isElastic?: boolean; patterns?: Patterns } = {},
): AllocationModel {
  const { isPacked = false, isElastic = false, patterns = null } = about;
  const model = emptyModel(input, { isPacked, isElastic, patterns });
  for (const { id } of input.cuts) model.namer.name('k', id);
  addSides(model);
  if (input.mince) addMince(model, input.mince);
  addBoxes(model);
  addLooseDemand(model);
  addCutLines(model);
  for (const { id } of input.cuts) {
    if (!isPacked && model.packed.has(id)) addPacks(model, id);
    for (const state of ['fresh', 'frozen'] as const) addSupply(model, id, state);
  }
  for (const line of model.namer.legend) model.lp.addComment(line);
  return model;
}

export const PRIORITIES = [1, 2, 3] as const satisfies readonly Priority[];

/** Everything that promises of one priority fall short by, weighed by what it would have brought in pence. */
export function shortTerms(model: AllocationModel, priority: Priority): Term[] {
  return model.shorts
    .filter((short) => short.priority === priority)
    .map(({ penceEach, column }) => [penceEach, column]);
}
