import type { Term } from '#shared/engine/linear/lp-model.ts';
import type { MinceRule } from './allocation-input.ts';
import {
  addShort,
  addTerm,
  getCut,
  hasSupply,
  heapKey,
  pencePerKg,
  type AllocationModel,
  type CutLine,
} from './allocation-model.ts';

function addCutLine(model: AllocationModel, line: CutLine): void {
  const name = model.namer.name('t', line.id);
  const kg = line.grams / 1000;
  const isMade = hasSupply(model, line.cutId, 'fresh');
  const column = model.lp.addColumn(`trade_${name}`, {
    cost: pencePerKg(line.tenthPencePerKg) - pencePerKg(model.input.packingTenthPencePerKg),
    upper: isMade ? kg : 0,
  });
  if (isMade) addTerm(model.uses, heapKey(line.cutId, 'fresh'), [1, column]);
  model.tradeCuts.push({ line, column });
  if (!line.isConfirmed) return;
  const short = addShort(model, {
    name: `short_${name}`,
    most: kg,
    isWhole: false,
    priority: line.priority,
    penceEach: Math.max(1, pencePerKg(line.tenthPencePerKg)),
  });
  model.lp.addRow(`ordered_${name}`, [[1, column], ...short], ['=', kg]);
}

/** Surplus of the allowed cuts may become mince, one way down, while the blend keeps its lean. Fresh meat only. */
export function addMince(model: AllocationModel, mince: MinceRule): void {
  if (mince.closedReason !== null || !model.cuts.has(mince.productCutId)) return;
  const blend: Term[] = [];
  for (const cutId of mince.allowedCutIds) {
    if (cutId === mince.productCutId || !model.cuts.has(cutId) || !hasSupply(model, cutId, 'fresh')) continue;
    const column = model.lp.addColumn(`mince_${model.namer.name('k', cutId)}`, {
      cost: -pencePerKg(mince.costTenthPencePerKg),
    });
    addTerm(model.uses, heapKey(cutId, 'fresh'), [1, column]);
    addTerm(model.yields, heapKey(mince.productCutId, 'fresh'), [1, column]);
    blend.push([(getCut(model, cutId).leanPpht - mince.minLeanPpht) / 100_000, column]);
    model.minced.push({ cutId, column });
  }
  model.lp.addRow('mince_lean', blend, ['>=', 0]);
}

export function addCutLines(model: AllocationModel): void {
  for (const line of model.input.trade) if (line.kind === 'cut') addCutLine(model, line);
}
