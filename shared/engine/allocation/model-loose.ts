import type { Cut } from '#shared/engine/figures/specification.ts';
import type { Term } from '#shared/engine/linear/lp-model.ts';
import type { LooseDemand } from './allocation-input.ts';
import {
  addShort,
  addTerm,
  getCut,
  hasSupply,
  heapKey,
  pencePerKg,
  type AllocationModel,
  type LooseColumns,
} from './allocation-model.ts';

/** The middle of the pack range, in grams. */
export function plannedPackGrams(cut: { minPackGrams: number; maxPackGrams: number }): number {
  return Math.round((cut.minPackGrams + cut.maxPackGrams) / 2);
}

type LooseDraft = { name: string; cut: Cut; demand: LooseDemand; packGrams: number };

/** Value of one planned pack in pence: its own rate, less what is counted on its grams already. */
function packValue(model: AllocationModel, draft: LooseDraft, rate: number): number {
  const packing = pencePerKg(model.input.packingTenthPencePerKg);
  const counted = model.isPacked ? gramValue(model, draft) : 0;
  return (pencePerKg(rate) - packing - counted) * (draft.packGrams / 1000);
}

/** With whole packs a lighter pack brings less: its grams count at the lowest rate, the rest goes by the pack. */
function gramValue(model: AllocationModel, { cut, demand }: LooseDraft): number {
  const rates = [cut.tenthPencePerKg, ...demand.steps.map(({ tenthPencePerKg }) => tenthPencePerKg)];
  return pencePerKg(Math.min(...rates)) - pencePerKg(model.input.packingTenthPencePerKg);
}

function addLooseSources(model: AllocationModel, draft: LooseDraft): LooseColumns['sources'] {
  const { cutId } = draft.demand;
  const states = (['fresh', 'frozen'] as const).filter((state) => hasSupply(model, cutId, state));
  return states.map((state) => {
    const cost = model.isPacked ? gramValue(model, draft) : 0;
    const column = model.lp.addColumn(`loose_${draft.name}_${state}`, { cost });
    addTerm(model.uses, heapKey(cutId, state), [1, column]);
    if (state === 'fresh') addTerm(model.packed, cutId, [1, column]);
    return { state, column };
  });
}

/** Grams follow packs: of the middle of the range in the plan, of any allowed weight where packs are whole. */
function addLooseGrams(
  model: AllocationModel,
  draft: LooseDraft,
  about: { packs: readonly string[]; grams: readonly Term[] },
): string | null {
  const { lp } = model;
  const { name, cut, packGrams } = draft;
  if (!model.isPacked) {
    const planned = about.packs.map((column): Term => [-packGrams / 1000, column]);
    lp.addRow(`loose_grams_${name}`, [...about.grams, ...planned], ['=', 0]);
    return null;
  }
  const whole = lp.addColumn(`loose_packs_${name}`, { kind: 'integer' });
  lp.addRow(`loose_count_${name}`, [[1, whole], ...about.packs.map((column): Term => [-1, column])], ['=', 0]);
  lp.addRow(`loose_heavy_${name}`, [...about.grams, [-cut.minPackGrams / 1000, whole]], ['>=', 0]);
  lp.addRow(`loose_light_${name}`, [...about.grams, [-cut.maxPackGrams / 1000, whole]], ['<=', 0]);
  return whole;
}

function addLoose(model: AllocationModel, demand: LooseDemand): void {
  const { lp } = model;
  const cut = getCut(model, demand.cutId);
  const name = model.namer.name('k', demand.cutId);
  const packGrams = plannedPackGrams(cut);
  const draft: LooseDraft = { name, cut, demand, packGrams };
  const floor = lp.addColumn(`loose_sold_${name}`, {
    cost: packValue(model, draft, cut.tenthPencePerKg),
    upper: demand.floor,
  });
  const steps = demand.steps.map((step, index) =>
    lp.addColumn(`loose_more${index + 1}_${name}`, {
      cost: packValue(model, draft, step.tenthPencePerKg),
      upper: step.packs,
    }),
  );
  const sources = addLooseSources(model, draft);
  const grams = sources.map(({ column }): Term => [1, column]);
  const packs = addLooseGrams(model, draft, { packs: [floor, ...steps], grams });
  const short = addShort(model, {
    name: `short_loose_${name}`,
    most: demand.floor,
    isWhole: false,
    priority: demand.priority,
    penceEach: Math.max(1, (pencePerKg(cut.tenthPencePerKg) * packGrams) / 1000),
  });
  lp.addRow(`loose_floor_${name}`, [[1, floor], ...short], ['=', demand.floor]);
  model.loose.push({ demand, packGrams, floor, steps, sources, packs });
}

export function addLooseDemand(model: AllocationModel): void {
  for (const demand of model.input.loose) addLoose(model, demand);
}
